import type { ReactElement } from 'react';
import type { RowMove } from '@/scheduling/sprinkler/rowMove';
import { minutesForDepth } from '@/scheduling/sprinkler/runTimes';
import { Discs } from '@/components/ui/Discs';
import { NumberField } from '@/components/ui/NumberField';
import { Text } from '@/components/ui/Text';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatDepth, formatLength, formatMinutes, unitLabel } from '@/shared/display';
import { twoDecimals } from './cupWords';
import type { CupForm } from './useCupForm';

/** A distance is the same as another within this share. */
const SAME_SHARE = 0.07;

const noneWords = {
  few_cups: 'At least three wet cups in the row tell how far to move.',
  edge_not_reached: 'The last cup is still wet: set one or two farther out, to the last wet grass. Then the row tells how far to move.',
} as const;

/** 'Move 11 ft, not 16.' */
export function moveHeadline(move: Extract<RowMove, { kind: 'found' }>, hasCurrent: boolean, units: UnitSystem): string {
  const best = formatLength(move.best.moveM, units);
  const compared = formatLength(move.compared.moveM, units);
  if (hasCurrent && Math.abs(move.best.moveM - move.compared.moveM) <= SAME_SHARE * move.best.moveM) {
    return `Move ${best}: as you do.`;
  }
  return `Move ${best}, not ${compared.replace(` ${unitLabel('length', units)}`, '')}.`;
}

export interface MoveAdviceProps {
  form: CupForm;
  move: RowMove;
  hasCurrent: boolean;
  wantedDepthMm: number | null;
  units: UnitSystem;
}

/** How far apart two positions should be, from the row added to itself. */
export function MoveAdvice({ form, move, hasCurrent, wantedDepthMm, units }: MoveAdviceProps): ReactElement {
  if (move.kind === 'none') {
    return <div className="ct-advice"><Text color="waterInk">{noneWords[move.because]}</Text></div>;
  }
  const { best, compared, reachM } = move;
  const from = hasCurrent ? `as you move now, ${formatLength(compared.moveM, units)}` : `edge to edge, ${formatLength(compared.moveM, units)}`;
  const isBetter = best.lowQuarterUniformity > compared.lowQuarterUniformity + 0.01;
  const minutes = wantedDepthMm === null ? null : minutesForDepth({ depthMm: wantedDepthMm, rateMmPerHour: best.rateMmPerHour, runTimeMultiplier: Math.min(10, best.runTimeMultiplier) });
  // Two wet circles on a drawing 100 wide, at the scale of the distance between them.
  const scale = 88 / (best.moveM + 2 * reachM);
  const discs = [50 - (best.moveM * scale) / 2, 50 + (best.moveM * scale) / 2].map((x) => ({ x, y: 24, r: Math.min(23, reachM * scale) }));
  return (
    <div className="ct-advice">
      <div className="ct-advice-head">
        <Text variant="heading3" level={3} color="waterInk">{moveHeadline(move, hasCurrent, units)}</Text>
        <Discs discs={discs} width={112} height={54} color="water" opacity={0.4} />
      </div>
      <Text color="waterInk">
        {`Positions ${formatLength(best.moveM, units)} apart in a line overlap to a low-quarter uniformity of ${twoDecimals(best.lowQuarterUniformity)}${isBetter ? `; ${from}, it is ${twoDecimals(compared.lowQuarterUniformity)}` : ''}. Water reaches ${formatLength(reachM, units)} from the sprinkler.`}
      </Text>
      {minutes === null || wantedDepthMm === null ? null : (
        <Text color="waterInk">{`${formatDepth(wantedDepthMm, units)} then takes ${formatMinutes(minutes)} at each position, with what falls from both sides.`}</Text>
      )}
      <NumberField control={form.control} name="moveNow" label="How far you move it now" unit={unitLabel('length', units)} optional />
    </div>
  );
}
