import analysisWorkerUrl from './engine/analysis-worker.ts?worker&url';

export const SERVICE_WORKER_URL = '/sw.js';
export const ANALYSIS_WORKER_URL = analysisWorkerUrl;

const OURS = [SERVICE_WORKER_URL, ANALYSIS_WORKER_URL];

type UrlRule = { createScriptURL(url: string): string };
type UrlPolicy = { createScriptURL(url: string): string };

declare global {
  interface Window {
    /** Not in TypeScript's library yet. A trusted address stands for its string, which is how workers are opened. */
    trustedTypes?: { createPolicy(name: string, rule: UrlRule): UrlPolicy };
  }
}

let policy: UrlPolicy | undefined;

/** The two strings that the content policy lets become a script: our workers' own addresses. */
export function trustedWorkerUrl(asked: string): string {
  policy ??= window.trustedTypes?.createPolicy('fusekeeper-worker', {
    createScriptURL(url) {
      if (OURS.includes(url)) return url;
      throw new TypeError('only our own workers');
    },
  });
  return policy ? policy.createScriptURL(asked) : asked;
}
