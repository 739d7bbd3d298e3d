import { Link } from 'react-router-dom';
import type { RunPage } from '#shared/schemas/runs.ts';
import type { DisplayUnit } from '#shared/units.ts';
import type { WordedPair } from '#shared/wording/pair-words.ts';
import { wordDuctPair } from '#shared/wording/word-duct-pair.ts';
import { wordSettings } from '#shared/wording/word-settings.ts';
import { SectionHead } from '../../components/section-head.tsx';
import { Table, Td, Th } from '../../components/table.tsx';
import { dateWords, timeWords } from '../../format/when.ts';
import { Causes, NextChecks } from './findings.tsx';

type RunPairsProps = { run: RunPage; unit: DisplayUnit; zone: string };

/** What the run says together with one of the duct the other way, and with one on another heat setting. */
export function RunPairs({ run, unit, zone }: RunPairsProps) {
  const { duct, settings } = run.pairs;
  if (!duct && !settings) return null;
  const { fuel, control } = run.machine;
  return (
    <section aria-labelledby="pairs">
      <SectionHead id="pairs" state="the same machine, one thing changed">
        Beside another run
      </SectionHead>
      {duct && (
        <PairSheet
          worded={wordDuctPair(duct.pair, { unit, fuel })}
          first={{ ...duct.off, how: 'duct off' }}
          second={{ ...duct.on, how: 'duct on' }}
          ownId={run.id}
          zone={zone}
        />
      )}
      {settings && (
        <PairSheet
          worded={wordSettings(settings.pair, {
            unit,
            control,
            hotter: settings.hotter.setting,
            cooler: settings.cooler.setting,
          })}
          first={{ ...settings.hotter, how: `${settings.hotter.setting} heat` }}
          second={{ ...settings.cooler, how: `${settings.cooler.setting} heat` }}
          ownId={run.id}
          zone={zone}
        />
      )}
    </section>
  );
}

type Side = { id: string; label: string; startedAtMs: number; how: string };
type PairSheetProps = {
  worded: WordedPair;
  first: Side;
  second: Side;
  ownId: string;
  zone: string;
};

function PairSheet({ worded, first, second, ownId, zone }: PairSheetProps) {
  return (
    <article className="border-b border-print pt-[18px] pb-[30px] last:border-b-0">
      <h3 className="font-serif text-[1.4375rem] leading-[1.15] font-semibold tracking-[-0.01em]">
        {worded.title}
      </h3>
      <p className="words pt-1.5 text-[1rem]">
        <SideWords side={first} ownId={ownId} zone={zone} />.{' '}
        <SideWords side={second} ownId={ownId} zone={zone} />.
      </p>
      <p className="max-w-read py-2.5 text-say">{worded.sentences.join(' ')}</p>
      {worded.rows.length > 0 && <Figures worded={worded} first={first} second={second} />}
      {worded.causes.length > 0 && <Causes causes={worded.causes} />}
      {worded.nextChecks.length > 0 && <NextChecks checks={worded.nextChecks} />}
    </article>
  );
}

/** A run by its name and time; a link where it is not the one that is being looked at. */
function SideWords({ side, ownId, zone }: { side: Side; ownId: string; zone: string }) {
  const { id, label, startedAtMs, how } = side;
  const when = `${dateWords(startedAtMs, zone, startedAtMs)} at ${timeWords(startedAtMs, zone)}`;
  if (id === ownId) {
    return (
      <>
        {sentenceCase(how)}: <b className="font-semibold">this run</b>
      </>
    );
  }
  return (
    <>
      {sentenceCase(how)}:{' '}
      <Link to={`/runs/${id}`} className="relative -my-[15px] inline-block py-[15px]">
        {label}, {when}
      </Link>
    </>
  );
}

function Figures({ worded, first, second }: { worded: WordedPair; first: Side; second: Side }) {
  const head = (
    <>
      <Th>Figure</Th>
      <Th>{sentenceCase(first.how)}</Th>
      <Th>{sentenceCase(second.how)}</Th>
      <Th>Apart</Th>
    </>
  );
  return (
    <>
      <div className="hidden desk:block">
        <Table caption="Figures of the two runs" head={head} className="mb-5">
          {worded.rows.map((row) => (
            <tr key={row.label}>
              <Td className="lab">{row.label}</Td>
              <Td className="fig">{row.first}</Td>
              <Td className="fig">{row.second}</Td>
              <Td className="fig">{row.apart}</Td>
            </tr>
          ))}
        </Table>
      </div>
      <ul className="border-t border-print desk:hidden">
        {worded.rows.map((row) => (
          <li
            key={row.label}
            className="words border-b border-hair py-2 text-[1rem] leading-[1.35]"
          >
            <b className="lab block">{row.label}</b>
            <span className="fig">
              {row.first}, then {row.second}
            </span>
            <span className="fig block text-print">apart {row.apart}</span>
          </li>
        ))}
      </ul>
    </>
  );
}

function sentenceCase(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
