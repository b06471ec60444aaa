import type { Sequelize } from 'sequelize';
import { yardPlanner } from '@/scheduling/planning/yardPlanner';
import { isSettable, systemClock, type Clock } from '@/server/adapters/clock/clock';
import { openDemonstrationClock } from '@/server/adapters/clock/demonstrationClock';
import { createDatabase } from '@/server/adapters/database/database';
import { createDatabaseMailArchive } from '@/server/adapters/mail/databaseMailArchive';
import { startLocalMailServer } from '@/server/adapters/mail/localMailServer';
import { createSmtpMailer } from '@/server/adapters/mail/smtpMailer';
import { embeddedGazetteer } from '@/server/adapters/places/gazetteer';
import { createPgBossQueue } from '@/server/adapters/queue/pgBossQueue';
import { createWeatherService } from '@/server/adapters/weather/createWeatherService';
import type { WeatherService } from '@/server/adapters/weather/weatherService';
import { createLogger, newServerId, type AppContext } from '@/server/context';
import type { Env } from '@/server/env';
import { initModels } from '@/server/models';

/** What a test puts in the place of the usual parts. */
export interface GivenParts {
  clock?: Clock;
  weather?: WeatherService;
}

export type RunningContext = AppContext & { close(): Promise<void> };

/** Builds everything that one process of the service needs, from its environment. `close` gives all of it back. */
export async function buildContext(env: Env, given: GivenParts = {}): Promise<RunningContext> {
  const log = createLogger(env.LOG_LEVEL);
  const database = createDatabase(env.DATABASE_URL);
  const closing: (() => Promise<void> | void)[] = [() => database.close()];
  const close = async () => {
    for (const part of closing.splice(0).reverse()) {
      await part();
    }
  };
  try {
    const clock = given.clock ?? await openClock(env, database);
    initModels(database, () => clock.now());
    const mailArchive = env.SMTP_URL === undefined ? createDatabaseMailArchive(database) : null;
    let smtpUrl = env.SMTP_URL ?? '';
    if (mailArchive !== null) {
      const server = await startLocalMailServer(mailArchive, clock, log);
      closing.push(() => server.close());
      smtpUrl = server.url;
    }
    const mailer = createSmtpMailer(smtpUrl, env.MAIL_FROM, clock);
    closing.push(() => mailer.close());
    const queue = createPgBossQueue({ databaseUrl: env.DATABASE_URL, log, pollingSeconds: env.DAPPLE_MODE === 'demonstration' ? 1 : 2 });
    closing.push(() => queue.stop());
    const weather = createWeatherService(env, log);
    closing.push(() => weather.close());
    return {
      env, serverId: newServerId(), publicUrl: env.PUBLIC_URL ?? `http://${env.HOST}:${env.PORT}`, log, database, clock, settableClock: isSettable(clock) ? clock : null,
      weather: given.weather ?? weather.service, places: embeddedGazetteer(), mailer, mailArchive, queue, planner: yardPlanner, close,
    };
  } catch (error) {
    await close();
    throw error;
  }
}

async function openClock(env: Env, database: Sequelize): Promise<Clock> {
  return env.DAPPLE_MODE === 'demonstration' ? openDemonstrationClock(database, env.DATABASE_URL) : systemClock;
}
