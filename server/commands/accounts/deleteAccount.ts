import { QueryTypes } from 'sequelize';
import type { CommandContext } from '@/server/commands/commandContext';
import { recordEvent } from '@/server/commands/recordEvent';
import { queueMail } from '@/server/commands/outbox';
import { AppError } from '@/server/errors';
import { Invitation, User, Yard } from '@/server/models';
import { accountDeletedMail } from '@/server/presenters/mail/accountMails';
import { confirmPassword } from './changePassword';

interface YardOfPerson {
  id: string;
  name: string;
  role: string;
  members: number;
  owners: number;
}

/**
 * Deletes a person's account with everything that is theirs alone: yards with no other member go with it. What they did in others' yards
 * stays there without their name. Runs its own transaction, so that failed attempts at the password stay counted.
 * @throws AppError invalid_input for a wrong password, last_owner while others belong to a yard that has no other owner
 */
export async function deleteAccount(context: CommandContext, userId: string, password: string): Promise<void> {
  const { app, now } = context;
  const user = await confirmPassword(context, userId, password, 'password');
  const alone = await app.database.transaction(async () => {
    // Locked in one order, so that two owners who leave at once are seen one after the other.
    await app.database.query(
      'SELECT y.id FROM yards y JOIN memberships m ON m.yard_id = y.id WHERE m.user_id = $1 ORDER BY y.id FOR UPDATE OF y',
      { bind: [userId], type: QueryTypes.SELECT },
    );
    const yards = await app.database.query<YardOfPerson>(
      `SELECT y.id, y.name, me.role, count(*)::int AS members, count(*) FILTER (WHERE m.role = 'owner')::int AS owners
       FROM memberships me JOIN yards y ON y.id = me.yard_id JOIN memberships m ON m.yard_id = me.yard_id
       WHERE me.user_id = $1 GROUP BY y.id, y.name, me.role ORDER BY y.name`,
      { bind: [userId], type: QueryTypes.SELECT },
    );
    const held = yards.filter((yard) => yard.role === 'owner' && yard.owners === 1 && yard.members > 1);
    if (held.length > 0) {
      throw new AppError('last_owner', `Others belong to ${held.map((yard) => yard.name).join(', ')}, and you are the only owner. Make one of them an owner, or remove them, first.`);
    }
    const own = yards.filter((yard) => yard.members === 1);
    await Yard.destroy({ where: { id: own.map((yard) => yard.id) } });
    for (const yard of yards.filter((each) => each.members > 1)) {
      await recordEvent({ yardId: yard.id, userId: null, verb: 'member.left', subjectKind: 'member', subjectId: null, data: { role: yard.role, accountDeleted: true } }, now);
    }
    await Invitation.destroy({ where: { email: user.email.toLowerCase() } });
    await User.destroy({ where: { id: userId } });
    return own;
  });
  await queueMail(context, user.email, accountDeletedMail({ name: user.name, yardNames: alone.map((yard) => yard.name) }));
}
