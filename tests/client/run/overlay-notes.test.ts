import { expect, test } from 'vitest';
import { overlayNotes } from '#client/pages/run/use-run.ts';
import type { KeptThing } from '#client/device/device-db.ts';
import type { Note } from '#shared/schemas/runs.ts';

const RUN = '0b7c0f5e-8f0a-4c8e-9a61-0f4f6d6b2a11';
const [A, B] = ['1b7c0f5e-8f0a-4c8e-9a61-0f4f6d6b2a11', '2b7c0f5e-8f0a-4c8e-9a61-0f4f6d6b2a11'];
const WORDS = { timeS: 30, tempC: 60, text: 'Belt squeals' };
const OTHER = { timeS: 10, tempC: 55, text: 'Drum starts late' };
const CHANGED = { timeS: 40, tempC: 61, text: 'Belt squeals when hot' };
const TOLD = { by: 'Tess Rowe', saidAtMs: 1000 };

/** Of a run page only what notes ask for. */
function runWith(...notes: Note[]) {
  return { id: RUN, notes };
}

const atShop = (id: string, words = WORDS): Note => ({ id, by: 'Oona', writtenAtMs: 1, ...words });

let order = 0;
function thing(kind: string, id: string, payload: object, given: Partial<KeptThing> = {}) {
  order += 1;
  const kept: KeptThing = {
    ...{ id, kind, personId: 'p', order, madeAtMs: 500, chain: null, chainN: null },
    payload: { runId: RUN, ...payload },
    ...{ state: 'unsent', answer: null, answeredAtMs: null },
    ...given,
  };
  return kept;
}

function shown(run: ReturnType<typeof runWith>, unsent: KeptThing[], applied: KeptThing[] = []) {
  return overlayNotes(run, { unsent, applied }, TOLD).notes.map(({ text, unsent }) => [
    text,
    unsent,
  ]);
}

test('notes written here stand among the shop’s in order of time, and are said to be unsent', () => {
  expect(shown(runWith(atShop(A)), [thing('run-note', B, OTHER)])).toEqual([
    [OTHER.text, 'written'],
    [WORDS.text, null],
  ]);
});

test('a note written and changed here before it was sent is still one that was written here', () => {
  const written = thing('run-note', B, WORDS);
  const edit = thing('run-note-edit', A, { noteId: B, was: WORDS, now: CHANGED });

  expect(shown(runWith(), [written, edit])).toEqual([[CHANGED.text, 'written']]);
});

test('a change and a removal of the shop’s own notes show until they are sent', () => {
  const edit = thing('run-note-edit', 'e', { noteId: A, was: WORDS, now: CHANGED });
  const removal = thing('run-note-removal', 'r', { noteId: B, was: OTHER });

  expect(shown(runWith(atShop(A), atShop(B, OTHER)), [edit, removal])).toEqual([
    [OTHER.text, 'removed'],
    [CHANGED.text, 'changed'],
  ]);
});

test('what was applied counts until the shop has spoken again, and then the shop’s word stands', () => {
  const applied = (answeredAtMs: number) => [
    thing('run-note', B, OTHER, { state: 'applied', answeredAtMs }),
    thing('run-note-removal', 'r', { noteId: A, was: WORDS }, { state: 'applied', answeredAtMs }),
  ];

  expect(shown(runWith(atShop(A)), [], applied(1500))).toEqual([[OTHER.text, null]]);
  expect(shown(runWith(atShop(A)), [], applied(900))).toEqual([[WORDS.text, null]]);
});

test('things of another run change nothing', () => {
  const strange = thing('run-note', B, { ...OTHER, runId: A });

  expect(shown(runWith(atShop(A)), [strange])).toEqual([[WORDS.text, null]]);
});
