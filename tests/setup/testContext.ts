import type { Express } from 'express';
import type { WeatherService } from '@/server/adapters/weather/weatherService';
import type { ArchivedMail } from '@/server/adapters/mail/mailArchive';
import { createApp } from '@/server/app';
import { buildContext } from '@/server/buildContext';
import { newServerId, type AppContext } from '@/server/context';
import { readEnv } from '@/server/env';
import { FixedClock } from './fixedClock';
import { workerDatabase } from './testDatabase';

export interface TestContextOptions {
  /** Instant at which the clock stands, in ISO form. */
  now?: string;
  /** True makes the clock say that it is the demonstration's, which opens the demonstration's routes. */
  demonstration?: boolean;
  weather?: WeatherService;
  /** Changes to the environment, such as a low rate limit. */
  env?: Record<string, string>;
}

export interface TestContext {
  context: AppContext;
  app: Express;
  clock: FixedClock;
  /** Mail that the local SMTP server received, newest first. */
  mails(): Promise<ArchivedMail[]>;
  /** A second server on the same database, as another process would be: it has its own name in claims. */
  secondServer(): AppContext;
  close(): Promise<void>;
}

/** Saturday 13 June 2026, 05:40 in New York. */
export const testNow = '2026-06-13T09:40:00.000Z';

/**
 * The whole server of one test file on a database of its own, with a clock that stands, real SMTP on loopback, and cheap password hashes.
 * The job queue starts with its first use.
 */
export async function testContext(options: TestContextOptions = {}): Promise<TestContext> {
  const database = await workerDatabase();
  const clock = new FixedClock(new Date(options.now ?? testNow), options.demonstration ?? false);
  const env = readEnv({
    DAPPLE_MODE: 'test', DATABASE_URL: database.url, TOKEN_SECRET: 'a secret for tests only, 32 characters and more', BCRYPT_COST: '4',
    PUBLIC_URL: 'https://dapple.example', LOG_LEVEL: 'silent', RATE_LIMIT_PER_MINUTE: '100000', AUTH_RATE_LIMIT: '100000', ...options.env,
  });
  const context = await buildContext(env, { clock, ...(options.weather ? { weather: options.weather } : {}) });
  return {
    context,
    app: createApp(context),
    clock,
    mails: () => context.mailArchive?.list() ?? Promise.resolve([]),
    secondServer: () => ({ ...context, serverId: newServerId() }),
    async close() {
      await context.close();
      await database.done();
    },
  };
}
