import { z } from '@/shared/zod';

/** Everything the server takes from its environment. Nothing else reads process.env. */
const envSchema = z.object({
  /** demonstration: clock of its own, sample weather, local mail. production: system clock. test: as told by the tests. */
  DAPPLE_MODE: z.enum(['demonstration', 'production', 'test']).default('production'),
  DATABASE_URL: z.string().min(1),
  HOST: z.string().default('127.0.0.1'),
  PORT: z.coerce.number().int().min(0).max(65535).default(4180),
  /** Address under which people reach the service; links in e-mails start with it. */
  PUBLIC_URL: z.string().optional(),
  /** Folder of the exported web app; without it only the API is served. */
  WEB_DIR: z.string().optional(),
  /** Signs access tokens; at least 32 characters. */
  TOKEN_SECRET: z.string().min(32),
  /** bcrypt cost; production refuses less than 12. */
  BCRYPT_COST: z.coerce.number().int().min(4).max(16).default(12),
  /** Mail server; left out, the server runs a local one that keeps what it receives for the mail page. */
  SMTP_URL: z.string().optional(),
  MAIL_FROM: z.string().default('Dapple <reminders@dapple.example>'),
  /** 'sample' replays historic records through a local server of the same protocol; 'open-meteo' asks the hosted service. */
  WEATHER_SERVICE: z.enum(['sample', 'open-meteo']).default('sample'),
  /** Address of the hosted forecast service, for a self-hosted or paid instance. */
  WEATHER_URL: z.string().default('https://api.open-meteo.com/v1/forecast'),
  /** Address of the hosted service's records of past years. */
  WEATHER_RECORDS_URL: z.string().default('https://archive-api.open-meteo.com/v1/archive'),
  WEATHER_API_KEY: z.string().optional(),
  LOG_LEVEL: z.enum(['silent', 'error', 'warn', 'info', 'debug']).default('info'),
  /** Requests a minute and address that the API takes before it answers 429. */
  RATE_LIMIT_PER_MINUTE: z.coerce.number().int().min(1).default(600),
  /** Sign-in, sign-up and reset attempts a quarter of an hour and address. */
  AUTH_RATE_LIMIT: z.coerce.number().int().min(1).default(30),
  /** Number of proxies in front whose X-Forwarded-For is believed. */
  TRUSTED_PROXIES: z.coerce.number().int().min(0).default(0),
}).superRefine((env, issue) => {
  if (env.DAPPLE_MODE === 'production' && env.BCRYPT_COST < 12) {
    issue.addIssue({ code: 'custom', path: ['BCRYPT_COST'], message: 'must be 12 or more in production' });
  }
  if (env.DAPPLE_MODE === 'production' && env.SMTP_URL === undefined) {
    issue.addIssue({ code: 'custom', path: ['SMTP_URL'], message: 'is needed in production' });
  }
});

export type Env = z.infer<typeof envSchema>;

/** Reads and checks the environment. Throws one readable message that lists every variable that is wrong. */
export function readEnv(source: Record<string, string | undefined> = process.env): Env {
  const parsed = envSchema.safeParse(source);
  if (!parsed.success) {
    const lines = parsed.error.issues.map((issue) => `  ${issue.path.join('.')}: ${issue.message}`);
    throw new Error(`The environment is not right:\n${lines.join('\n')}`);
  }
  return parsed.data;
}
