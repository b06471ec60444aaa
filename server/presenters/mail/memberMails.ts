import type { Role } from '@/shared/contracts/common';
import { mailLayout } from './layout';

const partOf: Record<Role, string> = {
  owner: 'an owner: you decide about the yard together',
  helper: 'a helper: you see each day\'s sets and run the rounds',
  consultant: 'its consultant: you see the yard, and propose how its seed is watered',
};

/** Invites an address to a yard. */
export function invitationMail(input: { yardName: string; role: Role; invitedBy: string | null; url: string; days: number }): { subject: string; text: string; html: string } {
  const who = input.invitedBy ?? 'The owner';
  return {
    subject: `You are invited to ${input.yardName}`,
    ...mailLayout({
      title: `You are invited to ${input.yardName}`,
      paragraphs: [
        `${who} invites you to the watering of ${input.yardName} in Dapple, as ${partOf[input.role]}.`,
        `The link works for ${input.days} days, for this address only. If you do not know the sender, do nothing.`,
      ],
      action: { label: 'See the invitation', url: input.url },
    }),
  };
}
