import { randomUUID } from 'node:crypto';
import { extname } from 'node:path';
import type { Request, Response } from 'express';
import multer, { MulterError } from 'multer';
import { MAX_UPLOAD_BYTES } from '#shared/reading/log-reading.ts';
import { AppError } from '#server/errors.ts';

/** A file as it lies in the staging folder, under a name of ours. */
export type ReceivedFile = { id: string; path: string; fileName: string; bytes: number };

/** Every limit is set, since the parser's own are mostly infinite. The form has one part: the file. */
const LIMITS = {
  fileSize: MAX_UPLOAD_BYTES,
  files: 1,
  fields: 0,
  parts: 1,
  fieldNameSize: 20,
  fieldSize: 200,
  headerPairs: 20,
  fieldNestingDepth: 0,
  fieldArrayIndexLimit: 0,
};
const ENDINGS = ['.csv', '.txt'];

export function tooLarge(): AppError {
  return new AppError(
    413,
    'too-large',
    'The file is larger than 100 MB. Cut it into parts, or log fewer readings a second.',
  );
}
const WRONG_ENDING = new AppError(
  415,
  'wrong-ending',
  'Choose a .csv or .txt file. From a spreadsheet, save it as CSV first.',
);
const NO_FILE = new AppError(400, 'no-file', 'Choose a file to read.');
const CUT_OFF = new AppError(400, 'cut-off', 'The file did not arrive whole. Send it again.');

export type ReceiveFile = (req: Request, res: Response) => Promise<ReceivedFile>;

/** Takes the one file of a form into `stagedDir`. What is too large, odd or cut off leaves nothing there. */
export function fileReceiver(stagedDir: string): ReceiveFile {
  const upload = multer({
    storage: multer.diskStorage({
      destination: (_req, _file, done) => done(null, stagedDir),
      filename: (_req, _file, done) => done(null, randomUUID()),
    }),
    limits: LIMITS,
    defParamCharset: 'utf8',
    fileFilter: (_req, file, done) => {
      if (ENDINGS.includes(extname(file.originalname).toLowerCase())) done(null, true);
      else done(WRONG_ENDING);
    },
  }).single('file');

  return (req, res) =>
    new Promise((resolve, reject) => {
      void upload(req, res, (error: unknown) => {
        if (error) reject(inWords(error));
        else if (!req.file) reject(NO_FILE);
        else resolve(toReceived(req.file));
      });
    });
}

function toReceived(file: Express.Multer.File): ReceivedFile {
  return {
    id: file.filename,
    path: file.path,
    fileName: safeName(file.originalname),
    bytes: file.size,
  };
}

/** What a person called the file, fit to be shown and to be a download's name. */
export function safeName(name: string): string {
  const last = name.split(/[/\\]/).at(-1) ?? '';
  // Control and direction characters could make a name read as another.
  const plain = last.replace(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}"]/gu, '').trim();
  const ending = extname(plain);
  return `${plain.slice(0, plain.length - ending.length).slice(0, 120) || 'log'}${ending}`;
}

function inWords(error: unknown): unknown {
  if (!(error instanceof MulterError)) return cutOff(error) ? CUT_OFF : error;
  if (error.code === 'LIMIT_FILE_SIZE') return tooLarge();
  return new AppError(400, 'odd-form', 'Send one file in a form field called “file”.');
}

/** The form's parser says these where a connection ends early. */
function cutOff(error: unknown): boolean {
  return (
    error instanceof Error &&
    /aborted|unexpected end|boundary not found|malformed part/i.test(error.message)
  );
}
