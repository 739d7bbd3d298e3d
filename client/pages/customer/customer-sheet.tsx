import type { SharedRun } from '#shared/schemas/shares.ts';
import { wordForCustomer, type WordedForCustomer } from '#shared/wording/word-for-customer.ts';
import { formatStep } from '#shared/wording/format.ts';
import { DoneSign, NoteSign, StopSign } from '../../components/signs.tsx';
import { ThemeWord } from '../../components/theme-word.tsx';
import { quoted } from '../../format/job-words.ts';
import { longDateWords } from '../../format/when.ts';
import { CustomerChart } from './customer-chart.tsx';
import { CustomerHeading } from './customer-heading.tsx';
import { CustomerKey } from './customer-key.tsx';
import { Phone } from './reach-shop.tsx';

/** One run for the person whose machine it is; one sheet of paper when printed. */
export function CustomerSheet({ shared }: { shared: SharedRun }) {
  const { analysis, judgedBy, unit, duct, load, machine } = shared;
  const worded = wordForCustomer(analysis, judgedBy, { unit, duct, load, fuel: machine.fuel });
  return (
    <main
      id="main"
      className="mx-auto max-w-letter px-5 pb-12 print:max-w-none print:p-0 print:text-[13px]"
    >
      <ShopHead shared={shared} />
      <CustomerHeading shop={shared.shop.name}>{worded.heading}</CustomerHeading>
      <SafeTonight safe={worded.safeTonight} />
      <div className="grid gap-2 text-lead print:gap-1 print:text-[14px] print:leading-[1.4]">
        {shared.complaint && <p>You told us: {quoted(shared.complaint)}</p>}
        <p>{worded.summary.join(' ')}</p>
      </div>
      <CustomerChart shared={shared} sentence={worded.chartSentence} />
      <div className="gap-x-10 print:grid print:grid-cols-2">
        <Lines name="What it means" lines={worded.meaning} />
        <Lines name="What happens next" lines={worded.next} />
      </div>
      <FootNotes shared={shared} />
      <div className="grid gap-2 pt-6 desk:flex print:hidden">
        <CustomerKey onPress={() => window.print()}>Print or save as PDF</CustomerKey>
      </div>
    </main>
  );
}

function ShopHead({ shared }: { shared: SharedRun }) {
  const { shop, customerName, address, technician, jobNumber, machine, runAtMs } = shared;
  const name = [machine.make, machine.model].filter(Boolean).join(' ');
  const place = machine.place ? `, ${machine.place}` : '';
  return (
    <header>
      <div className="flex items-center justify-between gap-4 border-b-bar border-ink pt-2 pb-3 print:pt-0 print:pb-2">
        <div className="print:flex print:w-full print:items-baseline print:justify-between">
          <p className="font-gothic text-[1.25rem] leading-tight font-semibold font-stretch-[108%]">
            {shop.name}
          </p>
          <p className="words pt-1 text-[1rem] font-medium">
            {[shop.town].filter(Boolean).map((town) => `${town} · `)}
            <Phone number={shop.phone} />
          </p>
        </div>
        <ThemeWord className="print:hidden" />
      </div>
      <p className="lab pt-4 print:pt-2 print:text-[12px]">
        For {customerName}, {address} · {name} dryer, {machine.fuel}
        {place} · visit of {longDateWords(runAtMs, shop.zone)} by {technician} · job {jobNumber}
      </p>
    </header>
  );
}

const SIGNS = { yes: DoneSign, no: StopSign, 'ask-us': NoteSign };

function SafeTonight({ safe }: { safe: WordedForCustomer['safeTonight'] }) {
  const Sign = SIGNS[safe.answer];
  const isNo = safe.answer === 'no';
  return (
    <section
      aria-labelledby="tonight"
      className={`my-4 grid grid-cols-[40px_minmax(0,1fr)] items-start gap-3 border-b py-3 print:my-2 print:py-2 ${isNo ? 'border-t-bar border-stop text-stop' : 'border-t-line border-ink'}`}
    >
      <Sign className="size-9" />
      <div>
        <h2 id="tonight" className="lab print:text-[12px]">
          May you use it tonight?
        </h2>
        <p className="words pt-0.5 text-[1.1875rem] leading-[1.3] font-semibold print:text-[15px]">
          {safe.sentence}
        </p>
      </div>
    </section>
  );
}

function Lines({ name, lines }: { name: string; lines: string[] }) {
  return (
    <section className="mt-8 border-t border-ink pt-2 print:mt-3 print:pt-1">
      <h2 className="font-gothic text-section print:text-[15px]">{name}</h2>
      <ul>
        {lines.map((line) => (
          <li
            key={line}
            className="border-b border-hair py-2 text-[1.125rem] leading-[1.42] print:py-1 print:text-[13.5px]"
          >
            {line}
          </li>
        ))}
      </ul>
    </section>
  );
}

/** How sure the figures are, and what they do not say. */
function FootNotes({ shared }: { shared: SharedRun }) {
  const { analysis, unit, shop, runAtMs } = shared;
  const points = [...analysis.cutOuts, ...analysis.resets];
  const mostK = Math.max(0, ...points.map((point) => point.uTotalK));
  const within = mostK > 0 ? `, each true to within ${formatStep(mostK, unit)}` : '';
  return (
    <footer className="mt-8 border-t border-rule pt-3 text-[1rem] leading-[1.42] text-print print:mt-3 print:pt-1.5 print:text-[12px]">
      <p>
        The figures are readings in the air outlet{within} (19 times in 20). They show how the
        machine behaved on {longDateWords(runAtMs, shop.zone)}, and promise nothing for another day.
      </p>
      <p className="pt-1">
        Questions: call {shop.name}, <Phone number={shop.phone} />. On a smell of gas or burning,
        leave the home and call for help from outside.
      </p>
    </footer>
  );
}
