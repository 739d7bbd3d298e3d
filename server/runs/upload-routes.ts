import { Router, type Response } from 'express';
import { z } from 'zod';
import { personOf } from '#server/people/signed-in.ts';
import { validate } from '#server/validate.ts';
import { MAX_UPLOAD_BYTES } from '#shared/reading/log-reading.ts';
import { idSchema } from '#shared/schemas/primitives.ts';
import { acceptUploadSchema } from '#shared/schemas/runs.ts';
import { readingChoicesSchema } from '#shared/schemas/uploads.ts';
import { tooLarge, type ReceiveFile } from './receive-file.ts';
import { uploadJson, type StagedUpload } from './staged-upload.ts';
import type { UploadService } from './upload-service.ts';

const ROOM_FOR_THE_FORM = 64 * 1024;
const toVisitSchema = z.object({ visitId: idSchema });

export function uploadRoutes(uploads: UploadService, receive: ReceiveFile): Router {
  const router = Router();

  router.post('/uploads', async (req, res) => {
    const { visitId } = validate(toVisitSchema, req.query);
    const by = personOf(req);
    refuseTooLarge(Number(req.get('content-length')), res);
    const release = await uploads.begin(by, visitId);
    try {
      const upload = uploads.stage(by, visitId, await receive(req, res));
      uploads.startReading(upload, release);
      res.status(201).location(`/api/uploads/${upload.id}`);
      send(res, upload);
    } catch (error) {
      release();
      throw error;
    }
  });

  router.get('/uploads/:id', (req, res) => {
    send(res, uploads.get(personOf(req), req.params.id));
  });

  router.put('/uploads/:id/choices', (req, res) => {
    const choices = validate(readingChoicesSchema, req.body);
    send(res, uploads.choose(personOf(req), req.params.id, choices));
  });

  router.delete('/uploads/:id', async (req, res) => {
    await uploads.discard(personOf(req), req.params.id);
    res.status(204).end();
  });

  router.post('/uploads/:id/accept', async (req, res) => {
    const accept = validate(acceptUploadSchema, req.body);
    const runIds = await uploads.accept(personOf(req), req.params.id, accept);
    res.status(201).json({ runIds });
  });

  return router;
}

function send(res: Response, upload: StagedUpload): void {
  res.type('json').send(uploadJson(upload));
}

/** Said before it is sent: the connection ends, so that the rest does not have to come. */
function refuseTooLarge(announced: number, res: Response): void {
  if (!(announced > MAX_UPLOAD_BYTES + ROOM_FOR_THE_FORM)) return;
  res.set('Connection', 'close');
  throw tooLarge();
}
