import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { DayTerms } from '@/components/budget/DayTerms';
import { zoneSentence } from '@/components/budget/zoneWords';
import type { BudgetDayResponse } from '@/shared/contracts/water';

const day = (on: string, overrides: Partial<BudgetDayResponse> = {}): BudgetDayResponse => ({
  on, isForecast: false, et0Mm: 5, shadedEt0Mm: 4, cropCoefficient: 0.85, stressCoefficient: 1, etcMm: 3.4, rainMm: 0, rainLossMm: 0, effectiveRainMm: 0, irrigationMm: 0, drainageMm: 0, rootGrowthMm: 0,
  evaporationMm: 0, treeUptakeMm: 0, runoffMm: 0, observationMm: 0, surfaceDepletionMm: null, condition: 'growing', depletionFraction: 0.5, depletionStartMm: 10, depletionEndMm: 13.4, totalAvailableMm: 30,
  refillLineMm: 15, rootDepthM: 0.15, rainSource: 'weather', assumptions: [], ...overrides,
});
const rained = day('2026-06-12', { rainMm: 25.4, rainLossMm: 5.4, runoffMm: 5.4, effectiveRainMm: 20, rainSource: 'gauge', etcMm: 5, treeUptakeMm: 1.2, evaporationMm: 0.4, surfaceDepletionMm: 2, observationMm: 4, drainageMm: 1, depletionEndMm: 0 });
const show = () => render(<DayTerms days={[rained, day('2026-06-13', { depletionStartMm: 0, depletionEndMm: 3.4 })]} today="2026-06-13" units="metric" name="Front lawn"
  observations={[{ zoneId: 'z', on: '2026-06-12', kind: 'screwdriver', feel: 'hard', waterContent: null, weight: 0.4, person: null }]} />);

describe('a day of the budget term by term', () => {
  it('begins with today, names each term with its effect, and leaves out what did nothing', () => {
    show();
    expect(screen.getByText('Saturday 13 June')).toBeTruthy();
    expect(document.body.textContent).toMatch(/Short at the start0 mm/);
    expect(document.body.textContent).toMatch(/Used by the grass\+3\.4 mm/);
    expect(document.body.textContent).toMatch(/4 mm of it in the zone’s own light; × 0\.85 for the grass/);
    expect(document.body.textContent).not.toMatch(/Drunk by tree roots|By the soil check|Rain that counted/);
  });

  it('of a day before tells rain and runoff, the soil check, trees and bare ground, and adds up', async () => {
    const person = userEvent.setup();
    const { container } = show();
    await person.click(screen.getByRole('button', { name: 'Earlier day of Front lawn' }));
    const text = container.textContent ?? '';
    expect(text).toMatch(/Rain that counted−20 mmOf 25 mm by your gauge; 5\.4 mm ran off/);
    expect(text).toMatch(/By the soil check\+4 mmThe screwdriver hardly went in: that counts for 40 % of the difference/);
    expect(text).toMatch(/Drunk by tree roots\+1\.2 mm/);
    expect(text).toMatch(/Given off by bare ground\+0\.4 mm/);
    expect(text).toMatch(/Drained below the roots\+1 mm/);
    const effects = Array.from(container.querySelectorAll('.d-terms-effect')).map((each) => Number((each.textContent ?? '').replace('−', '-').replace(/[^\d.-]/g, '')));
    expect(effects.slice(0, -1).reduce((sum, each) => sum + each, 0)).toBeCloseTo(effects.at(-1) ?? Number.NaN, 6);
    expect(within(container).getByRole('button', { name: 'Earlier day of Front lawn' })).toHaveProperty('disabled', true);
  });

  it('counts what was found this morning in the sentence of the zone', () => {
    expect(zoneSentence([day('2026-06-13', { observationMm: 6 })], '2026-06-13', 'metric')).toMatch(/^16 mm short this morning, past its refill line/);
  });
});
