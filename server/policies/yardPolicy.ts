import type { Role } from '@/shared/contracts/common';
import { yardActions, type Abilities, type YardAction } from '@/shared/contracts/yards';

/** Who may do what with a yard. The only place that says so: routes enforce it and every yard carries it to the screens. */
const allowed: Record<YardAction, readonly Role[]> = {
  'yard.read': ['owner', 'helper', 'consultant'],
  'yard.update': ['owner'],
  'yard.delete': ['owner'],
  'facts.edit': ['owner', 'consultant'],
  'tests.record': ['owner', 'helper', 'consultant'],
  'rain.record': ['owner', 'helper', 'consultant'],
  'round.run': ['owner', 'helper', 'consultant'],
  'plan.read': ['owner', 'helper', 'consultant'],
  'plan.recompute': ['owner', 'consultant'],
  'members.read': ['owner', 'consultant'],
  'members.manage': ['owner'],
  'proposal.write': ['consultant'],
  'proposal.decide': ['owner'],
  'history.read': ['owner', 'consultant'],
  'preferences.edit': ['owner', 'helper', 'consultant'],
};

/** True when a member with this role may do the action. */
export function mayInYard(role: Role, action: YardAction): boolean {
  return allowed[action].includes(role);
}

/** The same rules as a map for the screens. */
export function abilitiesOf(role: Role): Abilities {
  return Object.fromEntries(yardActions.map((action) => [action, mayInYard(role, action)])) as Abilities;
}
