import type { Sequelize } from 'sequelize';
import { preparedRead } from '@/server/adapters/database/preparedRead';
import type { Role } from '@/shared/contracts/common';

/**
 * The running session behind an access token and, with a yard, what the person is there, in one query.
 * @returns null when the session has ended; the role is null for a yard to which the person does not belong
 */
export async function readCallerSession(database: Sequelize, user: { id: string; sessionId: string }, yardId: string | null): Promise<{ role: Role | null } | null> {
  const [row] = await preparedRead<{ role: Role | null }>(
    database, 'caller_session',
    `SELECT m.role FROM sessions s LEFT JOIN memberships m ON m.user_id = s.user_id AND m.yard_id = $3::uuid
     WHERE s.id = $1 AND s.user_id = $2 AND s.ended_at IS NULL`,
    [user.sessionId, user.id, yardId],
  );
  return row ?? null;
}
