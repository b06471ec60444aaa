import type { Response } from 'supertest';
import { mayInYard } from '@/server/policies/yardPolicy';
import { routes } from '@/server/routes';
import type { Route } from '@/server/routes/route';
import { roles } from '@/shared/contracts/common';
import { yardActions } from '@/shared/contracts/yards';
import { callers, callRoute, fingerprint, goodBody, isYardRow, knowsParam, paramsOf, routeNames, routeWorld, type Caller, type RouteWorld } from '../../factories/routeWorld';
import { testContext, testNow, type TestContext } from '../../setup/testContext';

jest.setTimeout(60_000);

/** Where anybody may call without signing in. Everything else asks who calls. */
const openGround = ['/health', '/floor', '/clock', '/auth/', '/places', '/calculators/', '/invitations/'];
/** The cookie, and not the access token, says who calls here. */
const asksCookie = ['POST /auth/refresh'];
/** Refuses a right caller who gives a wrong password or token, which a body made from the contract is. */
const asksSecret = ['POST /auth/sign-in'];

const allRoutes = [...routeNames.entries()];
const yardRoutes = allRoutes.filter(([, route]) => typeof route.access === 'object');
const names = (list: [string, Route][]) => list.map(([name]) => name);
const routeOf = (name: string) => routeNames.get(name)!;
const refusal = (answer: Response) => (answer.body as { error?: { code: string } }).error?.code ?? 'none';

/** What the declared rule says about a caller: let through, or the status and code of the refusal. */
function verdict(route: Route, caller: Caller): 'let through' | [number, string] {
  const { access } = route;
  if (access === 'public') {
    return 'let through';
  }
  if (access === 'demonstration') {
    return [404, 'not_found'];
  }
  if (caller === 'anonymous') {
    return [401, 'sign_in_required'];
  }
  if (access === 'signed_in') {
    return 'let through';
  }
  if (caller === 'stranger') {
    return [404, 'not_found'];
  }
  return mayInYard(caller, access.yard) ? 'let through' : [403, 'forbidden'];
}

describe('every route', () => {
  it('is there, and only once', () => {
    expect(routes.length).toBeGreaterThan(60);
    expect(routeNames.size).toBe(routes.length);
  });

  it.each(names(allRoutes))('%s says who may call it', (name) => {
    const { access, path } = routeOf(name);
    if (typeof access === 'object') {
      expect(yardActions).toContain(access.yard);
      expect(path).toMatch(/^\/yards\/:yardId(\/|$)/);
      expect(access.orSelf === undefined || paramsOf(routeOf(name)).includes(access.orSelf)).toBe(true);
    } else {
      expect(['public', 'signed_in', 'demonstration']).toContain(access);
      // nothing about one yard is open to people who are not its members
      expect(path).not.toContain(':yardId');
    }
    if (access === 'public') {
      expect(openGround.filter((ground) => path.startsWith(ground))).toHaveLength(1);
    }
  });

  it.each(names(allRoutes))('%s has a fixture for each of its path parameters, and a body its contract takes', async (name) => {
    const route = routeOf(name);
    expect(paramsOf(route).filter((param) => !knowsParam(param))).toEqual([]);
    if (route.body !== undefined) {
      const ids = Object.fromEntries(['zoneId', 'tapId', 'hoseId', 'sprinklerId', 'positionId', 'setId'].map((id) => [id, '7a1e4c52-3b0f-4f0e-9d5e-0d6f5d0b8a11']));
      const parsed = await route.body.safeParseAsync(goodBody(route, { ids } as never));
      expect(parsed.error?.issues ?? []).toEqual([]);
    }
  });
});

describe('who may call what', () => {
  let test: TestContext;
  beforeAll(async () => { test = await testContext(); });
  afterAll(() => test.close());
  beforeEach(() => test.clock.set(testNow));

  let reading: Promise<RouteWorld> | null = null;
  /** Routes that only read share a world; a route that writes gets one of its own. */
  const worldFor = (route: Route) => (route.method === 'get' ? (reading ??= routeWorld(test)) : routeWorld(test));

  it.each(names(allRoutes))('%s lets in whom its rule lets in, and nobody else', async (name) => {
    const route = routeOf(name);
    const world = await worldFor(route);
    const denied = callers.filter((caller) => verdict(route, caller) !== 'let through');
    const before = await fingerprint(test);
    for (const caller of denied) {
      const answer = await callRoute(test, world, route, { caller });
      expect([caller, answer.status, refusal(answer)]).toEqual([caller, ...verdict(route, caller)]);
    }
    // the fixtures of plain parameters make rows of their own, but never in these tables
    const after = await fingerprint(test);
    const { sessions: _s, users: _u, ...kept } = before;
    expect(after).toMatchObject(denied.length > 0 && !paramsOf(route).includes('token') ? kept : {});

    const admitted = callers.filter((caller) => verdict(route, caller) === 'let through');
    for (const [index, caller] of admitted.entries()) {
      const answer = await callRoute(test, world, route, { caller });
      const told = `${caller}: ${answer.status} ${refusal(answer)}`;
      expect(answer.status).toBeLessThan(500);
      if (asksCookie.includes(name)) {
        expect(told).toBe(`${caller}: 401 sign_in_required`);
      } else if (asksSecret.includes(name)) {
        expect(['sign_in_failed', 'email_not_confirmed', 'too_many_requests']).toContain(refusal(answer));
      } else {
        expect(told).not.toMatch(/ (401|403) /);
        // what the first one took away is not there for the next
        if (index === 0) {
          expect(told).not.toMatch(/ 404 /);
        }
      }
    }
  });

  it.each(names(yardRoutes.filter(([, { access }]) => typeof access === 'object' && access.orSelf !== undefined)))('%s lets a member of any role do it to themself, and nobody else', async (name) => {
    const route = routeOf(name);
    const world = await routeWorld(test);
    const { orSelf = '' } = route.access as { orSelf?: string };
    for (const role of roles.filter((each) => each !== 'owner')) {
      const self = { ...world, yard: { ...world.yard, other: world.people[role] } };
      expect((await callRoute(test, self, route, { caller: 'stranger' })).status).toBe(404);
      expect([orSelf, (await callRoute(test, self, route, { caller: role })).status]).toEqual(['userId', 200]);
    }
  });

  it.each(names(yardRoutes.filter(([, route]) => paramsOf(route).some(isYardRow))))('%s does not reach into another yard by its path', async (name) => {
    const route = routeOf(name);
    const world = await routeWorld(test);
    const before = await fingerprint(test);
    const caller = roles.find((role) => mayInYard(role, (route.access as { yard: (typeof yardActions)[number] }).yard))!;
    for (const foreignParam of paramsOf(route).filter(isYardRow)) {
      const answer = await callRoute(test, world, route, { caller, foreignParam });
      expect([foreignParam, answer.status, refusal(answer)]).toEqual([foreignParam, 404, 'not_found']);
      expect(JSON.stringify(answer.body)).not.toContain('Foreign Row');
    }
    expect(await fingerprint(test)).toEqual(before);
  });

  const idFields = ['zoneId', 'tapId', 'hoseId', 'sprinklerId', 'positionId', 'setId'];
  const withIds = (route: Route) => {
    const body = goodBody(route, { yardId: '', ids: Object.fromEntries(idFields.map((field) => [field, field])) } as never);
    return typeof body === 'object' && body !== null ? idFields.filter((field) => field in body) : [];
  };
  it.each(yardRoutes.flatMap(([name, route]) => (route.body === undefined ? [] : withIds(route).map((field) => [name, field] as const))))('%s does not take %s of another yard in its body', async (name, foreignField) => {
    const route = routeOf(name);
    const world = await routeWorld(test);
    const caller = roles.find((role) => mayInYard(role, (route.access as { yard: (typeof yardActions)[number] }).yard))!;
    const before = await fingerprint(test);
    const answer = await callRoute(test, world, route, { caller, foreignField });
    expect([400, 404]).toContain(answer.status);
    expect(['invalid_input', 'not_found']).toContain(refusal(answer));
    expect(await fingerprint(test)).toEqual(before);
    // the same body with the yard's own row is taken, or refused for what it asks and not for whose it is
    const own = await callRoute(test, world, route, { caller });
    expect([200, 201, 409]).toContain(own.status);
  });
});
