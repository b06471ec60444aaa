import type { ReactElement } from 'react';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { Row } from '@/components/ui/Row';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { RoundSetResponse } from '@/shared/contracts/rounds';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatClock } from '@/shared/display';
import { HALF_WAY } from '@/shared/roundWords';
import { minutesAt } from '@/shared/time';
import { countdownText, setTitle, type TapView } from './roundView';

interface Props {
  yard: YardResponse;
  tap: TapView;
  now: Date;
  mayRun: boolean;
  /** What is being sent. */
  doing: string | null;
  onBegin: (set: RoundSetResponse) => void;
  onEnd: (set: RoundSetResponse) => void;
}

/** A tap that runs beside the one in front, with its own time and its own button. */
export function OtherTap({ yard, tap: { tapId, running, next, secondsLeft, wantedAtMs }, now, mayRun, doing, onBegin, onEnd }: Props): ReactElement {
  const name = yard.taps.find((one) => one.id === tapId)?.name ?? 'The other tap';
  const at = formatClock(minutesAt(new Date(wantedAtMs), yard.timeZone), yard.units);
  const then = next === null ? `Close ${name} at ${at}.` : running === null ? (wantedAtMs <= now.getTime() ? 'Due to start now.' : `To start at ${at}.`) : `Move its hose to ${setTitle(next, yard)} at ${at}${next.halfWay ? `, ${HALF_WAY}` : ''}.`;
  return (
    <Card padding={16} gap={8}>
      <Row justify="space-between" gap={12}>
        <Stack gap={4}>
          <Text variant="small">{`${name}, at the same time`}</Text>
          <Text variant="heading3" level={2}>{setTitle((running ?? next) as RoundSetResponse, yard)}</Text>
          <Text>{secondsLeft === null ? then : secondsLeft < 0 ? `Over its time by ${countdownText(secondsLeft)}.` : `${countdownText(secondsLeft)} left. ${then}`}</Text>
        </Stack>
        {!mayRun ? null : next ? (
          <Button label={running ? 'Hose moved' : 'Start this set'} accessibleLabel={`${running ? 'Hose moved' : 'Start this set'}, ${name}`} pending={doing === `moved ${next.id}`} onPress={() => onBegin(next)} />
        ) : running ? (
          <Button label={`${name} closed`} pending={doing === `cut_short ${running.id}`} onPress={() => onEnd(running)} />
        ) : null}
      </Row>
    </Card>
  );
}
