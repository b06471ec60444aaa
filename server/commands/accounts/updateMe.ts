import { signInRequired } from '@/server/errors';
import { User } from '@/server/models';

/** Changes what a person says of themself. @returns the account as it is now */
export async function updateMe(userId: string, input: { name?: string | undefined }): Promise<User> {
  const user = await User.findByPk(userId, { lock: true });
  if (user === null) {
    throw signInRequired();
  }
  return input.name === undefined ? user : user.update({ name: input.name });
}
