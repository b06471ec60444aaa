import { pino } from 'pino';
import { createWeatherService } from '@/server/adapters/weather/createWeatherService';
import type { WeatherQuery, WeatherService, WeatherServiceDay } from '@/server/adapters/weather/weatherService';
import { AppError } from '@/server/errors';

/** The sample weather through the real client, which a test can take away, change and count. */
export class SwitchableWeather implements WeatherService {
  /** True lets every question fail as a service does that is out. */
  isOut = false;
  /** Changes days on their way. */
  change: (day: WeatherServiceDay) => WeatherServiceDay = (day) => day;
  elevationM: number | null = null;
  readonly asked: WeatherQuery[] = [];
  private readonly sample = createWeatherService({ WEATHER_SERVICE: 'sample', WEATHER_URL: 'http://nowhere.example', WEATHER_RECORDS_URL: 'http://nowhere.example' }, pino({ level: 'silent' }));

  async fetchDays(query: WeatherQuery) {
    this.asked.push(query);
    if (this.isOut) {
      throw new AppError('weather_unavailable', 'The weather service gave no usable answer.');
    }
    const answer = await this.sample.service.fetchDays(query);
    return { ...answer, elevationM: this.elevationM, days: answer.days.map(this.change) };
  }

  readonly recordYears = this.sample.service.recordYears;

  fetchRecords(query: WeatherQuery) {
    this.asked.push(query);
    return this.isOut ? Promise.reject(new AppError('weather_unavailable', 'The weather service gave no usable answer.')) : this.sample.service.fetchRecords(query);
  }

  close(): Promise<void> {
    return this.sample.close();
  }
}

/** Weather of the records without rain, warm and calm: grass that nobody watered is due on the first day. */
export function dryWeather(): SwitchableWeather {
  const weather = new SwitchableWeather();
  weather.change = (day) => ({ ...day, precipitationMm: 0, tminC: 15, tmaxC: 29, windMps: 2 });
  return weather;
}
