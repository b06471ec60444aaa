import { useEffect, useState, type ReactElement } from 'react';
import type { CupProblem } from '@/scheduling/sprinkler/cupProblems';
import type { CupTestResult } from '@/scheduling/sprinkler/cupTest';
import type { RowMove } from '@/scheduling/sprinkler/rowMove';
import { minutesForDepth } from '@/scheduling/sprinkler/runTimes';
import { NumberField } from '@/components/ui/NumberField';
import { Notice } from '@/components/ui/Notice';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { VisuallyHidden } from '@/components/ui/VisuallyHidden';
import { stoppingCupProblems } from '@/shared/contracts/catchTests';
import type { UnitSystem } from '@/shared/contracts/common';
import { cupProblemText } from '@/shared/cupProblems';
import { formatDepth, formatMinutes, formatRange, formatRate, unitLabel } from '@/shared/display';
import { CupBars } from './CupBars';
import { draftQuantity, type CupDraft, type ReadCups } from './cupDraft';
import { certaintyText, evennessWord, placesText, twoDecimals } from './cupWords';
import { MoveAdvice } from './MoveAdvice';
import type { CupForm } from './useCupForm';

export interface CupResultProps {
  form: CupForm;
  draft: CupDraft;
  read: ReadCups;
  result: CupTestResult | null;
  move: RowMove | null;
  units: UnitSystem;
}

/** A screen reader hears the result when the typing rests [ms]. */
const SAID_AFTER_MS = 1500;

function useSettled(text: string, afterMs: number): string {
  const [settled, setSettled] = useState('');
  useEffect(() => {
    const timer = setTimeout(() => setSettled(text), afterMs);
    return () => clearTimeout(timer);
  }, [text, afterMs]);
  return settled;
}

/** What to do before there is a result. */
function missingText(read: ReadCups): string {
  if (read.values.every((value) => value === null)) {
    return 'The result grows here with every cup you read.';
  }
  return read.minutes === null ? 'Give the minutes it ran, and the result stands here.' : 'Put right how the cups stand or are read, and the result stands here.';
}

function Problem({ problem, kind, columns, units }: { problem: CupProblem; kind: CupDraft['kind']; columns: number; units: UnitSystem }): ReactElement {
  const where = problem.cups.length > 0 && problem.cups.length <= 12 ? ` (${placesText(kind, columns, problem.cups)})` : '';
  return <li>{`${cupProblemText(problem, units)}${where}`}</li>;
}

/** Rate, evenness, minutes and doubts, as the cups are read. */
export function CupResult({ form, draft, read, result, move, units }: CupResultProps): ReactElement {
  const wantedDepthMm = draftQuantity(draft, 'wantedDepth', units);
  const columns = read.shape?.columns ?? 1;
  const isStopped = result?.problems.some(({ code }) => stoppingCupProblems.includes(code)) ?? false;
  const said = useSettled(result === null || isStopped || result.lowQuarterUniformity === null ? ''
    : `${formatRate(result.rateMmPerHour, units)}, low-quarter uniformity ${twoDecimals(result.lowQuarterUniformity)}`, SAID_AFTER_MS);
  const problems = result === null || result.problems.length === 0 ? null : (
    <Notice tone="caution" title={isStopped ? 'No result yet' : 'Before you trust it'}>
      <ul className="ct-problems">{result.problems.map((problem) => <Problem key={problem.code} problem={problem} kind={draft.kind} columns={columns} units={units} />)}</ul>
    </Notice>
  );
  return (
    <section className="ct-card" aria-labelledby="ct-result">
      <div className="ct-head">
        <span className="ct-step">4</span>
        <span className="ct-summary">
          <Text variant="heading3" level={2} id="ct-result">
            {result === null || isStopped || result.lowQuarterUniformity === null ? 'The result' : `${formatRate(result.rateMmPerHour, units)}, ${evennessWord(result.lowQuarterUniformity)}.`}
          </Text>
        </span>
      </div>
      <VisuallyHidden role="status">{said}</VisuallyHidden>
      <Stack gap={16}>
        {result === null ? <Text color="inkSoft">{missingText(read)}</Text> : null}
        {result === null || isStopped ? problems : (
          <>
            <Figures result={result} wantedDepthMm={wantedDepthMm} units={units} />
            <NumberField control={form.control} name="wantedDepth" label="Depth you want" unit={unitLabel('depth', units)} />
            <Text>{certaintyText(result, units)}</Text>
            {problems}
            <CupBars result={result} kind={draft.kind} columns={columns} units={units} />
            <Text>{multiplierText(result)}</Text>
            <Text color="inkSoft">For comparison: new in-ground systems are asked for 0.65; those measured in homes averaged 0.45. One position by itself always looks uneven: the grass gets the sum where neighbouring positions overlap.</Text>
            {move === null ? null : <MoveAdvice form={form} move={move} hasCurrent={draftQuantity(draft, 'moveNow', units) !== null} wantedDepthMm={wantedDepthMm} units={units} />}
          </>
        )}
      </Stack>
    </section>
  );
}

/** Why the run time is stretched by the lower half, with the low quarter beside it. */
function multiplierText({ runTimeMultiplier, lowHalfUniformity, lowQuarterMultiplier, lowQuarterUniformity }: CupTestResult): string {
  const quarter = lowQuarterUniformity === null ? '' : lowQuarterMultiplier === null
    ? ' The lowest quarter is dry: no run time reaches it.'
    : ` The lowest quarter (DUlq ${twoDecimals(lowQuarterUniformity)}) would ask for ${lowQuarterMultiplier > 10 ? 'more than ×\u00a010' : `×\u00a0${twoDecimals(lowQuarterMultiplier)}`}.`;
  const half = lowHalfUniformity === null ? '' : ` The drier half gets ${twoDecimals(lowHalfUniformity)} of the mean.`;
  return `Run time ×\u00a0${twoDecimals(runTimeMultiplier)}, from the drier half.${half}${quarter} The half decides, because stretching the time for the driest few drowns the rest and the soil spreads some water sideways.`;
}

function Figures({ result, wantedDepthMm, units }: { result: CupTestResult; wantedDepthMm: number | null; units: UnitSystem }): ReactElement {
  const [rate = ''] = formatRate(result.rateMmPerHour, units).split(' ');
  const { rateMmPerHour, runTimeMultiplier, lowQuarterUniformity, lowQuarterRange, rateRange } = result;
  const mean = wantedDepthMm === null ? null : minutesForDepth({ depthMm: wantedDepthMm, rateMmPerHour });
  const evened = wantedDepthMm === null ? null : minutesForDepth({ depthMm: wantedDepthMm, rateMmPerHour, runTimeMultiplier });
  return (
    <dl className="ct-figures">
      <div>
        <dt>{`${unitLabel('depth', units)} per hour`}</dt>
        <dd>{rate}</dd>
        <dd className="ct-range">{formatRange('rate', rateRange.low, rateRange.high, units)}</dd>
      </div>
      <div>
        <dt>low-quarter uniformity</dt>
        <dd>{lowQuarterUniformity === null ? '–' : twoDecimals(lowQuarterUniformity)}</dd>
        <dd className="ct-range">{lowQuarterRange === null ? 'one cup tells nothing of it' : `${twoDecimals(lowQuarterRange.low)} to ${twoDecimals(lowQuarterRange.high)}`}</dd>
      </div>
      <div>
        <dt>{wantedDepthMm === null ? 'for the depth you want' : `for ${formatDepth(wantedDepthMm, units)}`}</dt>
        <dd>{evened === null ? '–' : formatMinutes(evened).replace(/ (h|min)/g, '\u00a0$1')}</dd>
        <dd className="ct-range">{mean === null ? '' : `${formatMinutes(mean)} ×\u00a0${twoDecimals(runTimeMultiplier)}`}</dd>
      </div>
    </dl>
  );
}
