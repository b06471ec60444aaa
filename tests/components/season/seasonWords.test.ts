import { aboutWhen, freezeWords, preventerWords, seasonHeadline, windowWords } from '@/components/season/seasonWords';
import type { SeasonResponse } from '@/shared/contracts/season';

const season = (overrides: Partial<SeasonResponse> = {}): SeasonResponse => ({
  today: '2026-06-13', soilC: 20, soilIsKnown: true, source: 'records', sample: false, years: 10,
  grasses: [{
    grass: 'tall_fescue', zones: ['Front'], germination: [], sowing: [{ fromOn: '2026-08-19', untilOn: '2026-10-12', season: 'before_winter' }], dormantFromOn: null, leastSoilC: 13, mostSoilC: 25, sources: [],
  }],
  preventer: { opensOn: '2027-04-18', closesOn: '2027-05-14', lastsUntilOn: null, isNeverCold: false, cautions: [], sources: [] },
  freeze: { earlyOn: '2026-11-01', likelyOn: '2026-11-14', lateOn: '2026-11-24', hoseOffBy: '2026-10-25', seasons: 10, frostFreeSeasons: 0, source: 'records' }, nextFreezeOn: null, ...overrides,
});

describe('the season in words', () => {
  it('tells days to come by thirds of a month, with the year when it is another', () => {
    expect([aboutWhen('2026-08-05', '2026-06-13'), aboutWhen('2026-08-15', '2026-06-13'), aboutWhen('2027-04-28', '2026-06-13')]).toEqual(['early August', 'mid August', 'late April 2027']);
    expect(windowWords({ fromOn: '2026-08-19', untilOn: '2026-10-12' }, '2026-09-01')).toBe('now, until about mid October');
  });

  it('answers what comes next: seed, then frost when it is near', () => {
    expect(seasonHeadline(season())).toBe('The next time to overseed begins in mid August.');
    expect(seasonHeadline(season({ today: '2026-09-01' }))).toBe('Now is the time to overseed, until about mid October.');
    expect(seasonHeadline(season({ today: '2026-10-10' }))).toMatch(/^The first freeze may come from Sunday 1 November on/);
    expect(seasonHeadline(season({ today: '2026-10-10', nextFreezeOn: '2026-10-14' }))).toMatch(/^Frost is forecast for Wednesday 14 October/);
    expect(seasonHeadline(season({ grasses: [], freeze: null }))).toBe('No time of the coming year suits seed here.');
  });

  it('says when a preventer has its time, and where there is none', () => {
    expect(preventerWords(season())).toMatch(/^Down by mid April 2027.*crabgrass comes up from about mid May 2027\.$/);
    expect(preventerWords(season({ today: '2027-04-25' }))).toMatch(/^The soil is warm enough now/);
    const none = { ...season().preventer, opensOn: null, closesOn: null };
    expect(preventerWords(season({ preventer: { ...none, isNeverCold: true } }))).toMatch(/never gets so cold/);
    expect(preventerWords(season({ preventer: none }))).toMatch(/stays too cool/);
    expect(freezeWords(season({ freeze: null }))).toBe('No freeze in any year on record.');
  });
});
