import type { ReactElement } from 'react';
import { Card } from '@/components/ui/Card';
import { Text } from '@/components/ui/Text';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatClock, formatMinutes } from '@/shared/display';
import { capital, HALF_WAY } from '@/shared/roundWords';
import { minutesAt } from '@/shared/time';
import { setTitle, type TapView } from './roundView';

/** What comes after the running set on this tap. `last` when no other tap has anything to do. */
export function NextCard({ yard, tap: { next, running, secondsLeft, tapId }, last }: { yard: YardResponse; tap: TapView; last: boolean }): ReactElement {
  const tap = yard.taps.find((one) => one.id === tapId);
  const clock = (instant: string) => formatClock(minutesAt(new Date(instant), yard.timeZone), yard.units);
  if (!next) {
    const name = tap?.name ?? 'this tap';
    return <CloseCard when={`Last set${last ? '' : ` of ${name}`}${running?.endsAt ? `, until ${clock(running.endsAt)}` : ''}`} what={last ? 'Then close the tap' : `Then close ${name}`} />;
  }
  const position = yard.positions.find((one) => one.id === next.positionId);
  const sprinkler = yard.sprinklers.find((one) => one.id === position?.sprinklerId);
  return (
    <Card tone="quiet" padding={16} gap={4}>
      <Text variant="small">{running?.endsAt ? `Next, ${(secondsLeft ?? 0) < 0 ? 'due since' : 'at'} ${clock(running.endsAt)}` : 'Now'}</Text>
      <Text variant="heading3" level={2}>{`Move the hose to ${setTitle(next, yard)}`}</Text>
      {position && position.mark !== '' ? <Text>{position.mark}</Text> : null}
      {next.halfWay ? <Text>{`${capital(HALF_WAY)} this time.`}</Text> : null}
      <Text variant="small">{[sprinkler?.name, tap?.name, formatMinutes(next.plannedMinutes)].filter(Boolean).join(' · ')}</Text>
    </Card>
  );
}

/** What to do at a tap with nothing left to feed. */
export function CloseCard({ when, what }: { when: string; what: string }): ReactElement {
  return (
    <Card tone="quiet" padding={16} gap={4}>
      <Text variant="small">{when}</Text>
      <Text variant="heading3" level={2}>{`${what} and leave the nozzle open`}</Text>
      <Text variant="small">Pressure left in the hose wears the backflow guard on the tap. Roll the hose off walks and steps.</Text>
    </Card>
  );
}
