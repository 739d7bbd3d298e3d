import type { Problem } from '#shared/schemas/primitives.ts';

/** What http needs of a schema: to check an answer. Keeps zod out of the pages that do without. */
type Checker<T> = { parse(answer: unknown): T };

/** The server's refusal, or that it could not be reached (status 0). */
export class ApiError extends Error {
  readonly status: number;
  readonly code: string;
  /** Field name to what is wrong with it. */
  readonly fields: Record<string, string>;
  /** The whole refusal: it may carry more than words. */
  readonly answer: unknown;

  constructor(status: number, problem: Problem) {
    super(problem.message);
    this.name = 'ApiError';
    this.status = status;
    this.code = problem.code;
    this.fields = problem.fields ?? {};
    this.answer = problem;
  }
}

const UNREACHABLE: Problem = {
  code: 'unreachable',
  message: 'The shop’s server does not answer. Check the connection, then try again.',
};

/** Gives what lies on the device where the server cannot be asked. The customer's page goes without one. */
export type Shelf = <T>(
  url: string,
  ask: () => Promise<unknown>,
  check: (answer: unknown) => T,
) => Promise<T>;

let shelf: Shelf = async (_url, ask, check) => check(await ask());

export function setShelf(next: Shelf): void {
  shelf = next;
}

export async function fetchJson<T>(
  schema: Checker<T>,
  url: string,
  options: { signal?: AbortSignal } = {},
): Promise<T> {
  const ask = async () => answerOf(await send(url, options));
  return shelf(url, ask, (answer) => schema.parse(answer));
}

export async function postJson<T>(schema: Checker<T>, url: string, body?: unknown): Promise<T> {
  return schema.parse(await answerOf(await sendJson('POST', url, body)));
}

export async function putJson<T>(schema: Checker<T>, url: string, body?: unknown): Promise<T> {
  return schema.parse(await answerOf(await sendJson('PUT', url, body)));
}

/** For a DELETE that answers with what remains. */
export async function deleteJson<T>(schema: Checker<T>, url: string): Promise<T> {
  return schema.parse(await answerOf(await sendJson('DELETE', url, undefined)));
}

/** For requests whose answer is empty (204). */
export async function sendOnly(
  method: 'POST' | 'PUT' | 'DELETE',
  url: string,
  body?: unknown,
): Promise<void> {
  await answerOf(await sendJson(method, url, body));
}

/** For answers in octets. */
export async function fetchBytes(
  url: string,
  options: { signal?: AbortSignal } = {},
): Promise<ArrayBuffer> {
  const ask = async () => {
    const response = await send(url, options);
    if (!response.ok) throw await refusalOf(response);
    return response.arrayBuffer();
  };
  return shelf(url, ask, toBytes);
}

function toBytes(answer: unknown): ArrayBuffer {
  if (answer instanceof ArrayBuffer) return answer;
  throw new TypeError('what was kept is not octets');
}

function sendJson(method: string, url: string, body: unknown) {
  return send(url, {
    method,
    ...(body !== undefined && {
      headers: { 'Content-Type': 'application/json' },
      body: JSON.stringify(body),
    }),
  });
}

async function send(url: string, options: RequestInit): Promise<Response> {
  try {
    return await fetch(url, { credentials: 'same-origin', ...options });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw new ApiError(0, UNREACHABLE);
  }
}

async function answerOf(response: Response): Promise<unknown> {
  if (!response.ok) throw await refusalOf(response);
  return response.status === 204 ? undefined : response.json();
}

/** A refusal as the server words it; a proxy's page or an empty body gets words of ours. */
export async function refusalOf(response: Response): Promise<ApiError> {
  const problem: unknown = await response.json().catch(() => null);
  if (isProblem(problem)) return new ApiError(response.status, problem);
  return new ApiError(response.status, {
    code: 'unexpected',
    message: `The server answered with ${response.status}. Try again.`,
  });
}

function isProblem(answer: unknown): answer is Problem {
  if (typeof answer !== 'object' || answer === null) return false;
  return (
    'code' in answer &&
    typeof answer.code === 'string' &&
    'message' in answer &&
    typeof answer.message === 'string'
  );
}
