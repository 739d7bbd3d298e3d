import { useQuery } from '@tanstack/react-query';
import type { z } from 'zod';
import type { RunPage } from '#shared/schemas/runs.ts';
import type { madeShareSchema } from '#shared/schemas/shares.ts';
import { newShareSchema } from '#shared/schemas/shares.ts';
import { sharesQuery, useMakeShare } from '../../api/shares.ts';
import { ErrorSummary } from '../../components/error-summary.tsx';
import { Cells, TextField } from '../../components/field.tsx';
import { Key } from '../../components/key.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { typedNumber } from '../../forms/typed-number.ts';
import { useCheckedForm } from '../../forms/use-checked-form.ts';
import { MadeLink } from './made-link.tsx';
import { ShareList } from './share-list.tsx';

type SharesProps = { run: RunPage; zone: string; shopName: string };
export type MadeShare = z.infer<typeof madeShareSchema>;

/** Links to this run for the customer: as it is judged now. */
export function Shares({ run, zone, shopName }: SharesProps) {
  const shares = useQuery(sharesQuery(run.id));
  const make = useMakeShare(run.id);
  return (
    <section aria-labelledby="shares">
      <SectionHead id="shares" state="the customer sees this run as it is judged now">
        Link for the customer
      </SectionHead>
      <MakeLink onMake={(days) => make.mutateAsync(days)} />
      {make.data && <MadeLink share={make.data} zone={zone} shopName={shopName} />}
      {shares.isPending && <Waiting>Fetching the links…</Waiting>}
      {shares.isError && <Failed error={shares.error} onRetry={shares.refetch} />}
      {shares.data && <ShareList runId={run.id} shares={shares.data} zone={zone} />}
    </section>
  );
}

const USUAL_DAYS = 30;

function MakeLink({ onMake }: { onMake: (days: number) => Promise<unknown> }) {
  const form = useCheckedForm({
    schema: newShareSchema,
    defaultValues: { days: USUAL_DAYS },
    save: ({ days }) => onMake(days),
  });
  return (
    <form onSubmit={form.handleSubmit} noValidate className="max-w-form py-3">
      <ErrorSummary problems={form.problems} attempt={form.attempt} />
      <div className="flex flex-wrap items-end gap-3">
        <Cells className="w-full desk:w-[220px]">
          <TextField
            label="Opens for, days"
            inputMode="numeric"
            autoComplete="off"
            error={form.fault('days')}
            {...form.register('days', typedNumber)}
          />
        </Cells>
        <Key type="submit" face="main" className="w-full desk:w-auto" disabled={form.isSaving}>
          {form.isSaving ? 'Making…' : 'Make a link'}
        </Key>
      </div>
    </form>
  );
}
