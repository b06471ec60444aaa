import type { ReactElement } from 'react';
import { useVisitorUnits } from '@/components/data/useVisitorUnits';
import { LinkButton } from '@/components/ui/LinkButton';
import { Notice } from '@/components/ui/Notice';
import { Screen } from '@/components/ui/Screen';
import { Segmented } from '@/components/ui/Segmented';
import { CupTestLater } from './CupTestLater';

/** The catch-cup test without an account: reckoned on the page, kept nowhere but in this tab. */
export function PublicCupTestScreen(): ReactElement {
  const [units, setUnits] = useVisitorUnits();
  return (
    <Screen title="Catch-cup test" headline="What does your sprinkler apply?" kicker="Without an account"
      actions={<Segmented label="Units" value={units} onChange={setUnits} options={[{ value: 'us', label: 'US' }, { value: 'metric', label: 'Metric' }]} />}>
      <CupTestLater units={units} storageKey="dapple.cup-test.visitor" expected={null} instead={(
        <Notice tone="info" title="Nothing of this is kept." actions={<LinkButton kind="hose" label="Make an account" href={'/sign-up'} />}>
          It stays in this tab until you close it. With an account the test belongs to its position, and the plan runs for the right minutes.
        </Notice>
      )} />
    </Screen>
  );
}
