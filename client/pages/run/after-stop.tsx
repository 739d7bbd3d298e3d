import type { RunPage } from '#shared/schemas/runs.ts';
import type { About } from '#shared/wording/finding-words.ts';
import { wordOutcome } from '#shared/wording/word-outcome.ts';

/** After *stop*: what to do in the next ten minutes, in order. */
export function AfterStop({ run, about }: { run: RunPage; about: About }) {
  const { outcome, findings } = run.analysis.analysis;
  const headline = findings[0];
  const steps = headline ? wordOutcome(outcome, headline, about).afterStop : [];
  if (steps.length === 0) return null;
  return (
    <section
      aria-labelledby="after-stop"
      className="mx-4 mb-5 border-t-bar border-b border-stop pt-2.5 pb-2 desk:mx-12"
    >
      <h2 id="after-stop" className="font-gothic text-section text-stop">
        In the next ten minutes
      </h2>
      <ol className="gap-x-10 pt-1 desk:grid desk:grid-cols-2 wide:grid-cols-3">
        {steps.map((step, i) => (
          <li key={step} className="grid grid-cols-[26px_minmax(0,1fr)] py-1">
            <span className="fig text-[1.125rem] font-semibold text-print">{i + 1}</span>
            <span className="text-[1rem] leading-[1.35]">{step}</span>
          </li>
        ))}
      </ol>
    </section>
  );
}
