import { randomUUID } from 'node:crypto';
import request, { type Response } from 'supertest';
import { Membership } from '@/server/models';
import type { Role } from '@/shared/contracts/common';
import type { YardResponse } from '@/shared/contracts/yards';
import type { TestContext } from '../setup/testContext';
import { signedIn, type SignedIn } from './people';

type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';

/** Sends one request to the API as a person, or as nobody. */
export async function call(test: TestContext, who: SignedIn | null, method: Method, path: string, body?: object, headers: Record<string, string> = {}): Promise<Response> {
  const sent = request(test.app)[method](`/api${path}`).set(headers);
  if (who !== null) {
    void sent.set(who.headers);
  }
  return body === undefined ? sent : sent.send(body);
}

/** A place in Seattle; its civil day at the tests' usual instant is 13 June 2026. */
export const yardRequest = {
  name: 'Alder Street', placeName: 'Seattle', latitudeDeg: 47.61, longitudeDeg: -122.33, timeZone: 'America/Los_Angeles', units: 'us' as const,
};

/** A tap of 15 L/min by its bucket, one hose, one oscillating sprinkler, and a zone of 120 m². */
export const setUpRequest = {
  tap: { name: 'Front tap', bucketTest: { volumeL: 20, seconds: 80 } },
  hose: { name: 'Green hose', lengthM: 25, boreMm: 16 },
  sprinkler: { name: 'Swinging bar', kind: 'oscillating' },
  zones: [{ name: 'Front lawn', sideAM: 12, sideBM: 10 }],
  hours: { windows: [{ weekday: 6, fromMinutes: 420, toMinutes: 660 }] },
};

/** Sixteen cups in a grid by ruler, run for an hour: mean 12.5 mm. */
export const gridTestRequest = {
  layout: { kind: 'grid', rows: 4, columns: 4, spacingM: 2 }, reading: { kind: 'depth' }, minutes: 60, wind: 'calm',
  readings: [10, 12, 14, 12, 11, 13, 15, 13, 12, 14, 15, 13, 10, 12, 13, 11],
};

export interface OwnedYard {
  yardId: string;
  owner: SignedIn;
}

/** A yard with nothing in it but its default hours, made through the API. */
export async function ownedYard(test: TestContext, overrides: Record<string, unknown> = {}): Promise<OwnedYard> {
  const owner = await signedIn(test);
  const response = await call(test, owner, 'post', '/yards', { ...yardRequest, ...overrides });
  if (response.status !== 201) {
    throw new Error(`The yard was not made: ${response.text}`);
  }
  return { yardId: (response.body as YardResponse).id, owner };
}

/** A yard that the wizard has set up. */
export async function readyYard(test: TestContext, overrides: Record<string, unknown> = {}): Promise<OwnedYard & { yard: YardResponse }> {
  const owned = await ownedYard(test);
  const response = await call(test, owned.owner, 'post', `/yards/${owned.yardId}/set-up`, { ...setUpRequest, ...overrides });
  if (response.status !== 201) {
    throw new Error(`The yard was not set up: ${response.text}`);
  }
  return { ...owned, yard: response.body as YardResponse };
}

/** Another person who belongs to a yard. */
export async function memberOf(test: TestContext, yardId: string, role: Role): Promise<SignedIn> {
  const person = await signedIn(test);
  await Membership.create({ id: randomUUID(), yardId, userId: person.user.id, role });
  return person;
}

/** The yard as a member reads it. */
export async function yardOf(test: TestContext, { yardId, owner }: OwnedYard): Promise<YardResponse> {
  return (await call(test, owner, 'get', `/yards/${yardId}`)).body as YardResponse;
}
