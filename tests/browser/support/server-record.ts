import { join } from 'node:path';
import Database from 'better-sqlite3';
import { DEMO_PASSWORD } from '#server/demo/demo-people.ts';
import { fromCelsius } from '#shared/units.ts';

/** What the server has of a run taken by hand: asked of its API, and read in its database behind its back. */
export type ServerRecord = ReturnType<typeof createServerRecord>;

type Asked = { url: string; dataFolder: string };

export function createServerRecord({ url, dataFolder }: Asked) {
  let cookie = '';

  async function ask(path: string): Promise<Response> {
    if (cookie === '') cookie = await signIn(url);
    const answer = await fetch(url + path, { headers: { cookie } });
    if (!answer.ok) throw new Error(`${answer.status} to ${path}`);
    return answer;
  }

  return {
    /** Runs of a visit, as its page lists them. */
    async runsOf(visitId: string): Promise<string[]> {
      const visit = (await (await ask(`/api/visits/${visitId}`)).json()) as {
        runs: { id: string }[];
      };
      return visit.runs.map(({ id }) => id);
    },

    /** Readings of a run in their order, °F to the tenth. */
    async readingsOf(runId: string): Promise<number[]> {
      const octets = await (await ask(`/api/runs/${runId}/samples`)).arrayBuffer();
      const numbers = new Float64Array(octets);
      const tempsC = numbers.subarray(numbers.length / 2);
      return Array.from(tempsC, (tempC) => Math.round(fromCelsius(tempC, 'F') * 10) / 10);
    },

    /** The run's words on how it was taken. */
    async warningsOf(runId: string): Promise<string[]> {
      const page = (await (await ask(`/api/runs/${runId}`)).json()) as {
        warnings: { message: string }[];
      };
      return page.warnings.map(({ message }) => message);
    },

    /** Every line of a visit's hand runs as it was received, in order. */
    linesOf(visitId: string): { runId: string; n: number; id: string; event: string }[] {
      const db = new Database(join(dataFolder, 'fusekeeper.sqlite'), { readonly: true });
      try {
        return db
          .prepare<[string], { runId: string; n: number; id: string; event: string }>(
            `select run_id as runId, n, event_id as id, event from hand_run_events
             where visit_id = ? order by run_id, n`,
          )
          .all(visitId);
      } finally {
        db.close();
      }
    },
  };
}

async function signIn(url: string): Promise<string> {
  const body = JSON.stringify({
    email: 'nora.whitlock@harrowlane.example',
    password: DEMO_PASSWORD,
  });
  const headers = { 'content-type': 'application/json' };
  const answer = await fetch(`${url}/api/session`, { method: 'POST', headers, body });
  if (!answer.ok) throw new Error(`signing in was answered with ${answer.status}`);
  return (answer.headers.getSetCookie()[0] ?? '').split(';')[0] ?? '';
}
