import fs from 'node:fs';
import path from 'node:path';
import { GERMINATION_HEAT, laboratoryDays } from '@/scheduling/establishment';
import { GERMINATION } from '../fixtures/grass';
import { TOLERANCES } from '../fixtures/tolerances';

/** Every published case that the computation answers to. A case may move between files; it may not get lost. */
const CASES = [
  'A02', 'A03', 'A04', 'A05', 'A06', 'A07', 'A08', 'A09', 'A10', 'A11', 'A12', 'A14', 'A15', 'A52', 'A18', 'A19d', 'A20', 'A31', 'A32', 'A35', 'A36', 'A37', 'A-K1', 'B-F1',
  'C01', 'C02', 'C03', 'C04', 'C05', 'C06', 'D01', 'D02', 'E01', 'E02', 'F01', 'F02', 'G.1', 'H01', 'H02', 'H03', 'H04', 'H05', 'I01', 'I02',
];

const FIXTURES = path.resolve(__dirname, '../fixtures');

function filesUnder(folder: string): string[] {
  return fs.readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    const file = path.join(folder, entry.name);
    return entry.isDirectory() ? filesUnder(file) : [file];
  });
}

/** Cases named in the title of a test or a group of tests, or in a table of cases whose completeness its own test proves. */
function casesNamed(): Set<string> {
  const named = new Set<string>();
  const files = filesUnder(__dirname).filter((file) => file.endsWith('.test.ts'));
  for (const file of files) {
    const text = fs.readFileSync(file, 'utf8');
    for (const [, title = ''] of text.matchAll(/(?:describe|it|each\([^\n]*\))\((?:'|`)([^\n]*?)(?:'|`), /g)) {
      for (const id of CASES) if (new RegExp(`(^|[^\\w.-])${id.replace('.', '\\.')}($|[^\\w-])`).test(title)) named.add(id);
    }
    for (const [, id = ''] of text.matchAll(/^ {2}(A\d\d[a-z]?): /gm)) named.add(id);
  }
  return named;
}

describe('published cases', () => {
  it('are all there', () => {
    expect(new Set(CASES).size).toBe(44);
    const named = casesNamed();
    expect(CASES.filter((id) => !named.has(id))).toEqual([]);
  });

  it('stand in fixtures with their source and the day on which it was read', () => {
    const files = fs.readdirSync(FIXTURES).filter((name) => name.endsWith('.ts') && !['published.ts', 'tolerances.ts', 'vegaWeather.ts'].includes(name));
    expect(files.length).toBeGreaterThanOrEqual(6);
    for (const name of files) {
      const text = fs.readFileSync(path.join(FIXTURES, name), 'utf8');
      const tables = text.match(/^export const /gm) ?? [];
      expect([name, (text.match(/readOn: '\d{4}-\d\d-\d\d'/g) ?? []).length]).toEqual([name, tables.length]);
    }
  });

  it('have one table of tolerances', () => {
    const tables = filesUnder(FIXTURES).filter((file) => /export const TOLERANCES/.test(fs.readFileSync(file, 'utf8')));
    expect(tables.map((file) => path.basename(file))).toEqual(['tolerances.ts']);
  });
});

describe('germination in the laboratory (G.1, Larsen and Bibby 2005)', () => {
  it.each(GERMINATION.grasses)('$grass', ({ grass, baseC, heatSumCd, days }) => {
    expect(GERMINATION_HEAT[grass]).toMatchObject({ baseC, heatSumCd, isDefault: false });
    GERMINATION.temperaturesC.forEach((temperatureC, index) => {
      const printed = days[index] ?? '';
      expect(Math.abs((laboratoryDays(grass, temperatureC) ?? Infinity) - Number(printed))).toBeLessThanOrEqual(TOLERANCES.lastDigits * 0.1);
    });
    expect(laboratoryDays(grass, baseC)).toBeNull();
  });
});
