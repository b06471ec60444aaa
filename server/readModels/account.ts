import { Op } from 'sequelize';
import { signInRequired } from '@/server/errors';
import { Session, User } from '@/server/models';

/** @throws AppError sign_in_required when the account is gone */
export async function readMe(userId: string): Promise<User> {
  const user = await User.findByPk(userId);
  if (user === null) {
    throw signInRequired();
  }
  return user;
}

/** Sessions of a person that still run, the last used first. */
export function readSessions(userId: string, now: Date): Promise<Session[]> {
  return Session.findAll({ where: { userId, endedAt: null, expiresAt: { [Op.gt]: now } }, order: [['lastUsedAt', 'DESC'], ['createdAt', 'DESC']] });
}
