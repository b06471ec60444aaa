import type { AppContext } from '@/server/context';
import { signInRequired } from '@/server/errors';
import { verifyAccessToken } from '@/server/commands/accessToken';
import { readCallerSession } from '@/server/readModels/callerSession';
import type { Role } from '@/shared/contracts/common';
import type { SignedInUser } from './route';

export interface Caller {
  user: SignedInUser;
  role: Role | null;
}

/**
 * Who calls: the access token's signature and the session behind it are checked, and with a yard its membership, in one query.
 * @throws AppError sign_in_required without a valid token or when its session was ended
 */
export async function authenticate(database: AppContext['database'], secret: string, authorization: string | undefined, now: Date, yardId: string | null): Promise<Caller> {
  const token = /^Bearer (.+)$/.exec(authorization ?? '')?.[1];
  if (token === undefined) {
    throw signInRequired();
  }
  const user = verifyAccessToken(token, secret, now);
  const session = await readCallerSession(database, user, yardId);
  if (session === null) {
    throw signInRequired();
  }
  return { user, role: session.role };
}
