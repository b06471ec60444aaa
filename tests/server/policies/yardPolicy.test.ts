import { abilitiesOf, mayInYard } from '@/server/policies/yardPolicy';
import { roles } from '@/shared/contracts/common';
import { yardActions, type YardAction } from '@/shared/contracts/yards';

/** What the product says of its people, written down a second time so that a slip in the policy shows. */
const ownersOnly: YardAction[] = ['yard.update', 'yard.delete', 'members.manage', 'proposal.decide'];
const consultantsOnly: YardAction[] = ['proposal.write'];
/** A helper sees and does the day's work, and no settings. */
const helpers: YardAction[] = ['yard.read', 'tests.record', 'rain.record', 'round.run', 'plan.read', 'preferences.edit'];

describe('what the people of a yard may do', () => {
  it('is decided for every action by role, and the map for the screens says the same', () => {
    for (const role of roles) {
      expect(Object.keys(abilitiesOf(role)).sort()).toEqual([...yardActions].sort());
      for (const action of yardActions) {
        const expected = ownersOnly.includes(action) ? role === 'owner' : consultantsOnly.includes(action) ? role === 'consultant' : role !== 'helper' || helpers.includes(action);
        expect([role, action, mayInYard(role, action)]).toEqual([role, action, expected]);
        expect(abilitiesOf(role)[action]).toBe(expected);
      }
    }
  });
});
