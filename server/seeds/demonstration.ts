import { QueryTypes } from 'sequelize';
import { recordEvent } from '@/server/commands/recordEvent';
import type { AppContext } from '@/server/context';
import { EventRow } from '@/server/models';
import { demonstrationStart, demonstrationTimeZone } from '@/shared/contracts/demonstration';
import { instantAt } from '@/shared/time';
import { larkspurCourt } from './demonstration/larkspurCourt';
import { liveThrough } from './demonstration/liveThrough';
import { otherYards } from './demonstration/otherYards';
import { createPeople, demonstrationDomain, demonstrationPassword, demonstrationPeople } from './demonstration/people';

export interface DemonstrationAccount {
  role: string;
  email: string;
  password: string;
}

const SEEDED = 'demonstration.seeded';

const accounts: DemonstrationAccount[] = [
  { role: 'owner', email: demonstrationPeople.mara.email, password: demonstrationPassword },
  { role: 'helper', email: demonstrationPeople.theo.email, password: demonstrationPassword },
  { role: 'consultant', email: demonstrationPeople.inez.email, password: demonstrationPassword },
];

/**
 * Makes the demonstration's people and yards once: each yard lives from its first evening to the morning in which the demonstration begins, through
 * the same jobs and commands as any yard. What a killed run left half-made is made anew; a finished one is left alone.
 * @returns accounts to sign in with
 * @throws when the clock cannot be set, which is everywhere but in the demonstration
 */
export async function seedDemonstration(context: AppContext): Promise<DemonstrationAccount[]> {
  const { settableClock: clock, database } = context;
  if (clock === null) {
    throw new Error('The demonstration lives on a clock of its own: start with DAPPLE_MODE=demonstration.');
  }
  return clock.alone(async () => {
    if (await EventRow.count({ where: { verb: SEEDED } }) > 0) {
      return accounts;
    }
    await removeHalfMade(context);
    const until = instantAt(demonstrationStart.on, demonstrationStart.minutes, demonstrationTimeZone);
    try {
      clock.standAt(new Date(until.getTime() - 30 * 86_400_000));
      const users = await database.transaction(() => createPeople(context));
      for (const script of otherYards) {
        await liveThrough(context, users, script, until, false);
      }
      await liveThrough(context, users, larkspurCourt, until, true);
      await recordEvent({ yardId: null, userId: null, verb: SEEDED, subjectKind: 'demonstration', subjectId: null, data: {} }, until);
    } finally {
      clock.standAt(null);
    }
    await clock.setTo(until);
    return accounts;
  });
}

async function removeHalfMade({ database }: AppContext): Promise<void> {
  const bind = [`%@${demonstrationDomain}`];
  await database.query(
    'DELETE FROM yards WHERE id IN (SELECT m.yard_id FROM memberships m JOIN users u ON u.id = m.user_id WHERE u.email LIKE $1)', { bind, type: QueryTypes.DELETE },
  );
  await database.query('DELETE FROM users WHERE email LIKE $1', { bind, type: QueryTypes.DELETE });
}
