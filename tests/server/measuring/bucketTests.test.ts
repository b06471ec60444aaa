import { randomUUID } from 'node:crypto';
import { BucketTest, Tap } from '@/server/models';
import type { BucketTestResponse } from '@/shared/contracts/equipment';
import { call, memberOf, ownedYard, readyYard, yardOf } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
});
afterAll(() => test.close());

async function yardWithTap() {
  const owned = await ownedYard(test);
  const tapId = ((await call(test, owned.owner, 'post', `/yards/${owned.yardId}/taps`, { name: 'Tap' })).body as { id: string }).id;
  return { ...owned, tapId, path: `/yards/${owned.yardId}/taps/${tapId}/bucket-tests` };
}

describe('a bucket test', () => {
  it('gives the tap its flow: 5 gal in 30 s are 10 gpm (University of Idaho)', async () => {
    const { path, owner, ...yard } = await yardWithTap();
    const response = await call(test, owner, 'post', path, { volumeL: 5 * 3.785411784, seconds: 30 });
    expect(response.status).toBe(201);
    const result = response.body as BucketTestResponse;
    expect(result.flowLpm / 3.785411784).toBeCloseTo(10, 9);
    expect(result.flowLowLpm).toBeLessThan(result.flowLpm);
    expect(result.flowHighLpm).toBeGreaterThan(result.flowLpm);
    expect(result).toMatchObject({ tapId: yard.tapId, testedAt: '2026-06-13T09:40:00.000Z', testedBy: { id: owner.user.id, name: owner.user.name } });
    expect((await yardOf(test, { owner, ...yard })).taps).toMatchObject([{ flowLpm: result.flowLpm, flowIsDefault: false, lastTestedAt: '2026-06-13T09:40:00.000Z' }]);
  });

  it('taken back returns the tap to its newest other test, then to the default', async () => {
    const { path, owner, ...yard } = await yardWithTap();
    const ids: string[] = [];
    for (const seconds of [60, 80]) {
      ids.push(((await call(test, owner, 'post', path, { volumeL: 20, seconds })).body as BucketTestResponse).id);
      test.clock.advance(1);
    }
    const flow = async () => (await yardOf(test, { owner, ...yard })).taps[0];
    expect(await flow()).toMatchObject({ flowLpm: 15 });
    expect((await call(test, owner, 'get', path)).body).toMatchObject({ bucketTests: [{ id: ids[1] }, { id: ids[0] }] });
    await call(test, owner, 'delete', `${path}/${ids[1]}`);
    expect(await flow()).toMatchObject({ flowLpm: 20, flowIsDefault: false });
    await call(test, owner, 'delete', `${path}/${ids[0]}`);
    expect(await flow()).toMatchObject({ flowLpm: 18.9, flowIsDefault: true, lastTestedAt: null });
    expect((await call(test, owner, 'delete', `${path}/${ids[0]}`)).status).toBe(404);
  });

  it('taken back leaves a flow that was told since', async () => {
    const { path, owner, tapId, ...yard } = await yardWithTap();
    const { id } = (await call(test, owner, 'post', path, { volumeL: 20, seconds: 60 })).body as BucketTestResponse;
    await call(test, owner, 'patch', `/yards/${yard.yardId}/taps/${tapId}`, { flowLpm: 11 });
    await call(test, owner, 'delete', `${path}/${id}`);
    expect((await yardOf(test, { owner, ...yard })).taps).toMatchObject([{ flowLpm: 11, flowIsDefault: false }]);
  });

  it.each<[object, string]>([
    [{ volumeL: -5, seconds: 30 }, 'volumeL'], [{ volumeL: 0, seconds: 30 }, 'volumeL'], [{ volumeL: 20, seconds: 0 }, 'seconds'], [{ volumeL: 20, seconds: -30 }, 'seconds'],
    [{ volumeL: 1e9, seconds: 30 }, 'volumeL'], [{ volumeL: 500, seconds: 1 }, 'seconds'], [{ volumeL: 0.001, seconds: 3600 }, 'seconds'], [{ volumeL: 20, seconds: 30, hoseId: randomUUID() }, 'hoseId'],
    [{ volumeL: 20, seconds: 30, sprinklerId: randomUUID() }, 'sprinklerId'], [{ volumeL: '20', seconds: 30 }, 'volumeL'],
  ])('of %p is refused and changes nothing', async (body, field) => {
    const { path, owner, tapId } = await yardWithTap();
    const response = await call(test, owner, 'post', path, body);
    expect(response.status).toBe(400);
    expect(response.body).toMatchObject({ error: { code: 'invalid_input', fields: [{ path: field }] } });
    expect(await BucketTest.count({ where: { tapId } })).toBe(0);
    expect((await Tap.findByPk(tapId))?.flowIsDefault).toBe(true);
  });

  it('counts once however often it arrives', async () => {
    const { path, owner, tapId } = await yardWithTap();
    const key = { 'Idempotency-Key': randomUUID() };
    const send = () => call(test, owner, 'post', path, { volumeL: 20, seconds: 60 }, key);
    const [first, second] = await Promise.all([send(), send()]);
    expect(second.body).toEqual(first.body);
    expect(await BucketTest.count({ where: { tapId } })).toBe(1);
  });

  it('may be recorded by every member, on taps of the own yard only', async () => {
    const { path, owner, yardId } = await yardWithTap();
    const helper = await memberOf(test, yardId, 'helper');
    expect((await call(test, helper, 'post', path, { volumeL: 20, seconds: 60 })).status).toBe(201);
    const other = await readyYard(test);
    const foreign = `/yards/${yardId}/taps/${other.yard.taps[0]?.id}/bucket-tests`;
    expect((await call(test, owner, 'post', foreign, { volumeL: 20, seconds: 60 })).status).toBe(404);
    expect((await call(test, owner, 'get', foreign)).status).toBe(404);
    expect((await call(test, owner, 'get', `/yards/${yardId}/taps/not-an-id/bucket-tests`)).status).toBe(400);
  });
});
