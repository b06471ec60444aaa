import { useState, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { useServerNow } from '@/components/data/now';
import { useRoundAction } from '@/components/data/useRound';
import { Button } from '@/components/ui/Button';
import { confirm } from '@/components/ui/confirm';
import { Notice } from '@/components/ui/Notice';
import { Row } from '@/components/ui/Row';
import { Screen } from '@/components/ui/Screen';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { RoundActionRequest, RoundResponse, RoundSetResponse } from '@/shared/contracts/rounds';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatClock, formatDepth, formatMinutes } from '@/shared/display';
import { HALF_WAY } from '@/shared/roundWords';
import { minutesAt } from '@/shared/time';
import { Countdown } from './Countdown';
import { CloseCard, NextCard } from './NextCard';
import { OtherTap } from './OtherTap';
import { setTitle, viewRound } from './roundView';
import { SkipNext } from './SkipNext';

interface Props {
  round: RoundResponse;
  yard: YardResponse;
  /** True while the last question to the server got no answer. */
  offline: boolean;
}

/** The countdown, what comes next, and the few things to press with wet hands. Where two taps run, the one that needs a hand first stands in front. */
export function RunningRound({ round, yard, offline }: Props): ReactElement {
  const now = useServerNow(500);
  const act = useRoundAction(yard.id, round.id);
  const [doing, setDoing] = useState<string | null>(null);
  const { taps, place, count } = viewRound(round, now);
  const [front, ...others] = taps;
  const running = front?.running ?? null;
  const next = front?.next ?? null;
  const secondsLeft = front?.secondsLeft ?? null;
  const over = (secondsLeft ?? 0) < 0;
  const mayRun = yard.abilities['round.run'] === true;
  const tapName = yard.taps.find((tap) => tap.id === front?.tapId)?.name ?? 'the tap';
  const send = (request: RoundActionRequest) => {
    setDoing(doingKey(request));
    act.mutate(request, { onSettled: () => setDoing(null) });
  };
  const begin = (set: RoundSetResponse) => send({ action: 'moved', setId: set.id });
  const end = (set: RoundSetResponse) => send({ action: 'cut_short', setId: set.id });
  const waterOff = async () => {
    const early = others.length > 0 || next !== null || (secondsLeft ?? 0) > 60;
    const sure = !early || await confirm({
      title: taps.length > 1 ? 'Are all taps closed?' : 'Is the tap closed?', body: 'The round ends here. What has run so far is recorded; sets that have not begun are left out.', confirmLabel: 'Yes, the water is off', cancelLabel: 'Not yet',
    });
    if (sure) {
      send({ action: 'water_off' });
    }
  };
  const main = next ? { label: running ? 'Hose moved' : 'Start this set', pending: doing === `moved ${next.id}`, onPress: () => begin(next) }
    : running && others.length > 0 ? { label: `${tapName} closed`, pending: doing === `cut_short ${running.id}`, onPress: () => end(running) }
    : { label: 'Water off', pending: doing === 'water_off', onPress: () => void waterOff() };
  const shown = running ?? next;
  const startedBy = round.startedBy?.name ?? 'somebody who has left';
  return (
    <Screen title="Round" headline={shown ? setTitle(shown, yard) : 'All sets are done'} width={running ? 'page' : 'form'}
      kicker={running ? `Set ${place} of ${count}${others.length > 0 ? ` · ${tapName}` : ''}` : front ? 'Between two sets' : yard.name}
      aside={running ? `${formatMinutes(running.plannedMinutes + running.addedMinutes)} · ${formatDepth(running.wantedMm, yard.units)}${running.halfWay ? ` · ${HALF_WAY}` : ''}` : undefined}>
      <div className="r-columns" data-ring={running ? '' : undefined}>
        {front && running && secondsLeft !== null ? (
          <Countdown secondsLeft={secondsLeft} share={front.share} words={next ? 'until you move the hose' : others.length > 0 ? `until you close ${tapName}` : 'until the water goes off'} />
        ) : null}
        <Stack gap={20}>
          {over ? <Notice tone="caution" title="The set has had its time" announce>{next ? 'Move the hose now, or close the tap.' : others.length > 0 ? `Close ${tapName} now.` : 'Close the tap now.'}</Notice> : null}
          {front ? <NextCard yard={yard} tap={front} last={others.length === 0} /> : <CloseCard when="No set is left" what="Close the tap" />}
          {mayRun ? (
            <div className="r-actions">
              <div className="r-main"><Button kind="sun" block {...main} /></div>
              {running ? <Button label="+10 min" accessibleLabel="+10 min on this set" pending={doing === 'add_minutes'} onPress={() => send({ action: 'add_minutes', setId: running.id })} /> : null}
            </div>
          ) : null}
          {others.map((tap) => <OtherTap key={tap.tapId} yard={yard} tap={tap} now={now} mayRun={mayRun} doing={doing} onBegin={begin} onEnd={end} />)}
          {mayRun && (next || others.length > 0) ? <Button kind="danger" block label={taps.length > 1 ? 'All water off, stop here' : 'Water off, stop here'} pending={doing === 'water_off'} onPress={() => void waterOff()} /> : null}
          {mayRun ? <Row gap={8} justify="center">
            {running && next && !over ? <Button kind="plain" label="End this set early" pending={doing === `cut_short ${running.id}`} onPress={() => end(running)} /> : null}
            {next ? <SkipNext title={setTitle(next, yard)} pending={doing === 'skip'} onSkip={(cause) => send({ action: 'skip', setId: next.id, cause })} /> : null}
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

/** Names what is being sent, so that only the button that was pressed waits: two taps have the same buttons. */
function doingKey(request: RoundActionRequest): string {
  return request.action === 'moved' || request.action === 'cut_short' ? `${request.action} ${request.setId}` : request.action;
}
