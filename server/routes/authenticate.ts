import { QueryTypes, type Sequelize } from 'sequelize';
import { signInRequired } from '@/server/errors';
import { verifyAccessToken } from '@/server/commands/accessToken';
import type { Role } from '@/shared/contracts/common';
import type { SignedInUser } from './route';

export interface Caller {
  user: SignedInUser;
  role: Role | null;
}

/**
 * Who calls: the access token's signature and the session behind it are checked, and with a yard its membership, in one query.
 * @throws AppError sign_in_required without a valid token, session_ended when the session was ended
 */
export async function authenticate(database: Sequelize, secret: string, authorization: string | undefined, now: Date, yardId: string | null): Promise<Caller> {
  const token = /^Bearer (.+)$/.exec(authorization ?? '')?.[1];
  if (token === undefined) {
    throw signInRequired();
  }
  const user = verifyAccessToken(token, secret, now);
  const [row] = await database.query<{ role: Role | null }>(
    `SELECT m.role FROM sessions s LEFT JOIN memberships m ON m.user_id = s.user_id AND m.yard_id = $3::uuid
     WHERE s.id = $1 AND s.user_id = $2 AND s.ended_at IS NULL`,
    { bind: [user.sessionId, user.id, yardId], type: QueryTypes.SELECT },
  );
  if (row === undefined) {
    throw signInRequired();
  }
  return { user, role: row.role };
}
