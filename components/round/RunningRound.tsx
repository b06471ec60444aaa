import { useState, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { useServerNow } from '@/components/data/now';
import { useRoundAction } from '@/components/data/useRound';
import { Button } from '@/components/ui/Button';
import { Card } from '@/components/ui/Card';
import { confirm } from '@/components/ui/confirm';
import { Notice } from '@/components/ui/Notice';
import { Row } from '@/components/ui/Row';
import { Screen } from '@/components/ui/Screen';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { RoundActionRequest, RoundResponse } from '@/shared/contracts/rounds';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatClock, formatDepth, formatMinutes } from '@/shared/display';
import { minutesAt } from '@/shared/time';
import { Countdown } from './Countdown';
import { setTitle, viewRound } from './roundView';
import { SkipNext } from './SkipNext';

interface Props {
  round: RoundResponse;
  yard: YardResponse;
  /** True while the last question to the server got no answer. */
  offline: boolean;
}

/** The countdown, what comes next, and the few things to press with wet hands. */
export function RunningRound({ round, yard, offline }: Props): ReactElement {
  const now = useServerNow(500);
  const act = useRoundAction(yard.id, round.id);
  const [doing, setDoing] = useState<RoundActionRequest['action'] | null>(null);
  const view = viewRound(round, now);
  const mayRun = yard.abilities['round.run'] === true;
  const send = (request: RoundActionRequest) => {
    setDoing(request.action);
    act.mutate(request, { onSettled: () => setDoing(null) });
  };
  const waterOff = async () => {
    const early = view.next !== null || (view.secondsLeft ?? 0) > 60;
    const sure = !early || await confirm({
      title: 'Is the tap closed?', body: 'The round ends here. What has run so far is recorded; sets that have not begun are left out.', confirmLabel: 'Yes, the water is off', cancelLabel: 'Not yet',
    });
    if (sure) {
      send({ action: 'water_off' });
    }
  };
  const shown = view.running ?? view.next;
  const title = shown ? setTitle(shown, yard) : 'All sets are done';
  const running = view.running;
  const wanted = running ? running.plannedMinutes + running.addedMinutes : 0;
  const over = (view.secondsLeft ?? 0) < 0;
  const startedBy = round.startedBy?.name ?? 'somebody who has left';
  return (
    <Screen title="Round" headline={title} width={running ? 'page' : 'form'}
      kicker={running ? `Set ${view.place} of ${view.count}` : 'Between two sets'}
      aside={running ? `${formatMinutes(wanted)} · ${formatDepth((wanted * running.rateMmPerHour) / 60, yard.units)} on average` : undefined}>
      <div className="r-columns" data-ring={running ? '' : undefined}>
        {running && view.secondsLeft !== null ? (
          <Countdown secondsLeft={view.secondsLeft} share={view.share} words={view.next ? 'until you move the hose' : 'until the water goes off'} />
        ) : null}
        <Stack gap={20}>
          {over ? <Notice tone="caution" title="The set has had its time" announce>{view.next ? 'Move the hose now, or close the tap.' : 'Close the tap now.'}</Notice> : null}
          <NextCard round={round} yard={yard} view={view} />
          {!mayRun ? null : view.next ? (
            <div className="r-actions">
              <div className="r-main"><Button kind="sun" block label={running ? 'Hose moved' : 'Start this set'} pending={doing === 'moved'} onPress={() => send({ action: 'moved', setId: view.next?.id ?? '' })} /></div>
              {running ? <Button label="+10 min" accessibleLabel="+10 min on this set" pending={doing === 'add_minutes'} onPress={() => send({ action: 'add_minutes', setId: running.id })} /> : null}
            </div>
          ) : (
            <div className="r-actions">
              <div className="r-main"><Button kind="sun" block label="Water off" pending={doing === 'water_off'} onPress={() => void waterOff()} /></div>
              {running ? <Button label="+10 min" accessibleLabel="+10 min on this set" pending={doing === 'add_minutes'} onPress={() => send({ action: 'add_minutes', setId: running.id })} /> : null}
            </div>
          )}
          {mayRun && view.next ? <Button kind="danger" block label="Water off, stop here" pending={doing === 'water_off'} onPress={() => void waterOff()} /> : null}
          {mayRun ? <Row gap={8} justify="center">
            {running && view.next && !over ? <Button kind="plain" label="End this set early" pending={doing === 'cut_short'} onPress={() => send({ action: 'cut_short', setId: running.id })} /> : null}
            {view.next ? <SkipNext title={setTitle(view.next, yard)} pending={doing === 'skip'} onSkip={(cause) => send({ action: 'skip', setId: view.next?.id ?? '', cause })} /> : null}
          </Row> : null}
          {act.error ? <Notice tone="problem" title="That did not go through">{`${errorMessage(act.error)} The countdown runs on; press again.`}</Notice> : null}
          <Text variant="small" align="center">
            {offline ? 'No connection just now. The countdown goes on from what was last known.'
              : yard.preferences.wantsMoveEmail ? 'An e-mail comes when the set has had its time. The round ends when somebody says that the water is off.'
                : 'The round ends when somebody says that the water is off.'}
          </Text>
          <Text variant="small" align="center">{`Started by ${startedBy} at ${formatClock(minutesAt(new Date(round.startedAt), yard.timeZone), yard.units)}.`}</Text>
        </Stack>
      </div>
    </Screen>
  );
}

function NextCard({ yard, view }: { round: RoundResponse; yard: YardResponse; view: ReturnType<typeof viewRound> }): ReactElement | null {
  const { next, running } = view;
  if (!next) {
    return (
      <Card tone="quiet" padding={16} gap={4}>
        <Text variant="small">{running?.endsAt ? `Last set, until ${formatClock(minutesAt(new Date(running.endsAt), yard.timeZone), yard.units)}` : 'Last set'}</Text>
        <Text variant="heading3" level={2}>Then close the tap and leave the nozzle open</Text>
        <Text variant="small">Pressure left in the hose wears the backflow guard on the tap. Roll the hose off walks and steps.</Text>
      </Card>
    );
  }
  const position = yard.positions.find((one) => one.id === next.positionId);
  const sprinkler = yard.sprinklers.find((one) => one.id === position?.sprinklerId);
  const tap = yard.taps.find((one) => one.id === position?.tapId);
  const tapBefore = yard.taps.find((one) => one.id === running?.tapId);
  const otherTap = tapBefore !== undefined && tapBefore.id !== next.tapId;
  return (
    <Card tone="quiet" padding={16} gap={4}>
      <Text variant="small">{running?.endsAt ? `Next, ${(view.secondsLeft ?? 0) < 0 ? 'due since' : 'at'} ${formatClock(minutesAt(new Date(running.endsAt), yard.timeZone), yard.units)}` : 'Now'}</Text>
      <Text variant="heading3" level={2}>{otherTap ? `Close ${tapBefore.name}, then open ${tap?.name ?? 'the other tap'} for ${setTitle(next, yard)}` : `Move the hose to ${setTitle(next, yard)}`}</Text>
      {position && position.mark !== '' ? <Text>{position.mark}</Text> : null}
      <Text variant="small">{[sprinkler?.name, tap?.name, formatMinutes(next.plannedMinutes)].filter(Boolean).join(' · ')}</Text>
    </Card>
  );
}
