import type { ErrorRequestHandler, RequestHandler } from 'express';
import type { Problem } from '#shared/schemas/primitives.ts';
import { AppError, notFound, TooManyError } from './errors.ts';

/** What body and path parsing refuses (http-errors with a `type`), in words. */
const PARSER_PROBLEMS: Record<string, AppError> = {
  'entity.too.large': new AppError(413, 'too-large', 'That is more than fits in one request.'),
  'entity.parse.failed': new AppError(400, 'not-json', 'The request is not readable JSON.'),
  'charset.unsupported': new AppError(415, 'not-json', 'Send JSON in UTF-8.'),
  'encoding.unsupported': new AppError(415, 'not-json', 'Send JSON in UTF-8, not packed.'),
  'request.aborted': new AppError(400, 'cut-off', 'The request was cut off.'),
  'request.size.invalid': new AppError(400, 'cut-off', 'The request was cut off.'),
};

/** The one place where an error becomes a status. An unknown one is logged whole and told bare. */
export const errorHandler: ErrorRequestHandler = (error: unknown, req, res, next) => {
  if (res.headersSent) return next(error);
  const known = error instanceof AppError ? error : parserProblem(error);
  if (!known) req.log.error({ err: error }, 'unexpected error');
  const refusal = known ?? new AppError(500, 'defect', 'Something broke on our side.');
  const problem: Problem = { code: refusal.code, message: refusal.message };
  if (refusal.fields) problem.fields = refusal.fields;
  if (refusal instanceof TooManyError) res.set('Retry-After', String(refusal.retryAfterS));
  res.status(refusal.status).json(problem);
};

export const unknownPath: RequestHandler = () => {
  throw notFound();
};

function parserProblem(error: unknown): AppError | undefined {
  // A path such as /api/jobs/%zz cannot name anything.
  if (error instanceof URIError) return notFound();
  if (!(error instanceof Error) || !('type' in error) || typeof error.type !== 'string') {
    return undefined;
  }
  return PARSER_PROBLEMS[error.type];
}
