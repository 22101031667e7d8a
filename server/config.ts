import { z } from 'zod';

const secret = z.string().min(32, 'needs 32 characters or more');

const schema = z.object({
  TOUCHNEEDLE_ENV: z.enum(['development', 'production', 'test']).default('development'),
  PORT: z.coerce.number().int().min(0).max(65535).default(4310),
  HOST: z.string().default('127.0.0.1'),
  BASE_URL: z.url().default('http://localhost:4310'),
  DATABASE_URL: z.string().startsWith('postgres'),
  DATABASE_POOL_SIZE: z.coerce.number().int().min(2).max(100).default(4),
  SESSION_SECRET: secret,
  REPORT_NUMBER_KEY: secret,
  MAIL_TOKEN_KEY: secret,
  SMTP_URL: z.string().startsWith('smtp').default('smtp://127.0.0.1:4312'),
  MAIL_FROM: z.string().default('Touchneedle <registry@touchneedle.example>'),
  PHOTO_DIRECTORY: z.string().min(1),
  CLIENT_DIRECTORY: z.string().default('dist/client'),
  RATE_LIMITS: z.enum(['on', 'off']).default('on'),
  TRUST_PROXY: z.coerce.number().int().min(0).max(5).default(0),
  LOG_LEVEL: z.enum(['silent', 'error', 'warn', 'info', 'debug']).default('info'),
});

/** Everything the server and the worker read from their environment. */
export interface Config {
  readonly environment: 'development' | 'production' | 'test';
  readonly port: number;
  readonly host: string;
  /** Origin of the site as people reach it; https makes cookies Secure with the __Host- prefix. */
  readonly baseUrl: URL;
  readonly databaseUrl: string;
  readonly databasePoolSize: number;
  readonly sessionSecret: string;
  readonly reportNumberKey: string;
  readonly mailTokenKey: string;
  readonly smtpUrl: string;
  readonly mailFrom: string;
  readonly photoDirectory: string;
  readonly clientDirectory: string;
  /** Off only behind a proxy that limits, and in tests that are not about them. */
  readonly rateLimits: boolean;
  readonly trustProxyHops: number;
  readonly logLevel: 'silent' | 'error' | 'warn' | 'info' | 'debug';
}

/** Reads the environment. Throws an Error that names each variable at fault and what it needs. */
export function readConfig(environment: Readonly<Record<string, string | undefined>>): Config {
  const parsed = schema.safeParse(environment);
  if (!parsed.success) {
    const faults = parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`);
    throw new Error(`The configuration is not complete.\n  ${faults.join('\n  ')}`);
  }
  const values = parsed.data;
  return {
    environment: values.TOUCHNEEDLE_ENV,
    port: values.PORT,
    host: values.HOST,
    baseUrl: new URL(values.BASE_URL),
    databaseUrl: values.DATABASE_URL,
    databasePoolSize: values.DATABASE_POOL_SIZE,
    sessionSecret: values.SESSION_SECRET,
    reportNumberKey: values.REPORT_NUMBER_KEY,
    mailTokenKey: values.MAIL_TOKEN_KEY,
    smtpUrl: values.SMTP_URL,
    mailFrom: values.MAIL_FROM,
    photoDirectory: values.PHOTO_DIRECTORY,
    clientDirectory: values.CLIENT_DIRECTORY,
    rateLimits: values.RATE_LIMITS === 'on',
    trustProxyHops: values.TRUST_PROXY,
    logLevel: values.LOG_LEVEL,
  };
}
