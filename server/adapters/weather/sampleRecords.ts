import { readFileSync } from 'node:fs';
import path from 'node:path';
import { civilDayParts, daysInMonth } from '@/scheduling/units/civilDay';

/** What was measured on one day at one of the two places. */
export interface SampleDay {
  precipitationMm: number;
  tmaxC: number;
  tminC: number;
  /** Mean wind of the day [m/s]. */
  windMps: number;
}

/** A place with records of every day from 2012 to 2015. */
export interface SamplePlace {
  name: string;
  latitudeDeg: number;
  longitudeDeg: number;
}

export const samplePlaces: readonly SamplePlace[] = [
  { name: 'Seattle', latitudeDeg: 47.61, longitudeDeg: -122.33 },
  { name: 'New York', latitudeDeg: 40.71, longitudeDeg: -74.01 },
];

const FIRST_YEAR = 2012;
/** Years on record; a fifth would be the first again. */
export const sampleYears = 4;

/** The place of the two that lies nearer on the globe. */
export function nearestSamplePlace(latitudeDeg: number, longitudeDeg: number): SamplePlace {
  const rad = (deg: number) => (deg * Math.PI) / 180;
  const closeness = (place: SamplePlace) => Math.sin(rad(latitudeDeg)) * Math.sin(rad(place.latitudeDeg))
    + Math.cos(rad(latitudeDeg)) * Math.cos(rad(place.latitudeDeg)) * Math.cos(rad(longitudeDeg - place.longitudeDeg));
  return samplePlaces.reduce((best, place) => (closeness(place) > closeness(best) ? place : best));
}

/** What screens call this weather. South of the equator the records are half a year off, so that summer falls into summer. */
export function sampleSource(latitudeDeg: number, longitudeDeg: number): string {
  const { name } = nearestSamplePlace(latitudeDeg, longitudeDeg);
  return `Sample weather: records of ${name} 2012–2015${latitudeDeg < 0 ? ', moved by half a year' : ''}`;
}

/**
 * The recorded day that stands for a day: same month and day in the year 2012 + ((year − 2012) mod 4), whose leap years agree. South of the
 * equator six months later, on the month's last day where it has no such day.
 */
export function recordedDayFor(on: string, latitudeDeg: number): string {
  const parts = civilDayParts(on);
  const year = FIRST_YEAR + (((parts.year - FIRST_YEAR) % sampleYears) + sampleYears) % sampleYears;
  const month = latitudeDeg < 0 ? ((parts.month + 5) % 12) + 1 : parts.month;
  // a year divisible by 100 but not by 400 has no leap day although its record year has one; the other way round cannot happen
  const day = Math.min(parts.day, daysInMonth(year, month));
  const pad = (value: number) => String(value).padStart(2, '0');
  return `${year}-${pad(month)}-${pad(day)}`;
}

/**
 * Reads the daily records that the package vega-datasets carries (NOAA National Climatic Data Center; precipitation [mm], temperatures [°C], wind [m/s]).
 * @returns by name of the place and recorded day
 */
export function readSampleRecords(): Map<string, Map<string, SampleDay>> {
  // The package names only its program file to resolvers; its data lie beside that file's folder.
  const file = path.join(path.dirname(require.resolve('vega-datasets')), '..', 'data', 'weather.csv');
  const [header = '', ...lines] = readFileSync(file, 'utf8').trim().split(/\r?\n/);
  const columns = header.split(',');
  const records = new Map<string, Map<string, SampleDay>>(samplePlaces.map((place) => [place.name, new Map()]));
  for (const line of lines) {
    const cells = line.split(',');
    const cell = (name: string) => cells[columns.indexOf(name)] ?? '';
    records.get(cell('location'))?.set(cell('date'), {
      precipitationMm: Number(cell('precipitation')), tmaxC: Number(cell('temp_max')), tminC: Number(cell('temp_min')), windMps: Number(cell('wind')),
    });
  }
  return records;
}
