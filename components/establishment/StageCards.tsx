import type { ReactElement } from 'react';
import type { UnitSystem } from '@/shared/contracts/common';
import type { EstablishmentScheduleInput, EstablishmentStageId } from '@/shared/contracts/proposals';
import { formatClock, formatDepth } from '@/shared/display';
import { stageNames } from './stageNames';

type Doses = EstablishmentScheduleInput['stages'][number];

/** 'Each day', 'Every third day'. */
export function everyWords(everyDays: number): string {
  const ordinals: Record<number, string> = { 2: 'second', 3: 'third', 4: 'fourth', 5: 'fifth', 6: 'sixth', 7: 'seventh' };
  return everyDays === 1 ? 'Each day' : `Every ${ordinals[everyDays] ?? `${everyDays}th`} day`;
}

/** The four stages side by side with their doses. Stages that differ from `before` say what they were. */
export function StageCards({ schedule, units, currentStage, before }: {
  schedule: EstablishmentScheduleInput; units: UnitSystem; currentStage?: EstablishmentStageId; before?: EstablishmentScheduleInput;
}): ReactElement {
  return (
    <ol className="e-stages">
      {schedule.stages.map((doses, index) => {
        const earlier = before?.stages[index];
        const changed = earlier !== undefined && JSON.stringify(earlier) !== JSON.stringify(doses);
        return (
          <li key={doses.stage} data-stage={doses.stage} data-now={doses.stage === currentStage ? '' : undefined}>
            <h3>{stageNames[doses.stage]}{doses.stage === currentStage ? <span className="e-now">now</span> : null}</h3>
            <p>{everyWords(doses.everyDays)}</p>
            <p className="e-dose">{`${doses.dosesPerDay} × ${formatDepth(doses.depthMm, units)}`}</p>
            <p className="e-times">{times(doses, units)}</p>
            {changed ? <p className="e-before">{`Was ${everyWords(earlier.everyDays).toLowerCase()} ${earlier.dosesPerDay} × ${formatDepth(earlier.depthMm, units)}, ${times(earlier, units)}`}</p> : null}
          </li>
        );
      })}
    </ol>
  );
}

function times(doses: Doses, units: UnitSystem): string {
  const at = doses.timesMinutes === null ? doses.dosesPerDay === 1 ? 'by daylight' : 'spread over daylight' : doses.timesMinutes.map((minutes) => formatClock(minutes, units)).join(' · ');
  return doses.forDays === null ? at : `${at}, for ${doses.forDays} days`;
}
