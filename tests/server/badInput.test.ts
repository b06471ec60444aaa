import request, { type Response } from 'supertest';
import { mayInYard } from '@/server/policies/yardPolicy';
import type { Route } from '@/server/routes/route';
import { roles } from '@/shared/contracts/common';
import { errorCodes, type ErrorCode } from '@/shared/errorCodes';
import { callRoute, filledPath, fingerprint, goodBody, paramsOf, routeNames, routeWorld, type Caller, type RouteWorld } from '../factories/routeWorld';
import { testContext, testNow, type TestContext } from '../setup/testContext';

jest.setTimeout(60_000);

const allRoutes = [...routeNames.entries()];
const withBody = allRoutes.filter(([, route]) => route.body !== undefined).map(([name]) => name);
const withParams = allRoutes.filter(([, route]) => paramsOf(route).length > 0).map(([name]) => name);
const withQuery = allRoutes.filter(([, route]) => route.query !== undefined).map(([name]) => name);
const routeOf = (name: string) => routeNames.get(name)!;

/** Somebody whom the route's rule lets in, so that only the input can be refused. */
function rightCaller({ access }: Route): Caller {
  return typeof access === 'object' ? roles.find((role) => mayInYard(role, access.yard))! : access === 'signed_in' ? 'owner' : 'anonymous';
}

/** Every answer is no failure of ours, and a refusal has a code of the closed list with its status, and a sentence. */
function checkAnswer(answer: Response, what: string): void {
  expect([what, answer.status < 500]).toEqual([what, true]);
  if (answer.status >= 400) {
    const { error } = answer.body as { error: { code: ErrorCode; message: string; requestId: string; fields?: { path: string }[] } };
    expect([what, errorCodes[error.code]]).toEqual([what, answer.status]);
    expect(error.message).toMatch(/\w.{8,}/s);
    expect(error.requestId).toMatch(/^[0-9a-f-]{36}$/);
  }
}

/** Things that no field means. Those that a contract takes all the same must at least do no harm. */
const oddValues: [string, unknown][] = [
  ['null', null], ['true', true], ['blanks', '   '], ['a text', 'words'], ['NaN as a text', 'NaN'], ['a negative number', -1], ['a fraction', 0.123456789], ['a huge number', 1e308],
  ['the largest whole number', Number.MAX_SAFE_INTEGER], ['an empty list', []], ['a list in a list', [[]]],
  ['ten thousand zeros', Array.from({ length: 10_000 }, () => 0)], ['an object in an object', { a: { b: {} } }], ['a zero byte', 'a\u0000b'],
  ['control characters', 'a\u0007\u001b[31mb'], ['half a character', 'a\ud800b'], ['a long text', 'x'.repeat(50_000)], ['a foreign script', 'Żółć 草地 🌱'], ['the turn of writing', 'abc\u202edef'],
  ['a day that is none', '2026-02-30'], ['a far day', '9999-12-31'], ['a day before all', '0001-01-01'], ['an id of nobody', '00000000-0000-0000-0000-000000000000'],
];

/** The good body with one value, however deep, replaced by each odd one. */
function* spoilt(value: unknown, path: string[] = []): Generator<[string, unknown]> {
  if (path.length > 0) {
    for (const [what, odd] of oddValues) {
      yield [`${path.join('.')} is ${what}`, odd];
    }
  }
  if (typeof value === 'object' && value !== null) {
    // one place of a list stands for all of them
    for (const [key, inner] of Array.isArray(value) ? Object.entries(value).slice(0, 1) : Object.entries(value)) {
      for (const [what, spoiltInner] of spoilt(inner, [...path, key])) {
        yield [what, Array.isArray(value) ? value.map((each, at) => (String(at) === key ? spoiltInner : each as unknown)) : { ...value, [key]: spoiltInner }];
      }
    }
  }
}

/** Whole bodies that are none. */
const oddBodies: [string, unknown][] = [['an empty object', {}], ['an empty list', []], ['a list of objects', [{}]], ['another object', { unknown: 'field' }]];

// The demonstration's routes are there in the demonstration only, and its clock moves every yard: it has a database of its own.
describe.each([['the service', false], ['the demonstration', true]] as const)('bad input in %s', (_where, demonstration) => {
  let test: TestContext;
  let shared: RouteWorld;
  beforeAll(async () => {
    test = await testContext({ demonstration });
    shared = await routeWorld(test);
  });
  afterAll(() => test.close());
  beforeEach(() => test.clock.set(testNow));

  const sweep = (list: string[], title: string, work: (route: Route) => Promise<void>) => {
    const own = list.filter((name) => (routeOf(name).access === 'demonstration') === demonstration);
    if (own.length > 0) {
      it.each(own)(title, (name) => work(routeOf(name)));
    }
  };

  const refusedBy = (route: Route, body: unknown) => !route.body!.safeParse(JSON.parse(JSON.stringify(body))).success;

  sweep(withBody, '%s refuses every body its contract does not take, names the field, and writes nothing', async (route) => {
    const caller = rightCaller(route);
    const refused = [...oddBodies, ...spoilt(goodBody(route, shared.yard))].filter(([, body]) => refusedBy(route, body));
    expect(refused.length).toBeGreaterThan(5);
    // The contract has just refused them all without a stumble; three of each field show that the route asks it.
    const ofField = new Map<string, [string, unknown][]>();
    refused.forEach((each) => ofField.set(each[0].split(' is ')[0]!, [...ofField.get(each[0].split(' is ')[0]!) ?? [], each]));
    const bodies = [...ofField.values()].flatMap((list) => [list[0]!, list[Math.floor(list.length / 2)]!, list[list.length - 1]!]);
    const path = await filledPath(test, shared, route, { caller });
    const before = await fingerprint(test);
    for (const [what, body] of bodies) {
      const sent = request(test.app)[route.method](path);
      const answer = await (caller === 'anonymous' ? sent : sent.set(shared.people[caller].headers)).send(body as object);
      checkAnswer(answer, what);
      const { error } = answer.body as { error: { code: string; fields?: { path: string }[] } };
      expect([what, answer.status, error.code, (error.fields ?? []).length > 0]).toEqual([what, 400, 'invalid_input', true]);
    }
    expect(await fingerprint(test)).toEqual(before);
  });

  sweep(withBody, '%s bears what its contract takes however odd it looks', async (route) => {
    const world = await routeWorld(test);
    const taken = [...oddBodies, ...spoilt(goodBody(route, world.yard))].filter(([, body]) => !refusedBy(route, body));
    for (const [what, body] of taken) {
      checkAnswer(await callRoute(test, world, route, { caller: rightCaller(route), body }), what);
    }
  });

  sweep(withBody, '%s refuses what is no JSON, too much, or of another kind, and writes nothing', async (route) => {
    const caller = rightCaller(route);
    const path = await filledPath(test, shared, route, { caller });
    const before = await fingerprint(test);
    const send = async (text: string, type = 'application/json') => {
      const sent = request(test.app)[route.method](path).set('content-type', type);
      const answer = await (caller === 'anonymous' ? sent : sent.set(shared.people[caller].headers)).send(text);
      checkAnswer(answer, text.slice(0, 40));
      return [answer.status, (answer.body as { error: { code: string } }).error.code];
    };
    for (const text of ['{"name": ', '{name: 1}', 'null', '42', '"text"', 'true', 'NaN', '\u0000', '{"a":1}}', '[1,', '<xml/>']) {
      expect([text, ...await send(text)]).toEqual([text, 400, 'invalid_json']);
    }
    expect(await send(JSON.stringify({ ...(goodBody(route, shared.yard) as object), name: 'x'.repeat(5_000_000) }))).toEqual([413, 'body_too_large']);
    expect(await send('name=1', 'application/x-www-form-urlencoded')).toEqual([415, 'unsupported_media_type']);
    expect(await send('{}', 'text/plain')).toEqual([415, 'unsupported_media_type']);
    expect(await send('{}', 'application/json; charset=klingon')).toEqual([400, 'invalid_json']);
    expect(await fingerprint(test)).toEqual(before);
  });

  sweep(withBody, '%s lets no body change what objects are', async (route) => {
    const caller = rightCaller(route);
    const world = await routeWorld(test);
    const path = await filledPath(test, world, route, { caller });
    const good = JSON.stringify(goodBody(route, world.yard));
    for (const poison of ['"__proto__":{"polluted":"yes","role":"owner"}', '"constructor":{"prototype":{"polluted":"yes"}}']) {
      const sent = request(test.app)[route.method](path).set('content-type', 'application/json');
      const answer = await (caller === 'anonymous' ? sent : sent.set(world.people[caller].headers)).send(`{${poison},${good.slice(1)}`);
      checkAnswer(answer, poison);
      expect(({} as { polluted?: string }).polluted).toBeUndefined();
      expect(JSON.stringify(answer.body)).not.toContain('polluted');
    }
  });

  sweep(withParams, '%s refuses paths that name nothing', async (route) => {
    const caller = rightCaller(route);
    const good = await filledPath(test, shared, route, { caller });
    const before = await fingerprint(test);
    const parts = good.split('/');
    const template = `/api${route.path}`.split('/');
    for (const [at, part] of template.entries()) {
      if (!part.startsWith(':')) {
        continue;
      }
      for (const odd of ['not-an-id', '%00', '%E0%A4%A', '%2e%2e%2f', "'%20OR%201=1", '00000000-0000-4000-8000-000000000000', '2026-02-30', 'x'.repeat(4_000)]) {
        const path = parts.map((each, index) => (index === at ? odd : each)).join('/');
        const sent = request(test.app)[route.method](path);
        const answer = await (caller === 'anonymous' ? sent : sent.set(shared.people[caller].headers)).send((goodBody(route, shared.yard) ?? undefined));
        checkAnswer(answer, `${part} = ${odd.slice(0, 40)}`);
        expect([part, odd.slice(0, 40), [400, 404].includes(answer.status)]).toEqual([part, odd.slice(0, 40), true]);
      }
    }
    expect(await fingerprint(test)).toEqual(before);
  });

  sweep(withQuery, '%s bears every query', async (route) => {
    const caller = rightCaller(route);
    const path = await filledPath(test, shared, route, { caller });
    const fields = Object.keys((route.query as unknown as { shape?: Record<string, unknown> }).shape ?? { q: 0 });
    for (const field of fields) {
      for (const odd of ['', 'NaN', '-1', '1e999', '99999999999999999999', '%00', 'a&FIELD=b', '%F0%9F%8C%B1', '2026-02-30', '9999-12-31', '0001-01-01', "'%3B--", '__proto__', 'x'.repeat(4_000)]) {
        for (const query of [`${field}=${odd.replace('FIELD', field)}`, `${field}[]=${odd}`, `${field}[a]=${odd}`]) {
          const sent = request(test.app)[route.method](`${path}?${query}`);
          checkAnswer(await (caller === 'anonymous' ? sent : sent.set(shared.people[caller].headers)), query.slice(0, 60));
        }
      }
    }
  });

  it('of headers is refused as well', async () => {
    const owner = shared.people.owner.headers;
    const rename = (headers: Record<string, string>) => request(test.app).patch('/api/me').set({ ...owner, ...headers }).send({ name: 'Robin Ashgrove' });
    for (const key of ['short', 'x'.repeat(101), 'with blanks in it', 'ümläut-key']) {
      const answer = await rename({ 'idempotency-key': encodeURI(key) });
      checkAnswer(answer, key);
      expect([key, answer.status]).toEqual([key, 400]);
    }
    for (const authorization of ['Bearer', 'Bearer ', 'Bearer a.b.c', 'Basic cm9iaW46cGFzc3dvcmQ=', `Bearer ${'x'.repeat(6_000)}`, 'null']) {
      const answer = await rename({ authorization });
      checkAnswer(answer, authorization);
      expect([authorization, answer.status]).toEqual([authorization, 401]);
    }
  });

  it('replayed is answered as the first time, and the same key for something else is refused', async () => {
    const owner = shared.people.owner.headers;
    const rename = (name: string) => request(test.app).patch('/api/me').set({ ...owner, 'idempotency-key': 'one-key-for-one-tap' }).send({ name });
    const first = await rename('Robin Birch').expect(200);
    await request(test.app).patch('/api/me').set(owner).send({ name: 'Robin Cedar' }).expect(200);
    expect((await rename('Robin Birch').expect(200)).body).toEqual(first.body);
    expect((await request(test.app).get('/api/me').set(owner)).body).toMatchObject({ name: 'Robin Cedar' });
    expect((await rename('Robin Maple').expect(409)).body).toMatchObject({ error: { code: 'idempotency_mismatch' } });
  });
});
