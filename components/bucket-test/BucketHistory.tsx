import type { ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { keys } from '@/components/data/keys';
import { useRead, useWrite } from '@/components/data/useApi';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { confirm } from '@/components/ui/confirm';
import { DataTable } from '@/components/ui/DataTable';
import { EmptyState } from '@/components/ui/EmptyState';
import { ErrorState } from '@/components/ui/ErrorState';
import { Skeleton } from '@/components/ui/Skeleton';
import { Text } from '@/components/ui/Text';
import { showToast } from '@/components/ui/Toast';
import { ValueWithNote } from '@/components/ui/ValueWithNote';
import type { bucketTestListResponseSchema, BucketTestResponse, TapResponse } from '@/shared/contracts/equipment';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatCivilDay, formatFlow, formatNumber, formatRange, formatVolume } from '@/shared/display';
import { civilDayAt } from '@/shared/time';
import type { z } from '@/shared/zod';

/** All bucket tests of a tap, newest first. */
export function BucketHistory({ yard, tap }: { yard: YardResponse; tap: TapResponse }): ReactElement {
  return (
    <Card padding={20} gap={12}>
      <Text variant="heading3" level={2}>Tests of this tap</Text>
      <Tests yard={yard} tap={tap} />
    </Card>
  );
}

function Tests({ yard, tap }: { yard: YardResponse; tap: TapResponse }): ReactElement {
  const path = `/yards/${yard.id}/taps/${tap.id}/bucket-tests`;
  const tests = useRead<z.infer<typeof bucketTestListResponseSchema>>(keys.bucketTests(yard.id, tap.id), path);
  const remove = useWrite<{ done: true }, { testId: string }>(({ testId }) => ({ method: 'DELETE', path: `${path}/${testId}` }), { stale: [keys.yard(yard.id)] });
  if (tests.isPending) {
    return <Skeleton label="Loading the tests of this tap" lines={3} />;
  }
  if (tests.isError) {
    return <ErrorState title="The tests could not be loaded" detail={errorMessage(tests.error)} onRetry={() => void tests.refetch()} retrying={tests.isFetching} />;
  }
  const day = (test: BucketTestResponse) => formatCivilDay(civilDayAt(new Date(test.testedAt), yard.timeZone), 'dated');
  const through = (test: BucketTestResponse) => {
    const hose = test.hoseId === null ? null : yard.hoses.find(({ id }) => id === test.hoseId)?.name ?? 'a hose no longer in use';
    const sprinkler = test.sprinklerId === null ? null : yard.sprinklers.find(({ id }) => id === test.sprinklerId)?.name ?? 'a sprinkler no longer in use';
    return [hose, sprinkler].filter((part) => part !== null).join(', ') || 'straight from the tap';
  };
  const onRemove = async (test: BucketTestResponse) => {
    const isSure = await confirm({
      title: 'Take this test back?', body: `The test of ${day(test)} goes for good. The tap then takes the flow of its newest other test, or a default.`,
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
      caption={`Bucket tests of ${tap.name}`} rows={tests.data.bucketTests} rowKey={(test) => test.id}
      empty={<EmptyState title="No bucket timed yet" level={3}>Until then the plan takes a flow marked as a default. Two minutes with a bucket make every set time truer.</EmptyState>}
      columns={[
        { header: 'Day', cell: day, sortBy: (test) => test.testedAt },
        {
          header: 'Flow', sortBy: (test) => test.flowLpm,
          cell: (test) => <ValueWithNote value={formatFlow(test.flowLpm, yard.units)} note={formatRange('flow', test.flowLowLpm, test.flowHighLpm, yard.units)} />,
        },
        {
          header: 'Bucket',
          cell: (test) => <ValueWithNote value={`${formatVolume(test.volumeL, yard.units)} in ${formatNumber(test.seconds, Number.isInteger(test.seconds) ? 0 : 1)} s`} note={through(test)} />,
        },
        ...(yard.abilities['tests.record'] ? [{
          header: 'Take back',
          cell: (test: BucketTestResponse) => (
            <Button size="small" label={'Take\u00a0back'} accessibleLabel={`Take back the test of ${day(test)}`} pending={remove.isPending && remove.variables.testId === test.id} onPress={() => void onRemove(test)} />
          ),
        }] : []),
      ]}
    />
  );
}
