import { randomUUID } from 'node:crypto';
import { signAccessToken } from '@/server/commands/accessToken';
import { Session, User } from '@/server/models';
import type { TestContext } from '../setup/testContext';

export interface SignedIn {
  user: User;
  sessionId: string;
  /** Signs a fresh token at each read, since the clock of a test may have moved past the life of an older one. */
  readonly headers: { authorization: string };
}

/** A person with a confirmed address and a running session. The password cannot be used: sign up through the routes to test that. */
export async function signedIn(test: TestContext, overrides: Partial<{ name: string; email: string; emailConfirmedAt: Date | null }> = {}): Promise<SignedIn> {
  const now = test.clock.now();
  const id = randomUUID();
  const user = await User.create({ id, name: 'Robin Ashgrove', email: `robin-${id.slice(0, 8)}@example.org`, passwordHash: 'unusable', emailConfirmedAt: now, ...overrides });
  const sessionId = randomUUID();
  await Session.create({
    id: sessionId, userId: id, tokenHash: randomUUID(), device: 'test', createdAt: now, lastUsedAt: now, expiresAt: new Date(now.getTime() + 365 * 86_400_000),
  });
  return {
    user, sessionId,
    get headers() {
      return { authorization: `Bearer ${signAccessToken({ id, sessionId }, test.context.env.TOKEN_SECRET, test.clock.now()).token}` };
    },
  };
}
