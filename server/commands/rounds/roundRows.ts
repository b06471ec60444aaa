import { QueryTypes, type Sequelize } from 'sequelize';
import { Round, RoundSet } from '@/server/models';
import type { RoundSetState, RoundState } from './roundStates';

export interface StoredRound {
  row: Round;
  setRows: RoundSet[];
  state: RoundState;
}

/** The taps of some positions: what the state of a round has to know besides its own rows. */
async function tapsOf(database: Sequelize, yardId: string, positionIds: readonly string[]): Promise<Map<string, { tapId: string; shutOffTimer: boolean }>> {
  const rows = await database.query<{ positionId: string; tapId: string; shutOffTimer: boolean }>(
    `SELECT p.id AS "positionId", t.id AS "tapId", t.shut_off_timer AS "shutOffTimer" FROM positions p JOIN taps t ON t.yard_id = p.yard_id AND t.id = p.tap_id
     WHERE p.yard_id = $1 AND p.id = ANY($2::uuid[])`,
    { bind: [yardId, positionIds], type: QueryTypes.SELECT },
  );
  return new Map(rows.map((row) => [row.positionId, row]));
}

/** States of sets from their rows. */
export async function setStates(database: Sequelize, yardId: string, setRows: readonly RoundSet[]): Promise<RoundSetState[]> {
  const taps = await tapsOf(database, yardId, setRows.map((row) => row.positionId));
  return setRows.map((row) => ({
    id: row.id, tapId: taps.get(row.positionId)?.tapId ?? row.positionId, endsByItself: taps.get(row.positionId)?.shutOffTimer ?? false,
    status: row.status, sortOrder: row.sortOrder, plannedMinutes: row.plannedMinutes, addedMinutes: row.addedMinutes, rateMmPerHour: row.rateMmPerHour,
    startedAt: row.startedAt, endedAt: row.endedAt, minutesRun: row.minutesRun, appliedMm: row.appliedMm, skipCause: row.skipCause,
  }));
}

/** Reads a round of a yard with its sets; null when the yard has no such round. */
export async function loadRound(database: Sequelize, yardId: string, roundId: string): Promise<StoredRound | null> {
  const row = await Round.findOne({ where: { id: roundId, yardId } });
  if (row === null) {
    return null;
  }
  const setRows = await RoundSet.findAll({ where: { yardId, roundId }, order: [['sortOrder', 'ASC']] });
  return { row, setRows, state: { status: row.status, endedAt: row.endedAt, sets: await setStates(database, yardId, setRows) } };
}

/** Copies the state of a set into its row. */
export function fillSet(row: RoundSet, state: RoundSetState): RoundSet {
  return row.set({
    status: state.status, addedMinutes: state.addedMinutes, startedAt: state.startedAt, endedAt: state.endedAt, minutesRun: state.minutesRun,
    appliedMm: state.appliedMm, skipCause: state.skipCause,
  });
}
