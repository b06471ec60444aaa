import type { Role } from '@/shared/contracts/common';

export const roleWords: Record<Role, { name: string; does: string }> = {
  owner: { name: 'Owner', does: 'Sees and changes everything, answers proposals.' },
  helper: { name: 'Helper', does: 'Sees today, runs rounds, writes down rain. No settings.' },
  consultant: { name: 'Consultant', does: 'Sees the whole yard, edits its facts, proposes doses for seeded ground.' },
};
