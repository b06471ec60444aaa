import type { Place } from '@/shared/contracts/places';
import { call } from '../../factories/yards';
import { testContext, type TestContext } from '../../setup/testContext';

let test: TestContext;
beforeAll(async () => {
  test = await testContext();
  // The first question unpacks the gazetteer, which a busy machine takes its time for.
  await test.context.places.find('a', 1);
}, 60_000);
afterAll(() => test.close());

it('finds places for anybody', async () => {
  const response = await call(test, null, 'get', '/places?q=burlington%20vermont');
  expect(response.status).toBe(200);
  expect((response.body as { places: Place[] }).places[0]).toMatchObject({ name: 'Burlington', region: 'Vermont', country: 'United States', timeZone: 'America/New_York' });
});

it.each(['/places', '/places?q=', '/places?q=a', `/places?q=${'a'.repeat(81)}`, '/places?q=a&q=b'])('refuses %s', async (path) => {
  const response = await call(test, null, 'get', path);
  expect(response.status).toBe(400);
  expect(response.body).toMatchObject({ error: { code: 'invalid_input', fields: [{ path: 'q' }] } });
});
