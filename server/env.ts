import { isIP } from 'node:net';
import { resolve } from 'node:path';
import { z } from 'zod';

const publicUrl = z.url({ protocol: /^https?$/, error: 'must be an http or https address' });

const envSchema = z.object({
  PORT: z.coerce
    .number('must be a number')
    .int('must be a whole number')
    .min(0, 'must be 0 to 65535')
    .max(65_535, 'must be 0 to 65535')
    .default(4870),
  HOST: z
    .string()
    .refine((host) => isIP(host) > 0 || host === 'localhost', 'must be an IP address or localhost')
    .default('127.0.0.1'),
  DATA_DIR: z.string().min(1, 'must name a folder').default('./data'),
  PUBLIC_URL: publicUrl.transform((url) => new URL(url)).optional(),
  NODE_ENV: z
    .enum(['development', 'production', 'test'], 'must be development, production or test')
    .default('production'),
  DEMO: z.enum(['yes', 'no'], 'must be yes or no').default('yes'),
  LOG_LEVEL: z
    .enum(['fatal', 'error', 'warn', 'info', 'debug', 'silent'], 'must be a level such as info')
    .default('info'),
  /** For `npm run owner` in scripts; a person is asked instead. */
  OWNER_NAME: z.string().optional(),
  OWNER_EMAIL: z.string().optional(),
  OWNER_PASSWORD: z.string().optional(),
});

export type Env = ReturnType<typeof readEnv>;

/** The only reader of the environment. @throws {Error} naming every bad name at once */
export function readEnv(from: NodeJS.ProcessEnv = process.env) {
  // An empty value counts as not set, as shells and compose files write it.
  const given = Object.fromEntries(Object.entries(from).filter(([, value]) => value !== ''));
  const parsed = envSchema.safeParse(given);
  if (!parsed.success) {
    const lines = parsed.error.issues.map((issue) => `  ${issue.path.join('.')} ${issue.message}`);
    throw new Error(`The environment cannot be used:\n${lines.join('\n')}`);
  }
  const env = parsed.data;
  return {
    port: env.PORT,
    host: env.HOST,
    dataDir: resolve(env.DATA_DIR),
    publicUrl: env.PUBLIC_URL ?? null,
    development: env.NODE_ENV === 'development',
    demo: env.DEMO === 'yes',
    logLevel: env.LOG_LEVEL,
    owner: { name: env.OWNER_NAME, email: env.OWNER_EMAIL, password: env.OWNER_PASSWORD },
  };
}

/** Where the caller of a command stands: npm runs it in the project's folder and keeps the caller's here. */
export function callerFolder(from: NodeJS.ProcessEnv = process.env): string {
  return from.INIT_CWD ?? process.cwd();
}
