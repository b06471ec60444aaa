import type { Logger } from 'pino';
import type { Env } from '@/server/env';
import { openMeteoService } from './openMeteoService';
import { sampleSource } from './sampleRecords';
import { startSampleServer, type SampleServer } from './sampleServer';
import type { WeatherService } from './weatherService';

/**
 * The weather service that the environment names. The sample server starts with the first question and ends with `close`.
 */
export function createWeatherService(env: Pick<Env, 'WEATHER_SERVICE' | 'WEATHER_URL' | 'WEATHER_API_KEY'>, log: Logger): { service: WeatherService; close(): Promise<void> } {
  if (env.WEATHER_SERVICE === 'open-meteo') {
    return { service: openMeteoService({ url: env.WEATHER_URL, apiKey: env.WEATHER_API_KEY }, log), close: () => Promise.resolve() };
  }
  let starting: Promise<SampleServer> | null = null;
  return {
    service: {
      async fetchDays(query) {
        starting ??= startSampleServer().catch((error: unknown) => {
          starting = null;
          throw error;
        });
        const { url } = await starting;
        return openMeteoService({ url, sample: true, sourceOf: (asked) => sampleSource(asked.latitudeDeg, asked.longitudeDeg) }, log).fetchDays(query);
      },
    },
    async close() {
      const started = starting;
      starting = null;
      await started?.then((server) => server.close(), () => undefined);
    },
  };
}
