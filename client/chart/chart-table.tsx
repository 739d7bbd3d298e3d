import { useState } from 'react';
import type { DisplayUnit } from '#shared/units.ts';
import { formatMoment, formatTemp } from '#shared/wording/format.ts';
import { CallGlyph } from '../components/glyphs.tsx';
import { Key } from '../components/key.tsx';
import { Table, Td, Th } from '../components/table.tsx';
import type { ChartEvent } from './chart-events.ts';
import { indexAtOrAfter, type Pyramid } from './pyramid.ts';
import type { Span } from './strip.ts';

type ChartTableProps = {
  id: string;
  pyramid: Pyramid;
  unit: DisplayUnit;
  events: ChartEvent[];
  view: Span;
  hasAllReadings: boolean;
};

/** The chart for people who do not see it: what happened, and every reading of the span that is shown. */
export function ChartTable({ id, events, unit, ...readings }: ChartTableProps) {
  const [isOpen, setIsOpen] = useState(false);
  return (
    <details
      id={id}
      className="border-t border-hair"
      onToggle={(event) => setIsOpen(event.currentTarget.open)}
    >
      <summary className="word">The chart as tables</summary>
      {isOpen && (
        <div className="grid gap-8 pb-6 desk:grid-cols-2">
          <EventTable events={events} unit={unit} />
          <ReadingTable unit={unit} {...readings} key={readings.view.fromS} />
        </div>
      )}
    </details>
  );
}

function EventTable({ events, unit }: { events: ChartEvent[]; unit: DisplayUnit }) {
  const head = (
    <>
      <Th figure>Time</Th>
      <Th figure>Temperature</Th>
      <Th>What</Th>
    </>
  );
  return (
    <div>
      <h3 className="words py-2 text-[1.0625rem] font-semibold">What happened</h3>
      {events.length === 0 ? (
        <p className="text-body">No cut-out, mark or note in this run.</p>
      ) : (
        <Table caption="What happened in the run, in order of time" head={head}>
          {events.map((event, i) => (
            <tr key={i}>
              <Td figure>{formatMoment(event.timeS)}</Td>
              <Td figure>{event.tempC === null ? '–' : formatTemp(event.tempC, unit)}</Td>
              <Td>
                {event.call && <CallGlyph call={event.call} />} {event.words}
              </Td>
            </tr>
          ))}
        </Table>
      )}
    </div>
  );
}

const PAGE_ROWS = 25;

function ReadingTable(props: Omit<ChartTableProps, 'id' | 'events'>) {
  const { pyramid, unit, view, hasAllReadings } = props;
  const { timesS, tempsC } = pyramid;
  const viewStart = indexAtOrAfter(timesS, view.fromS);
  const viewEnd = Math.min(timesS.length, indexAtOrAfter(timesS, view.toS + 1e-9));
  const [skip, setSkip] = useState(0);
  const from = viewStart + skip;
  const to = Math.min(viewEnd, from + PAGE_ROWS);
  const rows = Array.from({ length: Math.max(0, to - from) }, (_, i) => from + i);
  const head = (
    <>
      <Th figure>Time</Th>
      <Th figure>Temperature</Th>
    </>
  );
  return (
    <div>
      <h3 className="words py-2 text-[1.0625rem] font-semibold">
        {hasAllReadings ? 'Readings' : 'Lowest and highest of each stretch'}
        <span className="font-normal text-print">
          {' '}
          {from + 1} to {to} of {timesS.length.toLocaleString('en-US')}
        </span>
      </h3>
      <Table caption="Readings of the span that the chart shows" head={head}>
        {rows.map((i) => (
          <tr key={i}>
            <Td figure>{momentOf(timesS[i]!)}</Td>
            <Td figure>{formatTemp(tempsC[i]!, unit)}</Td>
          </tr>
        ))}
      </Table>
      <div className="flex gap-2 pt-3">
        <Key size="small" disabled={skip === 0} onClick={() => setSkip(skip - PAGE_ROWS)}>
          Earlier {PAGE_ROWS}
        </Key>
        <Key size="small" disabled={to >= viewEnd} onClick={() => setSkip(skip + PAGE_ROWS)}>
          Later {PAGE_ROWS}
        </Key>
      </div>
    </div>
  );
}

/** Tenths of a second only where the record has them. */
function momentOf(timeS: number): string {
  const tenths = Math.round(timeS * 10) % 10;
  return tenths === 0 ? formatMoment(timeS) : `${formatMoment(Math.floor(timeS))}.${tenths}`;
}
