import type { ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useRead, useWrite } from '@/components/data/useApi';
import { Button } from '@/components/ui/Button';
import { confirm } from '@/components/ui/confirm';
import { DataTable } from '@/components/ui/DataTable';
import { EmptyState } from '@/components/ui/EmptyState';
import { ErrorState } from '@/components/ui/ErrorState';
import { Skeleton } from '@/components/ui/Skeleton';
import { Tag } from '@/components/ui/Tag';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';
import { ValueWithNote } from '@/components/ui/ValueWithNote';
import type { CatchTestResponse, catchTestListResponseSchema } from '@/shared/contracts/catchTests';
import type { PositionResponse } from '@/shared/contracts/equipment';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay, formatNumber, formatRange, formatRate } from '@/shared/display';
import { capital } from '@/shared/roundWords';
import { testExpiryWords } from '@/shared/testExpiry';
import { civilDayAt } from '@/shared/time';
import type { z } from '@/shared/zod';

/** Whether a test sets the position's rate, or why not. */
function standing(test: CatchTestResponse, position: PositionResponse): ReactElement {
  if (test.expiredBecause !== null) {
    return (
      <div className="ct-standing">
        <Tag label="Expired" tone="dry" />
        <Text variant="small">{`${capital(testExpiryWords[test.expiredBecause])}.`}</Text>
      </div>
    );
  }
  return test.id === position.lastCatchTestId ? <Tag label="In use" tone="hose" /> : <Text variant="small">A newer test is in use.</Text>;
}

/** All catch-cup tests of a position, newest first. */
export function CatchTestHistory({ yard, position }: { yard: YardResponse; position: PositionResponse }): ReactElement {
  const path = `/yards/${yard.id}/positions/${position.id}/catch-tests`;
  const tests = useRead<z.infer<typeof catchTestListResponseSchema>>(keys.catchTests(yard.id, position.id), path);
  const remove = useWrite<{ done: true }, { testId: string }>(({ testId }) => ({ method: 'DELETE', path: `${path}/${testId}` }), { stale: [keys.yard(yard.id)] });
  if (tests.isPending) {
    return <Skeleton label="Loading the tests of this position" lines={3} />;
  }
  if (tests.isError) {
    return <ErrorState title="The tests could not be loaded" detail={errorMessage(tests.error)} onRetry={() => void tests.refetch()} retrying={tests.isFetching} />;
  }
  const day = (test: CatchTestResponse) => formatCivilDay(civilDayAt(new Date(test.testedAt), yard.timeZone), 'dated');
  const onRemove = async (test: CatchTestResponse) => {
    const isSure = await confirm({
      title: 'Take this test back?', body: `The test of ${day(test)} goes for good. The position then takes its rate from an older test that still holds, or from flow and area.`,
      confirmLabel: 'Take the test back', cancelLabel: 'Keep the test', tone: 'danger',
    });
    if (isSure) {
      remove.mutate({ testId: test.id }, {
        onSuccess: () => void showToast({ message: 'The test is gone. The plan is made anew.' }),
        onError: (error) => void showToast({ message: errorMessage(error), tone: 'problem' }),
      });
    }
  };
  return (
    <DataTable
      caption={`Catch-cup tests of ${position.name}`} rows={tests.data.catchTests} rowKey={(test) => test.id}
      empty={<EmptyState title="No test of this position yet" level={3}>Set out the cups above. The first test replaces a guess in the plan.</EmptyState>}
      columns={[
        { header: 'Day', cell: day, sortBy: (test) => test.testedAt },
        {
          header: 'Rate', sortBy: (test) => test.result.rateMmPerHour,
          cell: ({ result }) => <ValueWithNote value={formatRate(result.rateMmPerHour, yard.units)} note={formatRange('rate', result.rateRange.low, result.rateRange.high, yard.units)} />,
        },
        {
          header: 'Low-quarter uniformity', sortBy: (test) => test.result.lowQuarterUniformity,
          cell: ({ result }) => (result.lowQuarterUniformity === null ? '–' : (
            <ValueWithNote value={formatNumber(result.lowQuarterUniformity, 2)} note={result.lowQuarterRange === null ? '' : `${formatNumber(result.lowQuarterRange.low, 2)} to ${formatNumber(result.lowQuarterRange.high, 2)}`} />
          )),
        },
        { header: 'Read', cell: (test) => `${test.result.cupCount} cup${test.result.cupCount === 1 ? '' : 's'}, by ${test.testedBy?.name ?? 'someone who left'}` },
        { header: 'Standing', cell: (test) => standing(test, position) },
        ...(yard.abilities['tests.record'] ? [{
          header: 'Take back',
          cell: (test: CatchTestResponse) => (
            <Button size="small" label={'Take\u00a0back'} accessibleLabel={`Take back the test of ${day(test)}`} pending={remove.isPending && remove.variables.testId === test.id} onPress={() => void onRemove(test)} />
          ),
        }] : []),
      ]}
    />
  );
}
