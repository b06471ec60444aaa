import type { ReactElement } from 'react';
import { Tag } from '@/components/ui/Tag';
import type { Reason } from '@/scheduling/planning/types';
import type { PlanResponse } from '@/shared/contracts/plans';
import type { YardResponse } from '@/shared/contracts/yards';
import { dayWord, formatCivilDay, formatClock, formatDepth, formatMinutes } from '@/shared/display';
import { reasonText } from '@/shared/reasons';
import { capital } from '@/shared/roundWords';

type Day = PlanResponse['days'][number];

function zoneName(yard: YardResponse, zoneId: string): string {
  return yard.zones.find((zone) => zone.id === zoneId)?.name ?? 'A zone';
}

/** One day of the plan: its outings, and behind a fold the zones that get none. */
export function PlanDay({ day, yard, todayOn }: { day: Day; yard: YardResponse; todayOn: string }): ReactElement {
  const word = dayWord(day.on, todayOn);
  const near = word === 'today' || word === 'tomorrow';
  return (
    <li className="p-day" data-empty={day.rounds.length === 0 ? '' : undefined}>
      <h2>{near ? capital(word) : formatCivilDay(day.on, 'long')}{near ? <span className="p-date">{formatCivilDay(day.on, 'long')}</span> : null}</h2>
      <div className="p-body">
        {day.rounds.length === 0 ? <p className="p-none">No water.</p> : day.rounds.map((round) => (
          <ul key={round.roundIndex} className="p-sets" aria-label={`Outing at ${formatClock(round.startMinutes, yard.units)}`}>
            {round.sets.map((set) => {
              const position = yard.positions.find((one) => one.id === set.positionId);
              const zone = zoneName(yard, set.zoneId);
              return (
                <li key={set.id} data-kind={set.kind}>
                  <div className="p-set">
                    <span className="p-time">{formatClock(set.startMinutes, yard.units)}</span>
                    <span className="p-name">{position && position.name !== zone ? `${zone}, ${position.name}` : zone}</span>
                    <span className="p-amount">{`${formatDepth(set.depthMm, yard.units)} · ${formatMinutes(set.minutes)}`}</span>
                    {set.kind === 'dose' ? <Tag label="Dose" tone="seed" /> : null}
                  </div>
                  <details className="p-why">
                    <summary>Why</summary>
                    <ul>{set.reasons.map((reason, index) => <li key={index}>{reasonText(reason as Reason, yard.units, todayOn)}</li>)}</ul>
                  </details>
                </li>
              );
            })}
          </ul>
        ))}
        {day.zonesWithout.length > 0 ? (
          <details className="p-without">
            <summary>{day.zonesWithout.length === 1 ? `Why not ${zoneName(yard, day.zonesWithout[0]?.zoneId ?? '')}` : `Why not the other ${day.zonesWithout.length}`}</summary>
            <dl>
              {day.zonesWithout.map(({ zoneId, reasons }) => (
                <div key={zoneId}>
                  <dt>{zoneName(yard, zoneId)}</dt>
                  {reasons.map((reason, index) => <dd key={index}>{reasonText(reason as Reason, yard.units, todayOn)}</dd>)}
                </div>
              ))}
            </dl>
          </details>
        ) : null}
      </div>
    </li>
  );
}
