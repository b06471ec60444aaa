import { useMemo, type ReactElement } from 'react';
import { Button } from '@/components/ui/Button';
import { NumberField } from '@/components/ui/NumberField';
import { Notice } from '@/components/ui/Notice';
import { ProgressBar } from '@/components/ui/ProgressBar';
import { Row } from '@/components/ui/Row';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatMinutes } from '@/shared/display';
import type { ReadCups } from './cupDraft';
import { runAdvice, type ExpectedRate } from './cupWords';
import type { CupForm } from './useCupForm';
import { timerText, useRunTimer } from './useRunTimer';

const spoilers = [
  'Wind: test when leaves hardly move.',
  'Anything else open: another tap, a shower, the dishwasher.',
  'Another hour than the round: pressure changes over the day.',
  'Half a sweep: let the bar finish its swing before you turn it off.',
  'Tall grass, a leaning cup, splash from a hard edge, or rain.',
  'Waiting: read at once, water evaporates.',
];

export interface CupTimerProps {
  form: CupForm;
  read: ReadCups;
  units: UnitSystem;
  expected: ExpectedRate;
  storageKey: string;
}

/** How long to run, what spoils the test, and a timer that fills in the minutes. */
export function CupTimer({ form, read, units, expected, storageKey }: CupTimerProps): ReactElement {
  const timer = useRunTimer(storageKey);
  const advice = useMemo(() => runAdvice(expected, read.reading ?? { kind: 'depth' }, units), [expected, read.reading, units]);
  const passedMinutes = timer.seconds / 60;
  const left = advice.minutes - passedMinutes;
  const stop = () => form.setValue('minutes', String(timer.stop()), { shouldDirty: true, shouldTouch: true, shouldValidate: true });
  return (
    <section className="ct-card" aria-labelledby="ct-run">
      <div className="ct-head">
        <span className="ct-step">2</span>
        <span className="ct-summary"><Text variant="heading3" level={2} id="ct-run">{advice.headline}</Text></span>
      </div>
      <Stack gap={16}>
        <Stack gap={4}>
          <Text>{advice.why}</Text>
          {advice.instead === null ? null : <Text>{advice.instead}</Text>}
        </Stack>
        <details className="ct-more">
          <summary>What spoils a test</summary>
          <ul>{spoilers.map((spoiler) => <li key={spoiler}>{spoiler}</li>)}</ul>
        </details>
        <div className="ct-timer" data-state={timer.state}>
          <span className="ct-time" role="timer" aria-label={`The water has run ${formatMinutes(passedMinutes)}`}>{timerText(timer.seconds)}</span>
          {timer.state === 'idle' ? (
            <Button kind="sun" block label="Water on: start the timer" onPress={timer.start} />
          ) : timer.state === 'running' ? (
            <>
              <ProgressBar label={left > 0 ? 'Until the cups can be read' : 'Long enough to read'} value={passedMinutes} max={advice.minutes} color="water"
                valueText={left > 0 ? `${formatMinutes(Math.ceil(left))} to go` : 'now'} />
              <Button kind="sun" block label="Water off: stop the timer" onPress={stop} />
            </>
          ) : (
            <Row>
              <Button label="Go on, I stopped too early" onPress={timer.goOn} />
              <Button kind="plain" label="Set the timer back" onPress={timer.clear} />
            </Row>
          )}
        </div>
        {timer.state === 'stopped' ? null : <Notice tone="caution">This timer wakes nobody. Set an alarm as well, so that the water does not run on.</Notice>}
        <NumberField control={form.control} name="minutes" label="Minutes it ran" unit="min" />
      </Stack>
    </section>
  );
}
