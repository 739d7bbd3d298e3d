import type { Sendings, SendingsAnswer, ThingAnswer } from '#shared/schemas/sendings.ts';
import { SendError, type PostSendings } from './sender.ts';

/** A request that hangs on a bad line is given up and tried again. */
const PATIENCE_MS = 30_000;

/** @throws {SendError} no answer, or one that is none of ours */
export const postSendings: PostSendings = async (sendings) => {
  const response = await ask(sendings);
  // 409: somebody else is signed in by now; both wait for the right person.
  if (response.status === 401 || response.status === 409)
    throw new SendError('signed-out', 'The server asks to sign in.');
  if (isAway(response.status)) throw new SendError('unreachable', `${response.status}`);
  const answer: unknown = await response.json().catch(() => null);
  if (!response.ok || !isSendingsAnswer(answer)) {
    throw new SendError('broken', `The server answered with ${response.status}.`);
  }
  return answer;
};

/** A proxy answers so while the server behind it is down or busy. */
function isAway(status: number): boolean {
  return status === 429 || status === 502 || status === 503 || status === 504;
}

async function ask(sendings: Sendings): Promise<Response> {
  try {
    return await fetch('/api/sendings', {
      method: 'POST',
      credentials: 'same-origin',
      headers: { 'Content-Type': 'application/json' },
      body: JSON.stringify(sendings),
      signal: AbortSignal.timeout(PATIENCE_MS),
    });
  } catch (error) {
    throw new SendError('unreachable', error instanceof Error ? error.message : String(error));
  }
}

/** By hand: the pages that record go without the schemas. */
export function isSendingsAnswer(answer: unknown): answer is SendingsAnswer {
  if (typeof answer !== 'object' || answer === null) return false;
  if (!('serverNowMs' in answer) || typeof answer.serverNowMs !== 'number') return false;
  return 'answers' in answer && Array.isArray(answer.answers) && answer.answers.every(isAnswer);
}

const STATUSES = ['applied', 'already-applied', 'conflict', 'refused', 'waiting'];

function isAnswer(answer: unknown): answer is ThingAnswer {
  if (typeof answer !== 'object' || answer === null) return false;
  if (!('id' in answer) || typeof answer.id !== 'string') return false;
  return 'status' in answer && STATUSES.includes(String(answer.status));
}
