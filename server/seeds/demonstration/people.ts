import { randomUUID } from 'node:crypto';
import { hashPassword } from '@/server/commands/accounts/password';
import { recordEvent } from '@/server/commands/recordEvent';
import type { AppContext } from '@/server/context';
import { Membership, User } from '@/server/models';
import type { Role } from '@/shared/contracts/common';

/** Everybody of the demonstration is invented. Its accounts are shown at the start, so its password is no secret. */
export const demonstrationPassword = 'larkspur-morning';
export const demonstrationDomain = 'dapple.example';

export const demonstrationPeople = {
  mara: { name: 'Mara Ellison', email: `mara@${demonstrationDomain}` },
  theo: { name: 'Theo Ellison', email: `theo@${demonstrationDomain}` },
  inez: { name: 'Inez Calder', email: `inez@${demonstrationDomain}` },
  odell: { name: 'Odell Brandt', email: `odell@${demonstrationDomain}` },
  priya: { name: 'Priya Vellore', email: `priya@${demonstrationDomain}` },
  jonas: { name: 'Jonas Wexcombe', email: `jonas@${demonstrationDomain}` },
  carmen: { name: 'Carmen Ollave', email: `carmen@${demonstrationDomain}` },
  tove: { name: 'Tove Marlind', email: `tove@${demonstrationDomain}` },
} as const;
export type DemonstrationPerson = keyof typeof demonstrationPeople;
export type DemonstrationUsers = Record<DemonstrationPerson, { id: string; name: string }>;

/** Accounts of everybody, with confirmed addresses. */
export async function createPeople(context: AppContext): Promise<DemonstrationUsers> {
  const passwordHash = await hashPassword(demonstrationPassword, context.env.BCRYPT_COST);
  const users: [string, { id: string; name: string }][] = [];
  for (const [key, { name, email }] of Object.entries(demonstrationPeople)) {
    const user = await User.create({ id: randomUUID(), name, email, passwordHash, emailConfirmedAt: context.clock.now() });
    users.push([key, { id: user.id, name }]);
  }
  return Object.fromEntries(users) as DemonstrationUsers;
}

/** Takes a person into a yard, without its mails: the days that follow are lived through in a moment. */
export async function join(context: AppContext, yardId: string, userId: string, role: Role): Promise<void> {
  const now = context.clock.now();
  await Membership.create({ id: randomUUID(), yardId, userId, role, wantsMorningEmail: false, wantsMoveEmail: false });
  await recordEvent({ yardId, userId, verb: 'member.joined', subjectKind: 'member', subjectId: userId, data: { role } }, now);
}
