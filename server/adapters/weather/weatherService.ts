export interface WeatherQuery {
  latitudeDeg: number;
  longitudeDeg: number;
  timeZone: string;
  /** First and last civil day wanted, both included, in the place's time zone. */
  fromOn: string;
  toOn: string;
}

/** One civil day as the service told it; null where it told nothing. Units as in scheduling/weather. */
export interface WeatherServiceDay {
  on: string;
  tminC: number | null;
  tmaxC: number | null;
  tdewC: number | null;
  rhMaxPct: number | null;
  rhMinPct: number | null;
  windMps: number | null;
  windHeightM: number | null;
  solarMjM2: number | null;
  precipitationMm: number | null;
  rainProbabilityPct: number | null;
}

export interface WeatherAnswer {
  /** Short name of the origin, stored with each day and shown. */
  source: string;
  /** True for replayed historic records, which screens label as sample weather. */
  sample: boolean;
  elevationM: number | null;
  days: WeatherServiceDay[];
}

/** Weather of one place. Throws AppError('weather_unavailable') after its retries. */
export interface WeatherService {
  /** Forecast and recent days. */
  fetchDays(query: WeatherQuery): Promise<WeatherAnswer>;
  /** Temperatures and rain of past days, years of them at once; what else a day has is null. */
  fetchRecords(query: WeatherQuery): Promise<WeatherAnswer>;
  /** Whole past years of which records tell apart one year from another. */
  readonly recordYears: number;
}
