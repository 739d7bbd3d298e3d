export type Fields = Record<string, string>;

/** A refusal that the caller is told about; everything else that is thrown is a defect of ours. */
export class AppError extends Error {
  override name = 'AppError';
  readonly status: number;
  readonly code: string;
  readonly fields: Fields | undefined;

  constructor(status: number, code: string, message: string, fields?: Fields) {
    super(message);
    this.status = status;
    this.code = code;
    this.fields = fields;
  }
}

/** Too much at once, or too often: the same may be asked again after a while. */
export class TooManyError extends AppError {
  override name = 'TooManyError';
  readonly retryAfterS: number;

  constructor(code: string, message: string, retryAfterS: number) {
    super(429, code, message);
    this.retryAfterS = retryAfterS;
  }
}

/** The one answer for what is not there and for what the asker may not see: they cannot be told apart. */
export function notFound(): AppError {
  return new AppError(404, 'not-found', 'There is nothing here, or it is not yours to see.');
}

export function signInNeeded(): AppError {
  return new AppError(401, 'sign-in-needed', 'Sign in first.');
}

export function notAllowed(): AppError {
  return new AppError(403, 'not-allowed', 'Your role may not do this.');
}

/** One field is at fault for a reason that only the server can know. */
export function fieldFault(field: string, message: string, status: 400 | 409 = 400): AppError {
  return new AppError(status, 'fields', message, { [field]: message });
}
