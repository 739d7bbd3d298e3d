import { useEffect, useState } from 'react';
import type { Analysis } from '#shared/analysis/analysis.ts';
import { compareJudgements } from '#shared/wording/compare-judgements.ts';
import type { About } from '#shared/wording/finding-words.ts';
import { wordJudgements } from '#shared/wording/word-judgements.ts';
import { Word } from '../../components/key.tsx';
import { Notice } from '../../components/notice.tsx';
import { useSending } from '../../device/this-device.ts';
import { findShopJudgement, type ShopJudgement } from './shop-judgement.ts';
import { useRunSent } from './use-run-sent.ts';

type ShopAnswerProps = {
  runId: string;
  /** The phone's own answer; null where it has none. */
  onPhone: Analysis | null;
  about: About;
  /** Under three readings stand in it: neither judges it. */
  isTooShort: boolean;
};

/** Where the run stands: on this phone alone, with the shop, and whether the shop says the same. */
export function ShopAnswer({ runId, onPhone, about, isTooShort }: ShopAnswerProps) {
  const sent = useRunSent(runId);
  const { outcome } = useSending();
  if (!sent) return null;
  if (sent.unsent > 0) {
    const when = outcome === 'signed-out' ? 'after signing in again' : 'when the network is back';
    return (
      <p role="status" className="words border-t border-print py-3 text-table">
        On this phone, {sent.unsent} to send. It goes {when}.
      </p>
    );
  }
  if (sent.refused > 0) {
    return (
      <Notice kind="stop" role="alert" head={`The shop did not take ${sent.refused} of this run.`}>
        What it turned down lies on this phone. <a href="/unsent">See what and why</a>
      </Notice>
    );
  }
  if (isTooShort) {
    return (
      <p role="status" className="words border-t border-print py-3 text-table">
        Sent.
      </p>
    );
  }
  return <Arrived {...{ runId, onPhone, about }} />;
}

type Asked =
  { state: 'asking' | 'not-yet' | 'failed' } | { state: 'there'; judgement: ShopJudgement };

function Arrived({ runId, onPhone, about }: Omit<ShopAnswerProps, 'isTooShort'>) {
  const [asked, setAsked] = useState<Asked>({ state: 'asking' });
  const ask = () => {
    findShopJudgement(runId)
      .then((judgement) =>
        setAsked(judgement ? { state: 'there', judgement } : { state: 'not-yet' }),
      )
      .catch(() => setAsked({ state: 'failed' }));
  };
  // Asked once by itself, when the run is with the shop.
  useEffect(ask, [runId]);

  if (asked.state === 'there') {
    return <BothAnswers {...{ runId, onPhone, about }} shop={asked.judgement} />;
  }
  const words = {
    asking: 'Sent. Asking what the shop makes of it…',
    'not-yet': 'Sent. The shop has not judged it yet.',
    failed: 'Sent. The shop’s answer cannot be fetched now.',
  };
  return (
    <div className="border-t border-print py-3">
      <p role="status" className="words text-table">
        {words[asked.state]}
      </p>
      {asked.state !== 'asking' && <Word onClick={ask}>Ask again</Word>}
    </div>
  );
}

type BothAnswersProps = Omit<ShopAnswerProps, 'isTooShort'> & { shop: ShopJudgement };

/** The phone's answer stays above; the shop's is set beside it, never in its place. */
export function BothAnswers({ runId, onPhone, about, shop }: BothAnswersProps) {
  const link = (
    <a className="word" href={`/runs/${runId}`}>
      See the run there
    </a>
  );
  if (!onPhone) {
    return (
      <Notice head={`The shop judged it, by engine version ${shop.analysis.version}.`}>
        {link}
      </Notice>
    );
  }
  const compared = compareJudgements(onPhone, shop.analysis, about.unit);
  const { heading, sentences, sides } = wordJudgements(
    { analysis: onPhone, about },
    { analysis: shop.analysis, about: { ...about, judgedBy: shop.judgedBy } },
    compared,
  );
  const isApart = compared.apart.length > 0;
  return (
    <Notice kind={isApart ? 'watch' : 'done'} role="status" head={heading}>
      {sentences.map((sentence) => (
        <p key={sentence} className="pt-1">
          {sentence}
        </p>
      ))}
      {sides.length > 0 && (
        <dl className="mt-2 border-t border-print">
          {sides.map(({ name, verdict, findings }) => (
            <div key={name} className="border-b border-hair py-2">
              <dt className="lab">{name}</dt>
              <dd>
                <b className="font-semibold">{verdict}</b> {findings.join('. ')}.
              </dd>
            </div>
          ))}
        </dl>
      )}
      {link}
    </Notice>
  );
}
