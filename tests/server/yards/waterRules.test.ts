import fc from 'fast-check';
import { mustBeAttended, openingByRules, type RuleFacts } from '@/scheduling/planning/waterRules';
import { partsOfRule, toPlanRules } from '@/server/commands/planRules';
import { WaterRule } from '@/server/models';
import type { WaterRuleResponse } from '@/shared/contracts/waterRules';
import { call, ownedYard, yardOf } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());

const evenDays = { name: 'Even days', dateParity: 'even', windows: [{ fromMinutes: 360, toMinutes: 540 }], seasonFrom: '05-15', seasonTo: '09-30', source: 'City code 14-2', sourceOn: '2026-05-01' };

/** Two digits share a day, from Monday on. */
const pairs = [[1], [1], [2], [2], [3], [3], [4], [4], [5], [5]];

describe('a water rule', () => {
  it('is kept with its source, changed in part and removed', async () => {
    const owned = await ownedYard(test);
    const path = `/yards/${owned.yardId}/rules`;
    const made = await call(test, owned.owner, 'post', path, evenDays);
    expect(made.status).toBe(201);
    const rule = made.body as WaterRuleResponse;
    expect(rule).toEqual({ id: rule.id, weekdays: null, weekdaysByDigit: null, attended: false, devices: null, stage: null, exemptSeeded: false, ...evenDays });
    const changed = await call(test, owned.owner, 'patch', `${path}/${rule.id}`, { dateParity: null, weekdays: [6, 2, 2] });
    expect(changed.body).toMatchObject({ dateParity: null, weekdays: [2, 6], windows: evenDays.windows, seasonFrom: '05-15' });
    expect((await yardOf(test, owned)).rules).toEqual([changed.body]);
    expect((await call(test, owned.owner, 'delete', `${path}/${rule.id}`)).status).toBe(200);
    expect((await call(test, owned.owner, 'delete', `${path}/${rule.id}`)).status).toBe(404);
    expect((await yardOf(test, owned)).rules).toEqual([]);
  });

  it('keeps what it binds, its stage, the days of each digit and its clauses', async () => {
    const owned = await ownedYard(test);
    const path = `/yards/${owned.yardId}/rules`;
    const stated = {
      ...evenDays, dateParity: null, windows: null, weekdaysByDigit: pairs, attended: true, exemptSeeded: true, stage: 2, devices: ['sprinkler', 'soaker'],
    };
    const made = await call(test, owned.owner, 'post', path, { ...stated, devices: ['soaker', 'sprinkler'], weekdaysByDigit: [[1, 1], ...pairs.slice(1)] });
    expect(made.body).toEqual({ id: (made.body as WaterRuleResponse).id, weekdays: null, ...stated });
    const changed = await call(test, owned.owner, 'patch', `${path}/${(made.body as WaterRuleResponse).id}`, { devices: ['hand_held', 'soaker', 'sprinkler'], stage: null });
    expect(changed.body).toMatchObject({ devices: null, stage: null, weekdaysByDigit: pairs, attended: true });
    expect((await yardOf(test, owned)).rules).toEqual([changed.body]);
  });

  it('may say nothing but that no hose runs unattended', async () => {
    const { yardId, owner } = await ownedYard(test);
    const made = await call(test, owner, 'post', `/yards/${yardId}/rules`, { name: 'Stay by it', attended: true, source: 'a sign', sourceOn: '2026-05-01' });
    expect(made.status).toBe(201);
    expect((await call(test, owner, 'patch', `/yards/${yardId}/rules/${(made.body as WaterRuleResponse).id}`, { attended: false })).status).toBe(400);
  });

  it.each<[string, object, string]>([
    ['that limits nothing', { dateParity: null, windows: null }, 'weekdays'],
    ['without a source', { source: ' ' }, 'source'],
    ['with a source of control characters', { source: 'a\u0000b' }, 'source'],
    ['read on February 30', { sourceOn: '2026-02-30' }, 'sourceOn'],
    ['in force from February 30', { seasonFrom: '02-30' }, 'seasonFrom'],
    ['with one end of a season', { seasonTo: null }, 'seasonTo'],
    ['with no weekday at all', { weekdays: [] }, 'weekdays'],
    ['with the days of nine digits', { weekdaysByDigit: pairs.slice(1) }, 'weekdaysByDigit'],
    ['with a day for no digit', { weekdaysByDigit: pairs.map(() => []) }, 'weekdaysByDigit'],
    ['with an eighth weekday for a digit', { weekdaysByDigit: [[7], ...pairs.slice(1)] }, 'weekdaysByDigit.0.0'],
    ['that binds nothing', { devices: [] }, 'devices'],
    ['that binds a sprinkler twice', { devices: ['sprinkler', 'sprinkler'] }, 'devices'],
    ['that binds a hydrant', { devices: ['hydrant'] }, 'devices.0'],
    ['from stage 0 on', { stage: 0 }, 'stage'],
    ['from stage 6 on', { stage: 6 }, 'stage'],
    ['with hours that end first', { windows: [{ fromMinutes: 540, toMinutes: 360 }] }, 'windows.0.toMinutes'],
  ])('%s is refused', async (_what, change, field) => {
    const { yardId, owner } = await ownedYard(test);
    const response = await call(test, owner, 'post', `/yards/${yardId}/rules`, { ...evenDays, ...change });
    expect(response.status).toBe(400);
    expect((response.body as { error: { fields: { path: string }[] } }).error.fields.map((each) => each.path)).toContain(field);
    expect(await WaterRule.count({ where: { yardId } })).toBe(0);
  });

  it('is not changed into one that limits nothing', async () => {
    const { yardId, owner } = await ownedYard(test);
    const { id } = (await call(test, owner, 'post', `/yards/${yardId}/rules`, evenDays)).body as WaterRuleResponse;
    expect((await call(test, owner, 'patch', `/yards/${yardId}/rules/${id}`, { dateParity: null, windows: null })).status).toBe(400);
    expect((await WaterRule.findByPk(id))?.dateParity).toBe('even');
  });

  it('of another yard is not there', async () => {
    const mine = await ownedYard(test);
    const other = await ownedYard(test);
    const { id } = (await call(test, other.owner, 'post', `/yards/${other.yardId}/rules`, evenDays)).body as WaterRuleResponse;
    expect((await call(test, mine.owner, 'patch', `/yards/${mine.yardId}/rules/${id}`, { name: 'Mine' })).status).toBe(404);
    expect((await call(test, mine.owner, 'delete', `/yards/${mine.yardId}/rules/${id}`)).status).toBe(404);
    expect(await WaterRule.count({ where: { id } })).toBe(1);
  });
});

describe('the planner reads a stored rule', () => {
  const row = {
    id: 'r', name: 'Rule', weekdays: null, dateParity: null, windows: null, weekdaysByDigit: null, attended: false, devices: null, stage: null, exemptSeeded: false, seasonFrom: null, seasonTo: null,
    source: 'Town', sourceOn: '2026-05-01',
  };

  it('as one kind when it limits one thing, and as a combination otherwise', () => {
    expect(toPlanRules([
      { ...row, weekdays: [1] }, { ...row, dateParity: 'odd' }, { ...row, windows: [{ fromMinutes: 0, toMinutes: 60 }] }, { ...row, weekdays: [1], dateParity: 'odd' },
    ]).map((rule) => rule.kind)).toEqual(['weekdays', 'date_parity', 'hours', 'combination']);
  });

  it('as several with ids of their own when it also goes by the house number and forbids unattended hoses', () => {
    const parts = toPlanRules([{ ...row, windows: [{ fromMinutes: 0, toMinutes: 60 }], weekdaysByDigit: pairs, attended: true, devices: ['sprinkler'], stage: 2, exemptSeeded: true }]);
    expect(parts.map((rule) => rule.kind)).toEqual(['hours', 'address_digit', 'attended']);
    expect(parts.map((rule) => rule.id)).toEqual(partsOfRule('r'));
    for (const rule of parts) {
      expect(rule).toMatchObject({ devices: ['sprinkler'], stage: 2, exemptSeeded: true, source: 'Town', sourceOn: '2026-05-01' });
    }
  });

  it('so that it opens the days of the house number, for the devices that it binds, from its stage on', () => {
    const rules = toPlanRules([{ ...row, weekdaysByDigit: pairs, devices: ['sprinkler'], stage: 2 }]);
    const isOpen = (on: string, facts: RuleFacts) => openingByRules(rules, on, false, facts).windows.length > 0;
    // 17 June 2026 is a Wednesday
    expect(isOpen('2026-06-17', { addressDigit: 4, waterStage: 2 })).toBe(true);
    expect(isOpen('2026-06-18', { addressDigit: 4, waterStage: 2 })).toBe(false);
    expect(isOpen('2026-06-18', { addressDigit: 4, waterStage: 1 })).toBe(true);
    expect(isOpen('2026-06-18', { addressDigit: 4, waterStage: 2, device: 'hand_held' })).toBe(true);
    expect(isOpen('2026-06-18', { waterStage: 2 })).toBe(true);
  });

  it('so that seeded ground is free of it where it says so', () => {
    const rules = toPlanRules([{ ...row, weekdays: [1], attended: true, exemptSeeded: true }]);
    expect(openingByRules(rules, '2026-06-17', true).windows).toEqual([{ fromMinutes: 0, toMinutes: 1440 }]);
    expect(openingByRules(rules, '2026-06-17', false).windows).toEqual([]);
    expect([mustBeAttended(rules, '2026-06-17', true), mustBeAttended(rules, '2026-06-17', false)]).toEqual([false, true]);
  });

  it('with its season as months and days', () => {
    expect(toPlanRules([{ ...row, dateParity: 'odd', seasonFrom: '11-01', seasonTo: '02-29' }])[0]?.season).toEqual({ fromMonth: 11, fromDay: 1, toMonth: 2, toDay: 29 });
    expect(toPlanRules([{ ...row, dateParity: 'odd' }])[0]?.season).toBeNull();
  });

  it('so that a day is open exactly when weekday and date both allow it', () => {
    fc.assert(fc.property(
      fc.uniqueArray(fc.integer({ min: 0, max: 6 }), { minLength: 1 }), fc.constantFrom('odd' as const, 'even' as const), fc.integer({ min: 1, max: 30 }),
      (weekdays, dateParity, day) => {
        const on = `2026-06-${String(day).padStart(2, '0')}`;
        const weekday = new Date(`${on}T12:00:00Z`).getUTCDay();
        const isOpen = weekdays.includes(weekday) && (day % 2 === 1) === (dateParity === 'odd');
        const { windows } = openingByRules(toPlanRules([{ ...row, weekdays, dateParity, windows: [{ fromMinutes: 60, toMinutes: 120 }] }]), on, false);
        expect(windows).toEqual(isOpen ? [{ fromMinutes: 60, toMinutes: 120 }] : []);
      },
    ));
  });
});
