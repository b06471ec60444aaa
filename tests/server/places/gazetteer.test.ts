import { embeddedGazetteer, foldName } from '@/server/adapters/places/gazetteer';

const gazetteer = embeddedGazetteer();
const names = async (query: string, count = 8) => (await gazetteer.find(query, count)).map((place) => [place.name, place.region, place.country].filter(Boolean).join(', '));

// The first question unpacks the gazetteer, which a busy machine takes its time for.
beforeAll(() => gazetteer.find('a', 1), 60_000);

describe('names are compared', () => {
  it('without case, accents and marks between words', () => {
    expect(foldName('  São-Paulo ')).toBe('sao paulo');
    expect(foldName("St. John's")).toBe('st johns');
    expect(foldName('Łódź')).toBe('lodz');
    expect(foldName('Weißenfels')).toBe('weissenfels');
    expect(foldName('Winston-Salem')).toBe(foldName('winston salem'));
  });
});

describe('a place is found', () => {
  it('by its beginning, the larger one first', async () => {
    expect((await names('seatt'))[0]).toBe('Seattle, Washington, United States');
    expect((await names('new yo'))[0]).toBe('New York City, New York, United States');
  });

  it('by its whole name before longer names', async () => {
    expect((await names('york'))[0]).toBe('York, England, United Kingdom');
  });

  it('with or without its accents', async () => {
    expect((await names('quebec'))[0]).toBe('Québec, Quebec, Canada');
    expect(await names('Québec')).toEqual(await names('quebec'));
  });

  it('by a word inside the name', async () => {
    expect(await names('salem winston')).toContain('Winston-Salem, North Carolina, United States');
  });

  it('with its state by name or by letters, or its country', async () => {
    expect(await names('springfield il')).toEqual(['Springfield, Illinois, United States']);
    expect((await names('Portland, Oregon'))[0]).toBe('Portland, Oregon, United States');
    expect((await names('london canada'))[0]).toBe('London, Ontario, Canada');
  });

  it('with its position and time zone', async () => {
    const [seattle] = await gazetteer.find('Seattle', 1);
    // GeoNames 5809844: 47.60621, -122.33207
    expect(seattle).toMatchObject({ id: 5809844, timeZone: 'America/Los_Angeles' });
    expect(seattle?.latitudeDeg).toBeCloseTo(47.60621, 4);
    expect(seattle?.longitudeDeg).toBeCloseTo(-122.33207, 4);
  });

  it('once, and no more often than asked', async () => {
    const found = await gazetteer.find('new', 8);
    expect(found).toHaveLength(8);
    expect(new Set(found.map((place) => place.id)).size).toBe(8);
  });

  it('not at all when there is none', async () => {
    expect(await names('qqzzxx')).toEqual([]);
    expect(await names('--')).toEqual([]);
  });
});
