import { QueryTypes, type Sequelize } from 'sequelize';
import type { EstablishmentSchedule } from '@/scheduling/establishment';
import type { ProposalStatus } from '@/shared/contracts/proposals';

export interface ProposalRow {
  id: string;
  zoneId: string;
  zoneName: string;
  authorId: string | null;
  authorName: string | null;
  reason: string;
  scheduleBefore: EstablishmentSchedule;
  schedule: EstablishmentSchedule;
  status: ProposalStatus;
  answer: string;
  decidedById: string | null;
  decidedByName: string | null;
  decidedAt: Date | null;
  createdAt: Date;
}

/** Proposals of a yard, open ones first, then the newest; with an id that one only. */
export function readProposals(database: Sequelize, yardId: string, proposalId: string | null = null): Promise<ProposalRow[]> {
  return database.query<ProposalRow>(
    `SELECT p.id, p.zone_id AS "zoneId", z.name AS "zoneName", p.author_id AS "authorId", a.name AS "authorName", p.reason, p.schedule_before AS "scheduleBefore",
       p.schedule, p.status, p.answer, p.decided_by AS "decidedById", d.name AS "decidedByName", p.decided_at AS "decidedAt", p.created_at AS "createdAt"
     FROM proposals p JOIN zones z ON z.yard_id = p.yard_id AND z.id = p.zone_id
     LEFT JOIN users a ON a.id = p.author_id LEFT JOIN users d ON d.id = p.decided_by
     WHERE p.yard_id = $1 AND ($2::uuid IS NULL OR p.id = $2::uuid) ORDER BY p.status = 'open' DESC, p.created_at DESC, p.id LIMIT 200`,
    { bind: [yardId, proposalId], type: QueryTypes.SELECT },
  );
}
