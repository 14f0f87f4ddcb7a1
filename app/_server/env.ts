import 'server-only';
import { z } from 'zod';
import { databaseUrlSchema } from '@/db/connection-settings';

const LEVELS = ['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent'] as const;

const schema = z.object({
  DATABASE_URL: databaseUrlSchema,
  NEXTAUTH_SECRET: z
    .string('NEXTAUTH_SECRET is missing: set it to at least 32 random characters.')
    .min(32, 'NEXTAUTH_SECRET is too short: set it to at least 32 random characters.'),
  NEXTAUTH_URL: z.url({
    protocol: /^https?$/,
    error: 'NEXTAUTH_URL must be the address that people open, such as http://localhost:3000.',
  }),
  LOG_LEVEL: z.enum(LEVELS, `LOG_LEVEL must be one of ${LEVELS.join(', ')}.`).default('info'),
  TRUST_PROXY: z
    .string()
    .regex(/^\d$/, 'TRUST_PROXY must be the number of proxies of your own in front of the server: 0 to 9.')
    .transform(Number)
    .default(0),
});

/** The configuration of the application, as it may be used: checked, and with its defaults. */
export type Env = {
  readonly authSecret: string;
  /** Where people open the application; with https, cookies are Secure. */
  readonly publicUrl: string;
  readonly trustedProxies: number;
};

/** A wrong configuration, with one sentence a variable. */
export class ConfigurationError extends Error {
  override readonly name = 'ConfigurationError';
}

export function readEnv(variables: Readonly<Record<string, string | undefined>>): Env {
  // An empty line in a .env file means that the variable is not set.
  const set = Object.fromEntries(Object.entries(variables).filter(([, value]) => value !== ''));
  const read = schema.safeParse(set);
  if (!read.success) throw new ConfigurationError(read.error.issues.map((issue) => issue.message).join('\n'));
  return {
    authSecret: read.data.NEXTAUTH_SECRET,
    publicUrl: read.data.NEXTAUTH_URL,
    trustedProxies: read.data.TRUST_PROXY,
  };
}

let parsed: Env | undefined;

/** Parsed at the first request, once: the build has neither database nor secret. */
export function env(): Env {
  parsed ??= readEnv(process.env);
  return parsed;
}
