import { EventRow, Permit } from '@/server/models';
import type { PermitResponse, WaterRuleResponse } from '@/shared/contracts/waterRules';
import { limits } from '@/shared/limits';
import { call, memberOf, readyYard, yardOf, type OwnedYard } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());

const letter = { name: 'Seed permit', fromOn: '2026-06-10', toOn: '2026-07-09', source: 'Letter of the water office', sourceOn: '2026-06-08' };
type Ready = OwnedYard & { yard: { zones: { id: string }[] } };
const zoneOf = ({ yard }: Ready): string => yard.zones[0]?.id ?? '';
const ruleFor = async ({ yardId, owner }: OwnedYard): Promise<string> => {
  const made = await call(test, owner, 'post', `/yards/${yardId}/rules`, { name: 'Odd dates', dateParity: 'odd', source: 'a sign', sourceOn: '2026-05-01' });
  return (made.body as WaterRuleResponse).id;
};

describe('a permit', () => {
  it('is kept with its source, changed in part and removed, and each is written down', async () => {
    const ready = await readyYard(test);
    const { yardId, owner } = ready;
    const ruleId = await ruleFor(ready);
    const path = `/yards/${yardId}/permits`;
    const made = await call(test, owner, 'post', path, { ...letter, zoneIds: [zoneOf(ready)], blackoutMonths: [8, 7], windows: [{ fromMinutes: 300, toMinutes: 600 }], liftsRuleIds: [ruleId] });
    expect(made.status).toBe(201);
    const permit = made.body as PermitResponse;
    expect(permit).toEqual({ id: permit.id, ...letter, zoneIds: [zoneOf(ready)], blackoutMonths: [7, 8], windows: [{ fromMinutes: 300, toMinutes: 600 }], liftsRuleIds: [ruleId] });
    const changed = await call(test, owner, 'patch', `${path}/${permit.id}`, { toOn: '2026-07-20', liftsRuleIds: null, windows: null });
    expect(changed.body).toEqual({ ...permit, toOn: '2026-07-20', liftsRuleIds: null, windows: null });
    expect((await yardOf(test, ready)).permits).toEqual([changed.body]);
    expect((await call(test, owner, 'delete', `${path}/${permit.id}`)).status).toBe(200);
    expect((await call(test, owner, 'delete', `${path}/${permit.id}`)).status).toBe(404);
    expect((await yardOf(test, ready)).permits).toEqual([]);
    const events = await EventRow.findAll({ where: { yardId, subjectId: permit.id }, order: [['at', 'ASC']] });
    expect(events.map((event) => event.verb).sort()).toEqual(['permit.created', 'permit.deleted', 'permit.updated']);
  });

  it('lifts every rule and holds all day in all months unless it says otherwise', async () => {
    const ready = await readyYard(test);
    const made = await call(test, ready.owner, 'post', `/yards/${ready.yardId}/permits`, { ...letter, zoneIds: [zoneOf(ready)] });
    expect(made.body).toMatchObject({ blackoutMonths: [], windows: null, liftsRuleIds: null });
  });

  it.each<[string, object, string]>([
    ['without a zone', { zoneIds: [] }, 'zoneIds'],
    ['that ends before it begins', { toOn: '2026-06-09' }, 'toOn'],
    ['that ends on June 31', { toOn: '2026-06-31' }, 'toOn'],
    ['without a source', { source: '  ' }, 'source'],
    ['with a thirteenth month', { blackoutMonths: [13] }, 'blackoutMonths.0'],
    ['that never holds', { blackoutMonths: [1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12] }, 'blackoutMonths'],
    ['with hours that end first', { windows: [{ fromMinutes: 600, toMinutes: 300 }] }, 'windows.0.toMinutes'],
    ['that lifts no rule', { liftsRuleIds: [] }, 'liftsRuleIds'],
  ])('%s is refused', async (_what, change, field) => {
    const ready = await readyYard(test);
    const response = await call(test, ready.owner, 'post', `/yards/${ready.yardId}/permits`, { ...letter, zoneIds: [zoneOf(ready)], ...change });
    expect(response.status).toBe(400);
    expect((response.body as { error: { fields: { path: string }[] } }).error.fields.map((each) => each.path)).toContain(field);
    expect(await Permit.count({ where: { yardId: ready.yardId } })).toBe(0);
  });

  it('is not changed into one that ends before it begins', async () => {
    const ready = await readyYard(test);
    const { id } = (await call(test, ready.owner, 'post', `/yards/${ready.yardId}/permits`, { ...letter, zoneIds: [zoneOf(ready)] })).body as PermitResponse;
    expect((await call(test, ready.owner, 'patch', `/yards/${ready.yardId}/permits/${id}`, { fromOn: '2026-08-01' })).status).toBe(400);
    expect((await Permit.findByPk(id))?.fromOn).toBe(letter.fromOn);
  });

  it('names no zone and no rule of another yard, and one of another yard is not there', async () => {
    const mine = await readyYard(test);
    const other = await readyYard(test);
    const foreignRule = await ruleFor(other);
    const path = `/yards/${mine.yardId}/permits`;
    const foreignZone = await call(test, mine.owner, 'post', path, { ...letter, zoneIds: [zoneOf(mine), zoneOf(other)] });
    expect([foreignZone.status, (foreignZone.body as { error: { fields: { path: string }[] } }).error.fields[0]?.path]).toEqual([400, 'zoneIds']);
    const lifting = await call(test, mine.owner, 'post', path, { ...letter, zoneIds: [zoneOf(mine)], liftsRuleIds: [foreignRule] });
    expect([lifting.status, (lifting.body as { error: { fields: { path: string }[] } }).error.fields[0]?.path]).toEqual([400, 'liftsRuleIds']);
    const { id } = (await call(test, other.owner, 'post', `/yards/${other.yardId}/permits`, { ...letter, zoneIds: [zoneOf(other)] })).body as PermitResponse;
    expect((await call(test, mine.owner, 'patch', `${path}/${id}`, { name: 'Mine' })).status).toBe(404);
    expect((await call(test, mine.owner, 'delete', `${path}/${id}`)).status).toBe(404);
    expect(await Permit.count({ where: { id } })).toBe(1);
  });

  it('is for the owner and the consultant to enter, not for a helper', async () => {
    const ready = await readyYard(test);
    const body = { ...letter, zoneIds: [zoneOf(ready)] };
    expect((await call(test, await memberOf(test, ready.yardId, 'helper'), 'post', `/yards/${ready.yardId}/permits`, body)).status).toBe(403);
    expect((await call(test, await memberOf(test, ready.yardId, 'consultant'), 'post', `/yards/${ready.yardId}/permits`, body)).status).toBe(201);
  });

  it('forgets a rule that is removed, and then lifts the others only', async () => {
    const ready = await readyYard(test);
    const [first, second] = [await ruleFor(ready), await ruleFor(ready)];
    await call(test, ready.owner, 'post', `/yards/${ready.yardId}/permits`, { ...letter, zoneIds: [zoneOf(ready)], liftsRuleIds: [first, second] });
    await call(test, ready.owner, 'delete', `/yards/${ready.yardId}/rules/${first}`);
    expect((await yardOf(test, ready)).permits[0]?.liftsRuleIds).toEqual([second]);
    await call(test, ready.owner, 'delete', `/yards/${ready.yardId}/rules/${second}`);
    expect((await yardOf(test, ready)).permits[0]?.liftsRuleIds).toEqual([]);
  });

  it('is one of a limited number', async () => {
    const ready = await readyYard(test);
    await Permit.bulkCreate(Array.from({ length: limits.permitsPerYard }, () => ({ id: crypto.randomUUID(), yardId: ready.yardId, ...letter, zoneIds: [zoneOf(ready)], blackoutMonths: [], createdAt: test.clock.now(), updatedAt: test.clock.now() })));
    expect((await call(test, ready.owner, 'post', `/yards/${ready.yardId}/permits`, { ...letter, zoneIds: [zoneOf(ready)] })).status).toBe(409);
  });
});
