import type { Href } from 'expo-router';
import { useRef, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useWrite } from '@/components/data/useApi';
import { useYard } from '@/components/data/useYard';
import { Card } from '@/components/ui/Card';
import { ErrorState } from '@/components/ui/ErrorState';
import { LinkButton } from '@/components/ui/LinkButton';
import { Notice } from '@/components/ui/Notice';
import { Screen } from '@/components/ui/Screen';
import { Skeleton } from '@/components/ui/Skeleton';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';
import type { CatchTestResponse, CreateCatchTestRequest } from '@/shared/contracts/catchTests';
import type { PositionResponse } from '@/shared/contracts/equipment';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatRate } from '@/shared/display';
import { capital } from '@/shared/roundWords';
import { testExpiryWords } from '@/shared/testExpiry';
import { CatchTestHistory } from './CatchTestHistory';
import { CupTestLater } from './CupTestLater';

/** Record a catch-cup test of a position, and see its earlier ones. */
export function CatchTestScreen({ yardId, positionId }: { yardId: string; positionId: string }): ReactElement {
  const yard = useYard(yardId);
  if (yard.error) {
    return <Screen title="Catch-cup test"><ErrorState title="The yard could not be loaded" detail={errorMessage(yard.error)} onRetry={() => void yard.refetch()} retrying={yard.isFetching} /></Screen>;
  }
  if (!yard.data) {
    return <Screen title="Catch-cup test"><Skeleton label="Loading the position" height={480} /></Screen>;
  }
  const position = yard.data.positions.find(({ id }) => id === positionId);
  if (!position) {
    return (
      <Screen title="Catch-cup test" headline="This position is not in use." width="form">
        <Text>It may have been taken out of use since the link was made.</Text>
        <LinkButton label="Go to the yard" href={`/yards/${yardId}/yard` as Href} />
      </Screen>
    );
  }
  return <CatchTest key={position.id} yard={yard.data} position={position} />;
}

function CatchTest({ yard, position }: { yard: YardResponse; position: PositionResponse }): ReactElement {
  const history = useRef<HTMLHeadingElement>(null);
  const save = useWrite<CatchTestResponse, CreateCatchTestRequest>(
    (body) => ({ method: 'POST', path: `/yards/${yard.id}/positions/${position.id}/catch-tests`, body }), { stale: [keys.yard(yard.id)] },
  );
  const onSave = async (request: CreateCatchTestRequest) => {
    const test = await save.mutateAsync(request);
    void showToast({ message: `Saved: ${formatRate(test.result.rateMmPerHour, yard.units)}. The plan is made anew with it.` });
    history.current?.focus();
    history.current?.scrollIntoView({ block: 'start' });
  };
  const zone = yard.zones.find(({ id }) => id === position.zoneId);
  const sprinkler = yard.sprinklers.find(({ id }) => id === position.sprinklerId);
  const kicker = [zone?.name, position.name, sprinkler?.name].filter((part) => part !== undefined && part !== '').join(' · ');
  return (
    <Screen title="Catch-cup test" kicker={kicker}>
      {position.testExpiredBecause === null ? null : <Notice tone="info" title="The last test has expired.">{`${capital(testExpiryWords[position.testExpiredBecause])}. Until a new test the plan reckons with flow and area.`}</Notice>}
      {yard.abilities['tests.record'] ? (
        <CupTestLater units={yard.units} storageKey={`dapple.cup-test.${position.id}`} expected={{ rateMmPerHour: position.rateMmPerHour, source: position.rateSource }} save={onSave} />
      ) : null}
      <Card padding={20} gap={12}>
        <h2 className="ct-history" ref={history} tabIndex={-1}>Tests of this position</h2>
        <CatchTestHistory yard={yard} position={position} />
      </Card>
    </Screen>
  );
}
