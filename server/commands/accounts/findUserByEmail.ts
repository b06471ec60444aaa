import { col, fn, where } from 'sequelize';
import { User } from '@/server/models';

/** The account of an address, whatever its case, by the index that keeps addresses apart; locked until the transaction ends when asked. */
export function findUserByEmail(email: string, lock = false): Promise<User | null> {
  return User.findOne({ where: where(fn('lower', col('email')), email.toLowerCase()), lock });
}
