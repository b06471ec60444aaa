import type { Href } from 'expo-router';
import type { ReactElement } from 'react';
import { Card } from '@/components/ui/Card';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { TextLink } from '@/components/ui/TextLink';
import type { Reason } from '@/scheduling/planning/types';
import type { TodayResponse } from '@/shared/contracts/rounds';
import type { YardResponse } from '@/shared/contracts/yards';
import { reasonText } from '@/shared/reasons';

type Step = YardResponse['setUp'][number]['step'];

const words: Record<Step, string> = {
  tap: 'Name the tap', bucket_test: 'Time a bucket at the tap', hose: 'Add the hose', sprinkler: 'Add a sprinkler', zone: 'Add a zone',
  position: 'Mark a position for the sprinkler', catch_test: 'Record a catch-cup test', hours: 'Say when you are at home',
};

function stepHref(yard: YardResponse, step: Step): Href {
  const base = `/yards/${yard.id}`;
  const tap = yard.taps[0];
  const untested = yard.positions.find((position) => position.lastTestedAt === null);
  if (step === 'bucket_test' && tap) {
    return `${base}/taps/${tap.id}` as Href;
  }
  if (step === 'catch_test' && untested) {
    return `${base}/positions/${untested.id}/catch-test` as Href;
  }
  return (step === 'hours' ? `${base}/hours` : `${base}/yard`) as Href;
}

/**
 * What the plan lacks and what would give it, in one place. Who may not change the yard reads nothing here: a helper needs the round, not its gaps.
 */
export function SetUpSteps({ yard, today }: { yard: YardResponse; today: TodayResponse }): ReactElement | null {
  const open = yard.setUp.filter((step) => !step.done);
  if ((open.length === 0 && today.missing.length === 0) || !yard.abilities['facts.edit']) {
    return null;
  }
  return (
    <Card padding={20} gap={12}>
      <Text variant="heading3" level={2}>Makes the plan truer</Text>
      {today.missing.length > 0 ? (
        <Stack gap={8}>
          {today.missing.map((reason, index) => <Text key={index} color="inkSoft">{reasonText(reason as Reason, yard.units, today.today)}</Text>)}
        </Stack>
      ) : null}
      {open.length > 0 ? (
        <Stack gap={4}>
          {open.map(({ step }) => <TextLink key={step} kind="standalone" href={stepHref(yard, step)}>{words[step]}</TextLink>)}
        </Stack>
      ) : <TextLink kind="standalone" href={`/yards/${yard.id}/yard` as Href}>Look at the yard’s facts</TextLink>}
    </Card>
  );
}
