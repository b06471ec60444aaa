import { Op, QueryTypes, type Sequelize } from 'sequelize';
import { Invitation } from '@/server/models';
import type { Role } from '@/shared/contracts/common';

export interface MemberRow {
  id: string;
  name: string;
  email: string;
  role: Role;
  since: Date;
}

/** Members of a yard, owners first, then by when they joined. */
export function readMembers(database: Sequelize, yardId: string): Promise<MemberRow[]> {
  return database.query<MemberRow>(
    `SELECT u.id, u.name, u.email, m.role, m.created_at AS since FROM memberships m JOIN users u ON u.id = m.user_id
     WHERE m.yard_id = $1 ORDER BY array_position(ARRAY['owner', 'helper', 'consultant'], m.role), m.created_at, u.name, u.id`,
    { bind: [yardId], type: QueryTypes.SELECT },
  );
}

/** Invitations of a yard that wait for an answer, the newest first. */
export function readOpenInvitations(yardId: string, now: Date): Promise<Invitation[]> {
  return Invitation.findAll({ where: { yardId, acceptedAt: null, withdrawnAt: null, expiresAt: { [Op.gt]: now } }, order: [['createdAt', 'DESC'], ['id', 'ASC']] });
}

/** What the link of an invitation may show to anybody who has it. */
export async function readInvitationPreview(database: Sequelize, invitation: Invitation): Promise<{ yardName: string; invitedBy: string | null }> {
  const [row] = await database.query<{ yardName: string; invitedBy: string | null }>(
    'SELECT y.name AS "yardName", (SELECT u.name FROM users u WHERE u.id = $2) AS "invitedBy" FROM yards y WHERE y.id = $1',
    { bind: [invitation.yardId, invitation.invitedBy ?? null], type: QueryTypes.SELECT },
  );
  return row ?? { yardName: '', invitedBy: null };
}
