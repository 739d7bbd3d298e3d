import type { IncomingMessage, ServerResponse } from 'node:http';
import { pino } from 'pino';
import type { DestinationStream, Logger } from 'pino';
import { pinoHttp } from 'pino-http';

/** JSON lines. Only what is named here is written: never a header, a cookie, a body or a query. */
export function createLogger(to?: DestinationStream, level = 'info'): Logger {
  const options = { level, base: null };
  return to ? pino(options, to) : pino(options);
}

/** One line a request, and `req.log` for what happens in it. */
export function requestLog(logger: Logger) {
  return pinoHttp({
    logger,
    serializers: {
      req: (req: { method: string; url: string }) => ({ method: req.method, path: path(req.url) }),
      res: (res: { statusCode: number }) => ({ status: res.statusCode }),
    },
    customLogLevel: (_req: IncomingMessage, res: ServerResponse, error?: Error) =>
      error || res.statusCode >= 500 ? 'error' : 'info',
  });
}

function path(url: string): string {
  return url.split('?', 1)[0] ?? url;
}
