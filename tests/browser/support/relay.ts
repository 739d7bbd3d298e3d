import { once } from 'node:events';
import { createServer, request, type IncomingMessage, type ServerResponse } from 'node:http';
import { setTimeout as pause } from 'node:timers/promises';

/** What becomes of one sending on its way. */
export type Fate =
  | { is: 'arrives' }
  /** It never reaches the server. */
  | { is: 'lost' }
  /** The server does it; its answer never reaches the page. */
  | { is: 'answer-lost' }
  /** The line repeats it: the server gets it two times at once. */
  | { is: 'twice' }
  /** The server is killed with its answer written and not handed on. */
  | { is: 'killed-answering' }
  /** The server is killed so long after it got it: before, in or between its transactions. */
  | { is: 'killed-applying'; afterMs: number };

type Answer = Pick<IncomingMessage, 'statusCode' | 'headers'> & { body: Buffer };
type RelayParts = { to: string; killServer: () => Promise<void> };

export type Relay = Awaited<ReturnType<typeof openRelay>>;

/** A line between page and server that loses, repeats and breaks off sendings as it is told to. */
export async function openRelay({ to, killServer }: RelayParts) {
  const target = new URL(to);
  const fates: Fate[] = [];
  const met: Fate['is'][] = [];

  async function handle(asked: IncomingMessage, answering: ServerResponse): Promise<void> {
    const body = await bodyOf(asked);
    const isSending = asked.method === 'POST' && asked.url === '/api/sendings';
    const fate = (isSending && fates.shift()) || { is: 'arrives' as const };
    if (isSending) met.push(fate.is);
    if (fate.is === 'lost') return void answering.destroy();
    const going = forward(target, asked, body);
    if (fate.is === 'twice')
      await Promise.allSettled([going.answer, forward(target, asked, body).answer]);
    if (fate.is === 'killed-applying') {
      // Not before it has it: a server that is being started is another one.
      await Promise.race([going.taken, going.answer]);
      await pause(fate.afterMs);
      await killServer();
    }
    const answer = await going.answer;
    if (fate.is === 'killed-answering') await killServer();
    if (fate.is === 'killed-answering' || fate.is === 'answer-lost')
      return void answering.destroy();
    answering.writeHead(answer.statusCode ?? 502, answer.headers).end(answer.body);
  }

  const server = createServer((asked, answering) => {
    // Nobody answers behind it: the line breaks off.
    handle(asked, answering).catch(() => answering.destroy());
  });
  server.listen(0, '127.0.0.1');
  await once(server, 'listening');
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('no free port');

  return {
    url: `http://127.0.0.1:${address.port}`,
    /** Of the next sendings, one each; those after them arrive. */
    fates,
    /** What became of the sendings so far. */
    met,
    async close(): Promise<void> {
      server.closeAllConnections();
      server.close();
      await once(server, 'close');
    },
  };
}

async function bodyOf(message: IncomingMessage): Promise<Buffer> {
  const chunks: Buffer[] = [];
  for await (const chunk of message) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks);
}

function forward({ hostname, port }: URL, asked: IncomingMessage, body: Buffer) {
  const { url: path, method, headers } = asked;
  // With its own host name: the server holds it against where the page says it comes from.
  const forwarded = request({ hostname, port, path, method, headers, agent: false });
  const taken = once(forwarded, 'finish');
  const answer = once(forwarded, 'response').then(([message]) =>
    answerOf(message as IncomingMessage),
  );
  forwarded.end(body);
  // Told by whichever is waited for.
  for (const each of [taken, answer]) each.catch(() => {});
  return { taken, answer };
}

async function answerOf(message: IncomingMessage): Promise<Answer> {
  const { statusCode, headers } = message;
  return { statusCode, headers, body: await bodyOf(message) };
}
