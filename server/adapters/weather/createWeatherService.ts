import type { Logger } from 'pino';
import type { Env } from '@/server/env';
import { openMeteoService } from './openMeteoService';
import { sampleSource, sampleYears } from './sampleRecords';
import { startSampleServer, type SampleServer } from './sampleServer';
import type { WeatherService } from './weatherService';

/**
 * The weather service that the environment names. The sample server starts with the first question and ends with `close`.
 */
export function createWeatherService(env: Pick<Env, 'WEATHER_SERVICE' | 'WEATHER_URL' | 'WEATHER_RECORDS_URL' | 'WEATHER_API_KEY'>, log: Logger): { service: WeatherService; close(): Promise<void> } {
  if (env.WEATHER_SERVICE === 'open-meteo') {
    return { service: openMeteoService({ url: env.WEATHER_URL, recordsUrl: env.WEATHER_RECORDS_URL, apiKey: env.WEATHER_API_KEY }, log), close: () => Promise.resolve() };
  }
  let starting: Promise<SampleServer> | null = null;
  const sample = async (): Promise<WeatherService> => {
    starting ??= startSampleServer().catch((error: unknown) => {
      starting = null;
      throw error;
    });
    const { url, recordsUrl } = await starting;
    return openMeteoService({ url, recordsUrl, sample: true, recordYears: sampleYears, sourceOf: (asked) => sampleSource(asked.latitudeDeg, asked.longitudeDeg) }, log);
  };
  return {
    service: {
      recordYears: sampleYears,
      fetchDays: async (query) => (await sample()).fetchDays(query),
      fetchRecords: async (query) => (await sample()).fetchRecords(query),
    },
    async close() {
      const started = starting;
      starting = null;
      await started?.then((server) => server.close(), () => undefined);
    },
  };
}
