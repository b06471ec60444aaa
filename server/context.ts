import { randomUUID } from 'node:crypto';
import { destination, pino, type Logger } from 'pino';
import type { Sequelize } from 'sequelize';
import type { Planner } from '@/scheduling/planning';
import type { Clock, SettableClock } from '@/server/adapters/clock/clock';
import type { MailArchive } from '@/server/adapters/mail/mailArchive';
import type { Mailer } from '@/server/adapters/mail/mailer';
import type { Gazetteer } from '@/server/adapters/places/gazetteer';
import type { Queue } from '@/server/adapters/queue/queue';
import type { WeatherService } from '@/server/adapters/weather/weatherService';
import type { Env } from '@/server/env';

/** Everything that code below the routes may use from outside the program. Built once; nothing imports a singleton. */
export interface AppContext {
  env: Env;
  /** Names this process in claims, so that two servers never take the same work. */
  serverId: string;
  /** Address under which people reach the service; links in e-mails start with it. */
  publicUrl: string;
  log: Logger;
  database: Sequelize;
  clock: Clock;
  /** The same clock where people may set it; null where time is nobody's to set. */
  settableClock: SettableClock | null;
  weather: WeatherService;
  places: Gazetteer;
  mailer: Mailer;
  /** Mail that the local server caught; null when a real mail server is used. */
  mailArchive: MailArchive | null;
  queue: Queue;
  planner: Planner;
}

/** Name for one process: unique even when two start on one machine in one second. */
export function newServerId(): string {
  return `server-${process.pid}-${randomUUID().slice(0, 8)}`;
}

/** Writes JSON lines to standard error: standard output is for the program that started this one. */
export function createLogger(level: Env['LOG_LEVEL']): Logger {
  return pino({
    level,
    redact: { paths: ['req.headers.authorization', 'req.headers.cookie', 'res.headers["set-cookie"]', 'password', 'token'], remove: true },
  }, destination(2));
}
