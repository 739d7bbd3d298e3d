import { isIP } from 'node:net';
import { resolve } from 'node:path';
import { z } from 'zod';
import { LOOPBACK } from './http/trusted-proxy.ts';

const publicUrl = z
  .url({ protocol: /^https?$/, error: 'must be an http or https address' })
  .transform((url) => new URL(url))
  .refine(({ href, origin }) => href === `${origin}/`, 'must end with the host or the port');

/** A range of every address would be no proxy's: /0 is none. */
const range = z
  .union([z.ipv4(), z.ipv6(), z.cidrv4(), z.cidrv6()])
  .refine((text) => !/\/0+$/.test(text));

const trustedProxy = z
  .string()
  .transform((text) => text.split(',').map((each) => each.trim()))
  .transform((names) => names.flatMap((name) => (name === 'loopback' ? LOOPBACK : [name])))
  .refine(
    (ranges) => ranges.every((each) => range.safeParse(each).success),
    'must be loopback, or addresses such as 10.0.0.2 or 10.0.0.0/24 with commas between',
  );

const namesSchema = z.object({
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
  PUBLIC_URL: publicUrl.optional(),
  TRUSTED_PROXY: trustedProxy.optional(),
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

const envSchema = namesSchema.refine(
  ({ TRUSTED_PROXY, PUBLIC_URL }) => TRUSTED_PROXY === undefined || PUBLIC_URL !== undefined,
  { path: ['TRUSTED_PROXY'], error: 'needs a PUBLIC_URL beside it' },
);

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
    /** Empty: nobody's word on a request's origin is taken. */
    trustedProxy: env.TRUSTED_PROXY ?? [],
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
