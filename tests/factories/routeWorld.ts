import { randomUUID } from 'node:crypto';
import request, { type Response } from 'supertest';
import { QueryTypes } from 'sequelize';
import { routes } from '@/server/routes';
import type { Route } from '@/server/routes/route';
import type { TestContext } from '../setup/testContext';
import { hoseAndBucketBody, moveDistanceBody, referenceEtBody, seedbedBody, soilStoreBody, sunExposureBody, waterBalanceBody } from './calculators';
import { fullYard, fullYardToday, invitationFor, otherSessionOf, ownerOfAnother, type FullYard } from './fullYard';
import { signedIn, type SignedIn } from './people';
import { sampleBody, type Named } from './sampleBody';

export const callers = ['anonymous', 'owner', 'helper', 'consultant', 'stranger'] as const;
export type Caller = (typeof callers)[number];

/** One yard in full, another one in full that has nothing to do with it, and people with every part in the first. */
export interface RouteWorld {
  yard: FullYard;
  foreign: FullYard;
  people: Record<Exclude<Caller, 'anonymous'>, SignedIn>;
}

export async function routeWorld(test: TestContext): Promise<RouteWorld> {
  const yard = await fullYard(test, 'Hazel Row');
  const foreign = await fullYard(test, 'Foreign Row');
  return { yard, foreign, people: { ...yard.people, stranger: await ownerOfAnother(test, foreign.yardId) } };
}

const nameOf = (route: Route) => `${route.method.toUpperCase()} ${route.path}`;
export const routeNames = new Map(routes.map((route) => [nameOf(route), route]));

/** Names of the path parameters of a route. */
export const paramsOf = (route: Route) => [...route.path.matchAll(/:(\w+)/g)].map((match) => match[1] ?? '');

/** Path parameters that name a row of a yard. Every other one is in `plainParams`. */
const yardParams: Record<string, (yard: FullYard, route: Route) => string> = {
  yardId: (yard) => yard.yardId,
  userId: (yard) => yard.other.user.id,
  testId: (yard, route) => (route.path.includes('bucket-tests') ? yard.ids.bucketTestId : yard.ids.catchTestId),
  ...Object.fromEntries((['zoneId', 'tapId', 'hoseId', 'sprinklerId', 'positionId', 'ruleId', 'permitId', 'lockId', 'invitationId', 'proposalId', 'roundId', 'setId'] as const)
    .map((name) => [name, (yard: FullYard) => yard.ids[name]])),
};

/** Path parameters that name no row of a yard. Tokens and sessions belong to the caller, so that only the route's own rule can refuse. */
const plainParams: Record<string, (test: TestContext, caller: SignedIn) => Promise<string>> = {
  on: () => Promise.resolve(fullYardToday),
  mailId: () => Promise.resolve(randomUUID()),
  sessionId: (test, caller) => otherSessionOf(test, caller),
  token: async (test, caller) => invitationFor(test, caller, (await fullYard(test, 'Inviting Row')).yardId),
};

export const knowsParam = (name: string) => name in yardParams || name in plainParams;
/** True for a parameter that names a row of a yard, and not the yard itself. */
export const isYardRow = (name: string) => name in yardParams && name !== 'yardId';

/** What the names of fields mean in bodies for this yard. */
function namedIn(yard: FullYard, overrides: Named = {}): Named {
  const { zoneId, tapId, hoseId, sprinklerId, positionId, setId } = yard.ids;
  return { zoneId, tapId, hoseId, sprinklerId, positionId, setId, id: randomUUID(), ...overrides };
}

const doses = (stage: string) => ({ stage, dosesPerDay: 2, everyDays: 1, depthMm: 2, timesMinutes: [480, 600], forDays: 7 });
const cupTest = { layout: { kind: 'row', spacingM: 1, firstDistanceM: 1 }, reading: { kind: 'depth' }, minutes: 30, readings: [4, 5, 6, 5, 4, 5, 6, 5] };

/** Bodies that say more than a contract's types do. */
const fixedBodies: Record<string, (yard: FullYard) => Record<string, unknown>> = {
  'POST /yards/:yardId/proposals': (yard) => ({ zoneId: yard.ids.zoneId, reason: 'It dried.', schedule: { stages: ['sown', 'coming_up', 'rooting', 'taper'].map(doses) } }),
  'POST /yards/:yardId/positions/:positionId/catch-tests': () => ({ ...cupTest, wind: 'calm' }),
  'POST /calculators/cup-test': () => cupTest,
  'POST /calculators/reference-et': () => ({ ...referenceEtBody }),
  'POST /calculators/move-distance': () => ({ ...moveDistanceBody }),
  'POST /calculators/hose-and-bucket': () => ({ ...hoseAndBucketBody }),
  'POST /calculators/soil-store-and-run-limit': () => ({ ...soilStoreBody }),
  'POST /calculators/sun-exposure': () => ({ ...sunExposureBody }),
  'POST /calculators/water-balance': () => ({ ...waterBalanceBody }),
  'POST /calculators/seedbed': () => ({ ...seedbedBody }),
  'PUT /yards/:yardId/hours': () => ({ windows: [{ weekday: 1, fromMinutes: 300, toMinutes: 480 }] }),
  'POST /yards/:yardId/rules': () => ({ name: 'Even days', dateParity: 'even', source: 'a sign', sourceOn: '2026-05-01' }),
  'PATCH /yards/:yardId/rules/:ruleId': () => ({ name: 'Even days', dateParity: 'even', source: 'a sign', sourceOn: '2026-05-01' }),
  'POST /yards/:yardId/permits': (yard) => ({ name: 'Seed permit', zoneIds: [yard.ids.zoneId], fromOn: '2026-06-04', toOn: '2026-07-04', source: 'a letter', sourceOn: '2026-06-01' }),
  'PATCH /yards/:yardId/permits/:permitId': (yard) => ({ zoneIds: [yard.ids.zoneId], toOn: '2026-07-10', liftsRuleIds: null }),
  'PUT /yards/:yardId/wishes': () => ({ priority: 'spare_me', preferredWindows: [], monthCapLitres: null }),
  'PUT /yards/:yardId/days/:on': () => ({ dayOff: true, extraWindows: [] }),
  'POST /yards/:yardId/locks': (yard) => ({ positionId: yard.ids.positionId, on: fullYardToday, startMinutes: 600, minutes: 30 }),
  'POST /yards/:yardId/plan/what-if': () => ({ changes: [{ kind: 'priority', priority: 'spare_me' }] }),
  'POST /yards/:yardId/plan/changes': () => ({ changes: [{ kind: 'priority', priority: 'spare_me' }] }),
  'DELETE /yards/:yardId': () => ({ name: 'Hazel Row' }),
  'POST /yards/:yardId/rounds/:roundId/actions': (yard) => ({ action: 'add_minutes', setId: yard.ids.setId, minutes: 10 }),
  'POST /yards/:yardId/rounds': () => ({ id: randomUUID(), on: fullYardToday, roundIndex: 1 }),
  'POST /yards/:yardId/rounds/skip': () => ({ on: fullYardToday, roundIndex: 1, cause: 'rain' }),
  'PUT /yards/:yardId/positions/order': (yard) => ({ positionIds: [yard.ids.positionId] }),
};

export interface Call {
  caller: Caller;
  /** Yard whose rows stand in the path instead, by the name of the parameter. */
  foreignParam?: string;
  /** Field of the body that gets the foreign yard's row instead. */
  foreignField?: string;
  /** Sends this instead of a good body. */
  body?: unknown;
}

/** A good body for a route, or undefined when it takes none. */
export function goodBody(route: Route, yard: FullYard, named: Named = {}): unknown {
  const fixed = fixedBodies[nameOf(route)];
  return route.body === undefined ? undefined : fixed ? { ...fixed(yard), ...named } : sampleBody(route.body, namedIn(yard, named));
}

/** The path of a route with its parameters filled in. */
export async function filledPath(test: TestContext, world: RouteWorld, route: Route, call: Call): Promise<string> {
  let path = route.path;
  const person = call.caller === 'anonymous' ? await signedIn(test) : world.people[call.caller];
  for (const name of paramsOf(route)) {
    const ofYard = yardParams[name];
    const value = ofYard ? ofYard(name === call.foreignParam ? world.foreign : world.yard, route) : await plainParams[name]?.(test, person);
    path = path.replace(`:${name}`, encodeURIComponent(value ?? ''));
  }
  return `/api${path}`;
}

/** Calls a route as somebody, with ids and a body that are in order unless told otherwise. */
export async function callRoute(test: TestContext, world: RouteWorld, route: Route, call: Call): Promise<Response> {
  const path = await filledPath(test, world, route, call);
  const named: Named = call.foreignField === undefined ? {} : { [call.foreignField]: namedIn(world.foreign)[call.foreignField] };
  let body = 'body' in call ? call.body : goodBody(route, world.yard, named);
  if (!('body' in call) && typeof body === 'object' && body !== null && 'token' in body && call.caller !== 'anonymous') {
    body = { ...body, token: await plainParams['token']?.(test, world.people[call.caller]) };
  }
  const sent = request(test.app)[route.method](path).set('x-requested-with', 'dapple');
  if (call.caller !== 'anonymous') {
    sent.set(world.people[call.caller].headers);
  }
  return body === undefined ? sent : sent.send(body as object);
}

/** Number and content of the rows of every table, to see that nothing was written. Counted attempts at passwords are no data of anybody. */
export async function fingerprint(test: TestContext): Promise<Record<string, string>> {
  const tables = await test.context.database.query<{ name: string }>(
    `SELECT table_name AS name FROM information_schema.tables WHERE table_schema = 'public' AND table_type = 'BASE TABLE' AND table_name NOT IN ('sign_in_failures', 'archived_mails', 'outgoing_mails')`,
    { type: QueryTypes.SELECT },
  );
  const sums = tables.map(({ name }) => `SELECT '${name}' AS name, count(*) || ' ' || COALESCE(md5(string_agg(md5(t::text), '' ORDER BY md5(t::text))), '') AS sum FROM "${name}" t`);
  const rows = await test.context.database.query<{ name: string; sum: string }>(sums.join(' UNION ALL '), { type: QueryTypes.SELECT });
  return Object.fromEntries(rows.map((row) => [row.name, row.sum]));
}
