import fc from 'fast-check';
import { yardPlanner } from '@/scheduling/planning/yardPlanner';
import type { Reason } from '@/scheduling/planning/types';
import { cupTest } from '@/scheduling/sprinkler/cupTest';
import { cupProblemText } from '@/shared/cupProblems';
import { reasonText } from '@/shared/reasons';
import { arbitraryYard } from '@/tests/scheduling/planning/arbitraryYard';

const due: Reason = { code: 'due', values: { depletionMm: 12.192, refillLineMm: 12.7, on: '2026-06-13', crossesOn: '2026-06-14', nextOpenOn: '2026-06-14' } };

describe('the sentence of a reason', () => {
  it('speaks in the units of the yard and of the day as people do', () => {
    expect(reasonText(due, 'us', '2026-06-13')).toBe('0.48 in short, reaches its refill line of 0.50 in tomorrow.');
    expect(reasonText(due, 'metric', '2026-06-10')).toBe('12 mm short, reaches its refill line of 13 mm on Sunday.');
    expect(reasonText(due, 'us')).toBe('0.48 in short, reaches its refill line of 0.50 in on Sunday 14 June.');
  });

  it.each<[Reason, string]>([
    [{ code: 'above_line', values: { depletionMm: 5.08, refillLineMm: 12.7, on: '2026-06-13', nextOn: '2026-06-18' } }, '0.20 in short of full, above its refill line of 0.50 in: not before Thursday.'],
    [{ code: 'above_line', values: { depletionMm: 5.08, refillLineMm: 12.7, on: '2026-06-13', nextOn: '' } }, '0.20 in short of full, above its refill line of 0.50 in: not within this plan.'],
    [{ code: 'held_for_rain', values: { rainMm: 12.7, probabilityPct: 70, rainOn: '2026-06-14', on: '2026-06-13', worstMm: 14, refillLineMm: 12.7 } }, 'Held for rain: 0.50 in (70 %) expected tomorrow. If none comes it is 0.55 in short, against a refill line of 0.50 in.'],
    [{ code: 'closed_by_rule', values: { rule: 'Odd dates', source: 'Town code 14-2' } }, 'Odd dates closes this day (Town code 14-2).'],
    [{ code: 'nobody_home', values: { fromMinutes: 600, toMinutes: 840 } }, 'Nobody is at home between 10:00 am and 2:00 pm.'],
    [{ code: 'nobody_home', values: {} }, 'Nobody is at home on this day.'],
    [{ code: 'dose', values: { stage: 'sown', dayNumber: 6, number: 3, of: 4, depthMm: 1.5 } }, 'Day 6 from sowing (not up yet): dose 3 of 4, 0.06 in.'],
    [{ code: 'dose_moved', values: { wantedMinutes: 570, startMinutes: 620 } }, 'Wanted at 9:30 am, fits at 10:20 am.'],
    [{ code: 'uneven', values: { runTimeMultiplier: 1.3, lowQuarterUniformity: 0.55 } }, 'Runs 30 % longer because the pattern is uneven (low-quarter uniformity 0.55).'],
    [{ code: 'no_time_left', values: { wantedMinutes: 90, hadMinutes: 120 } }, "No time left: 1 h 30 min wanted, the day's hours hold 2 h in all."],
    [{ code: 'windy', values: { windMps: 7, limitMps: 5 } }, 'Wind of 16 mph is above the limit of 11 mph.'],
    [{ code: 'no_rain_before', values: { rainOn: '2026-06-17', lastOn: '2026-06-22', on: '2026-06-13' } }, 'No rain to count on before Wednesday.'],
    [{ code: 'flow_default', values: { tap: 'Back tap', tapId: 'x', flowLpm: 18.93 } }, 'No bucket test for Back tap yet: reckoned with a default of 5.0 gpm.'],
  ])('is plain: %j', (reason, sentence) => {
    expect(reasonText(reason, 'us', '2026-06-13')).toBe(sentence);
  });

  it('is one whole sentence with every number filled in, for every reason that a plan can give', () => {
    const seen = new Set<string>();
    fc.assert(fc.property(arbitraryYard, (input) => {
      const plan = yardPlanner.plan(input);
      const reasons = [
        ...plan.missing, ...plan.shortages.flatMap((each) => each.reasons),
        ...plan.days.flatMap((day) => [
          ...day.rounds.flatMap((round) => round.sets.flatMap((set) => set.reasons)), ...day.zonesWithout.flatMap((each) => each.reasons), ...day.missedDoses.flatMap((each) => each.reasons),
        ]),
      ];
      for (const reason of reasons) {
        seen.add(reason.code);
        for (const units of ['us', 'metric'] as const) {
          expect(reasonText(reason, units, input.startOn)).toMatch(/^[A-Z0-9−][^–]*\.$/);
          expect(reasonText(reason, units, input.startOn)).not.toMatch(/undefined|NaN|null|  |\(\)|!/);
        }
      }
    }), { numRuns: 120, seed: 7 });
    expect(seen.size).toBeGreaterThan(30);
  });
});

describe('the sentence of a doubtful catch-cup test', () => {
  it('says what is wrong and what to do', () => {
    const found = cupTest({ layout: { kind: 'grid', rows: 1, columns: 3, spacingM: 2 }, minutes: 15, reading: { kind: 'depth' }, values: [1, 1, 1] });
    expect(found.problems.map((problem) => cupProblemText(problem, 'us'))).toEqual([
      '0.04 in is too shallow to read within 10 %. Run about 3 h 59 min, or measure millilitres or weigh the cups.',
      '3 cups say little about a portable sprinkler: the range is wide. Use at least 6, better 20.',
    ]);
  });
});
