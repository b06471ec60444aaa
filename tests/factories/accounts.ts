import { randomUUID } from 'node:crypto';
import request, { type Response } from 'supertest';
import type { SignedInResponse } from '@/shared/contracts/accounts';
import type { TestContext } from '../setup/testContext';
import { mailsTo, tokenIn } from './mailbox';

export const goodPassword = 'nine warm hoses in June';

export interface Account {
  name: string;
  email: string;
  password: string;
}

export interface SignedInAccount extends Account {
  id: string;
  headers: { authorization: string };
  /** The cookie with the refresh token, as a browser would send it back. */
  cookie: string;
}

/** The cookie that an answer sets, as a browser would send it back; empty when it sets or leaves none. */
export function cookieOf(answer: Response): string {
  const set = (answer.headers['set-cookie'] as unknown as string[] | undefined) ?? [];
  return set.find((cookie) => cookie.startsWith('dapple_refresh='))?.split(';')[0] ?? '';
}

export function newAccount(overrides: Partial<Account> = {}): Account {
  return { name: 'Maren Oakley', email: `maren-${randomUUID().slice(0, 8)}@example.org`, password: goodPassword, ...overrides };
}

function asSignedIn(account: Account, answer: Response): SignedInAccount {
  const body = answer.body as SignedInResponse;
  return { ...account, id: body.me.id, headers: { authorization: `Bearer ${body.accessToken}` }, cookie: cookieOf(answer) };
}

/** Signs a person up through the routes and confirms the address with the link from the mail. */
export async function signedUp(test: TestContext, overrides: Partial<Account> = {}): Promise<SignedInAccount> {
  const account = newAccount(overrides);
  await request(test.app).post('/api/auth/sign-up').send(account).expect(202);
  const [mail] = await mailsTo(test, account.email);
  return asSignedIn(account, await request(test.app).post('/api/auth/confirm').send({ token: tokenIn(mail) }).expect(200));
}

/** Signs a person in on one more device. */
export async function signedInAgain(test: TestContext, account: Account, userAgent = 'a test'): Promise<SignedInAccount> {
  const answer = await request(test.app).post('/api/auth/sign-in').set('user-agent', userAgent).send({ email: account.email, password: account.password }).expect(200);
  return asSignedIn(account, answer);
}
