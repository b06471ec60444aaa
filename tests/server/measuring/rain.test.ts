import { EventRow, RainEntry, Yard } from '@/server/models';
import { call, memberOf, ownedYard } from '../../factories/yards';
import { signedIn } from '../../factories/people';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());

describe('the rain gauge', () => {
  it('is kept by day, corrected and taken back, and the budget is behind from that day on', async () => {
    const { yardId, owner } = await ownedYard(test);
    const path = `/yards/${yardId}/rain`;
    await Yard.update({ budgetStaleFrom: null }, { where: { id: yardId } });
    expect((await call(test, owner, 'put', `${path}/2026-06-10`, { depthMm: 7.6 })).body).toEqual({ on: '2026-06-10', depthMm: 7.6 });
    expect((await Yard.findByPk(yardId))?.budgetStaleFrom).toBe('2026-06-10');
    await call(test, owner, 'put', `${path}/2026-06-12`, { depthMm: 0 });
    await call(test, owner, 'put', `${path}/2026-06-10`, { depthMm: 8 });
    expect((await call(test, owner, 'get', path)).body).toEqual({ entries: [{ on: '2026-06-12', depthMm: 0 }, { on: '2026-06-10', depthMm: 8 }] });
    expect((await Yard.findByPk(yardId))?.budgetStaleFrom).toBe('2026-06-10');
    expect((await call(test, owner, 'delete', `${path}/2026-06-10`)).status).toBe(200);
    expect((await call(test, owner, 'delete', `${path}/2026-06-10`)).status).toBe(404);
    expect((await call(test, owner, 'get', path)).body).toEqual({ entries: [{ on: '2026-06-12', depthMm: 0 }] });
    expect(await EventRow.count({ where: { yardId, verb: 'rain.recorded' } })).toBe(3);
  });

  it('told the same again changes nothing', async () => {
    const { yardId, owner } = await ownedYard(test);
    await call(test, owner, 'put', `/yards/${yardId}/rain/2026-06-10`, { depthMm: 3 });
    const before = (await Yard.findByPk(yardId))?.factsVersion;
    expect((await call(test, owner, 'put', `/yards/${yardId}/rain/2026-06-10`, { depthMm: 3 })).status).toBe(200);
    expect((await Yard.findByPk(yardId))?.factsVersion).toBe(before);
  });

  it.each<[string, string, object, string]>([
    ['tomorrow', '2026-06-14', { depthMm: 3 }, 'on'], ['long ago', '2026-04-13', { depthMm: 3 }, 'on'], ['February 30', '2026-02-30', { depthMm: 3 }, 'on'],
    ['no day', 'yesterday', { depthMm: 3 }, 'on'], ['less than nothing', '2026-06-10', { depthMm: -1 }, 'depthMm'], ['a flood', '2026-06-10', { depthMm: 1001 }, 'depthMm'],
    ['no depth', '2026-06-10', {}, 'depthMm'],
  ])('is refused for %s', async (_what, on, body, field) => {
    const { yardId, owner } = await ownedYard(test);
    const response = await call(test, owner, 'put', `/yards/${yardId}/rain/${on}`, body);
    expect(response.status).toBe(400);
    expect(response.body).toMatchObject({ error: { code: 'invalid_input', fields: [{ path: field }] } });
    expect(await RainEntry.count({ where: { yardId } })).toBe(0);
  });

  it('goes by the yard\'s own day: in Kiritimati it is tomorrow already', async () => {
    // 09:40 UTC is 23:40 of the same day there, UTC+14
    const { yardId, owner } = await ownedYard(test, { latitudeDeg: 1.87, longitudeDeg: -157.4, timeZone: 'Pacific/Kiritimati' });
    test.clock.advance(60);
    expect((await call(test, owner, 'put', `/yards/${yardId}/rain/2026-06-14`, { depthMm: 3 })).status).toBe(200);
    expect((await call(test, owner, 'put', `/yards/${yardId}/rain/2026-06-15`, { depthMm: 3 })).status).toBe(400);
  });

  it('may be read and told by every member and by nobody else', async () => {
    const { yardId } = await ownedYard(test);
    const helper = await memberOf(test, yardId, 'helper');
    expect((await call(test, helper, 'put', `/yards/${yardId}/rain/2026-06-10`, { depthMm: 2 })).status).toBe(200);
    const stranger = await signedIn(test);
    expect((await call(test, stranger, 'put', `/yards/${yardId}/rain/2026-06-10`, { depthMm: 9 })).status).toBe(404);
    expect((await call(test, stranger, 'get', `/yards/${yardId}/rain`)).status).toBe(404);
  });
});
