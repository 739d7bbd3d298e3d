import { join } from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { Router } from 'express';
import { z } from 'zod';
import { personOf } from '#server/people/signed-in.ts';
import { validate } from '#server/validate.ts';
import { judgeAgainSchema, newNoteSchema } from '#shared/schemas/runs.ts';
import type { DataFolders } from './data-folders.ts';
import { listReferences } from './find-reference.ts';
import type { MachineRuns } from './machine-runs.ts';
import type { NoteService } from './note-service.ts';
import { packChunk } from './pack-samples.ts';
import type { RunPages } from './run-page.ts';
import type { RunReadings } from './run-readings.ts';
import type { RunService } from './run-service.ts';

const channelSchema = z.coerce.number().int().min(0).max(100).default(0);
const traceSchema = z.object({
  columns: z.coerce.number().int().min(1).max(20_000).default(2_000),
  channel: channelSchema,
});
const samplesSchema = z.object({ channel: channelSchema });

export type RunRouteParts = {
  runs: RunService;
  pages: RunPages;
  notes: NoteService;
  readings: RunReadings;
  folders: DataFolders;
  machineRuns: MachineRuns;
};

export function runRoutes({
  runs,
  pages,
  notes,
  readings,
  folders,
  machineRuns,
}: RunRouteParts): Router {
  const router = Router();

  router.get('/machines/:id/references', async (req, res) => {
    res.json(await listReferences(machineRuns, req.params.id));
  });

  router.get('/runs/:id', async (req, res) => {
    res.json(await pages.get(personOf(req), req.params.id));
  });

  router.get('/runs/:id/trace', async (req, res) => {
    const { columns, channel } = validate(traceSchema, req.query);
    const run = await runs.get(req.params.id);
    const correction = await runs.correctionOf(run.id);
    const found = await readings.columns(run, channel, columns, correction);
    const octets = packChunk(Float64Array.from(found.flat()));
    res.type('application/octet-stream').send(Buffer.from(octets.buffer));
  });

  router.get('/runs/:id/samples', async (req, res) => {
    const { channel } = validate(samplesSchema, req.query);
    const run = await runs.get(req.params.id);
    // Refuses before a header is set.
    const octets = readings.octets(run, channel, await runs.correctionOf(run.id));
    res.type('application/octet-stream');
    res.set('Content-Length', String(2 * run.samples * Float64Array.BYTES_PER_ELEMENT));
    await pipeline(Readable.from(octets), res);
  });

  router.get('/runs/:id/file', async (req, res) => {
    const { id, fileName } = await runs.fileOf(req.params.id);
    res.attachment(fileName).type('application/octet-stream');
    res.sendFile(join(folders.uploads, id), { cacheControl: false });
  });

  router.post('/runs/:id/analyses', async (req, res) => {
    const { ratingId } = validate(judgeAgainSchema, req.body);
    await runs.judgeAgain(personOf(req), req.params.id, ratingId);
    res.status(201).json(await pages.get(personOf(req), req.params.id));
  });

  router.post('/runs/:id/notes', async (req, res) => {
    await notes.add(personOf(req), req.params.id, validate(newNoteSchema, req.body));
    res.status(201).json(await pages.get(personOf(req), req.params.id));
  });

  router.put('/runs/:id/notes/:noteId', async (req, res) => {
    const { id, noteId } = req.params;
    await notes.change(id, noteId, validate(newNoteSchema, req.body));
    res.json(await pages.get(personOf(req), id));
  });

  router.delete('/runs/:id/notes/:noteId', async (req, res) => {
    const { id, noteId } = req.params;
    await notes.remove(id, noteId);
    res.json(await pages.get(personOf(req), id));
  });

  return router;
}
