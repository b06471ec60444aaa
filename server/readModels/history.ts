import { QueryTypes, type Sequelize } from 'sequelize';
import type { HistoryResponse } from '@/shared/contracts/yards';

interface EntryRow {
  id: string;
  at: Date;
  userId: string | null;
  userName: string | null;
  verb: string;
  subjectKind: string;
  subjectId: string | null;
  data: Record<string, unknown>;
}

/**
 * What was done in a yard, newest first, a page at a time. Entries about a member carry the member's name of today, so that none is kept of a deleted account. Pages follow instant and id, so that nothing is left out or shown twice
 * when several entries share an instant or new ones arrive.
 * @param before - nextBefore of the page before; left out for the newest page
 */
export async function readHistory(database: Sequelize, yardId: string, before: string | undefined, limit: number): Promise<HistoryResponse> {
  const [at, id] = before?.split('~') ?? [];
  const rows = await database.query<EntryRow>(
    `SELECT e.id, e.at, e.user_id AS "userId", u.name AS "userName", e.verb, e.subject_kind AS "subjectKind", e.subject_id AS "subjectId",
       CASE WHEN s.name IS NULL THEN e.data ELSE e.data || jsonb_build_object('name', s.name) END AS data
     FROM events e LEFT JOIN users u ON u.id = e.user_id LEFT JOIN users s ON e.subject_kind = 'member' AND s.id = e.subject_id
     WHERE e.yard_id = $1 AND ($2::timestamptz IS NULL OR (e.at, e.id) < ($2::timestamptz, $3::uuid))
     ORDER BY e.at DESC, e.id DESC LIMIT $4`,
    { bind: [yardId, at ?? null, id ?? null, limit + 1], type: QueryTypes.SELECT },
  );
  const page = rows.slice(0, limit);
  const last = page[page.length - 1];
  return {
    entries: page.map((row) => ({
      id: row.id, at: row.at.toISOString(), person: row.userId !== null && row.userName !== null ? { id: row.userId, name: row.userName } : null,
      verb: row.verb, subjectKind: row.subjectKind, subjectId: row.subjectId, data: row.data,
    })),
    nextBefore: rows.length > limit && last !== undefined ? `${last.at.toISOString()}~${last.id}` : null,
  };
}
