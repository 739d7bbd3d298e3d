import { z } from 'zod';
import { idSchema, instantSchema, words } from './primitives.ts';
import { newNoteSchema } from './runs.ts';
import { MOST_THINGS, type SendingKind } from './sending-kinds.ts';

/**
 * What a device keeps and sends later, in an envelope that stays the same whatever lies in it. Fields that came after
 * the first version have a default, so that what an older client left in its store is still taken.
 */
export const thingSchema = z.object({
  /** Made on the device; the thing is applied once under it, however often it arrives. */
  id: idSchema,
  kind: z.string().min(1).max(40),
  madeAtMs: instantSchema,
  /** Rises with every thing that the device keeps. */
  order: z.int().min(1),
  /** Things of one chain are applied one after the other, without a gap; null: stands alone. */
  chain: z.string().max(80).nullable().default(null),
  /** 1, 2, 3… within its chain. */
  chainN: z.int().min(1).nullable().default(null),
  payload: z.unknown(),
});
export type Thing = z.infer<typeof thingSchema>;

export const sendingsSchema = z.object({
  deviceId: idSchema,
  /** Whose things they are; the session may be somebody else's by now. Null: an older client, which did not say. */
  personId: idSchema.nullable().default(null),
  clientVersion: z.string().max(40).default(''),
  /** What the device's clock says as it sends; null: an older client, which did not say. */
  deviceNowMs: instantSchema.nullable().default(null),
  /** Each is read on its own: one that cannot be read does not hold up the others. */
  things: z.array(z.unknown()).max(MOST_THINGS),
});

/** What became of one thing. All but `waiting` are final: the same thing gets the same again. */
export type ThingAnswer = { id: string } & (
  | { status: 'applied'; answer: unknown }
  /** Applied before; the answer is that of then. */
  | { status: 'already-applied'; answer: unknown }
  /** Somebody changed it meanwhile; nothing was done. `server`: what the shop has, `device`: what came. */
  | { status: 'conflict'; server: unknown; device: unknown }
  | { status: 'refused'; code: string; message: string }
  /** Something that belongs before it has not come yet; the device keeps it and sends it again. */
  | { status: 'waiting'; message: string }
);

export type Sendings = z.input<typeof sendingsSchema>;

export type SendingsAnswer = { serverNowMs: number; answers: ThingAnswer[] };

/** Which state of a visit's notes an edit was made on: the id of the edit before it, '' before the first. */
export const notesVersionSchema = z.string().max(40);

export const visitEditSchema = z.object({
  visitId: idSchema,
  basedOn: notesVersionSchema,
  notes: words(2000),
});
export type VisitEdit = z.infer<typeof visitEditSchema>;

export const safetyTicksSchema = z.object({ visitId: idSchema, tickedAtMs: instantSchema });
export type SafetyTicks = z.infer<typeof safetyTicksSchema>;

export const sentRunNoteSchema = newNoteSchema.extend({ runId: idSchema });
export type SentRunNote = z.infer<typeof sentRunNoteSchema>;

/** Another text or place for a note. `was`: the note that the writer had before them; a change meanwhile is told by it. */
export const runNoteEditSchema = z.object({
  runId: idSchema,
  noteId: idSchema,
  was: newNoteSchema,
  now: newNoteSchema,
});
export type RunNoteEdit = z.infer<typeof runNoteEditSchema>;

export const runNoteRemovalSchema = runNoteEditSchema.omit({ now: true });
export type RunNoteRemoval = z.infer<typeof runNoteRemovalSchema>;

/** What lies in a thing of each kind; run events have their schema in hand-run.ts. */
export type ThingPayloads = {
  'run-event': unknown;
  'visit-edit': VisitEdit;
  'safety-ticks': SafetyTicks;
  'run-note': SentRunNote;
  'run-note-edit': RunNoteEdit;
  'run-note-removal': RunNoteRemoval;
} & Record<SendingKind, unknown>;
