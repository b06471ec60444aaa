import type { ReactElement } from 'react';
import { Tag } from '@/components/ui/Tag';
import type { Reason } from '@/scheduling/planning/types';
import type { PlannedSetResponse, PlanResponse } from '@/shared/contracts/plans';
import type { WishesResponse } from '@/shared/contracts/wishes';
import type { YardResponse } from '@/shared/contracts/yards';
import { dayWord, formatCivilDay, formatClock, formatDepth, formatMinutes } from '@/shared/display';
import { gatherDoses } from '@/shared/doseGroups';
import { reasonText } from '@/shared/reasons';
import { capital, counted, HALF_WAY } from '@/shared/roundWords';
import { FixSet } from './FixSet';

type Day = PlanResponse['days'][number];

function zoneName(yard: YardResponse, zoneId: string): string {
  return yard.zones.find((zone) => zone.id === zoneId)?.name ?? 'A zone';
}

/** One day of the plan: its outings, and behind a fold the zones that get none. */
export function PlanDay({ day, yard, todayOn, locks }: { day: Day; yard: YardResponse; todayOn: string; locks: WishesResponse['locks'] }): ReactElement {
  const word = dayWord(day.on, todayOn);
  const near = word === 'today' || word === 'tomorrow';
  return (
    <li className="p-day" data-empty={day.rounds.length === 0 ? '' : undefined}>
      <h2>{near ? capital(word) : formatCivilDay(day.on, 'long')}{near ? <span className="p-date">{formatCivilDay(day.on, 'long')}</span> : null}</h2>
      <div className="p-body">
        {day.rounds.length === 0 ? <p className="p-none">No water.</p> : gatherDoses(day.rounds).map((group) => <Outing key={group[0]?.roundIndex} rounds={group} yard={yard} todayOn={todayOn} locks={locks} />)}
        {day.zonesWithout.length > 0 ? (
          <details className="p-without">
            <summary>{yard.zones.length === 1 ? 'Why none' : day.zonesWithout.length === 1 ? `Why not ${zoneName(yard, day.zonesWithout[0]?.zoneId ?? '')}` : `Why not the other ${day.zonesWithout.length}`}</summary>
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

/** One outing with its sets, or several that repeat one dose. */
function Outing({ rounds, yard, todayOn, locks }: { rounds: readonly Day['rounds'][number][]; yard: YardResponse; todayOn: string; locks: WishesResponse['locks'] }): ReactElement {
  const clock = (minutes: number) => formatClock(minutes, yard.units);
  const starts = rounds.map((round) => clock(round.startMinutes));
  const nameOf = (set: PlannedSetResponse): string => {
    const position = yard.positions.find((one) => one.id === set.positionId);
    const zone = zoneName(yard, set.zoneId);
    return position && position.name !== zone ? `${zone}, ${position.name}` : zone;
  };
  const because = (set: PlannedSetResponse) => set.reasons.map((reason) => reasonText(reason as Reason, yard.units, todayOn));
  const [first] = rounds;
  const entries = (first?.sets ?? []).map((set) => ({ set, times: rounds.length > 1 ? starts : [clock(set.startMinutes)] }));
  return (
    <ul className="p-sets" aria-label={`Outing at ${starts.join(', ')}`}>
      {entries.map(({ set, times }) => (
        // A new plan has new ids: what is open stays open with its place and time.
        <li key={`${set.positionId} ${set.startMinutes}`} data-kind={set.kind}>
          <div className="p-set">
            <span className="p-time">{times.map((time, index) => <span key={time} className="p-whole">{index > 0 ? ` · ${time}` : time}</span>)}</span>
            <span className="p-name">{nameOf(set)}</span>
            <span className="p-amount">{`${formatDepth(set.depthMm, yard.units)} · ${formatMinutes(set.minutes)}${times.length > 1 ? ' each' : ''}`}</span>
            {set.halfWay ? <Tag label={capital(HALF_WAY)} tone="water" /> : null}
            {locks.some((lock) => lock.positionId === set.positionId && lock.on === set.on && lock.startMinutes === set.startMinutes) ? <Tag label="Fixed" /> : null}
            {set.kind === 'dose' ? <Tag label={times.length > 1 ? capital(counted(times.length, 'dose')) : 'Dose'} tone="seed" /> : null}
          </div>
          <details className="p-why">
            <summary>Why</summary>
            <ul>
              {times.length > 1
                ? rounds.map((round) => round.sets.map((one) => <li key={one.id}>{`${clock(one.startMinutes)}: ${because(one).join(' ')}`}</li>))
                : because(set).map((text) => <li key={text}>{text}</li>)}
            </ul>
            {set.kind === 'set' && yard.abilities['facts.edit'] ? <FixSet yardId={yard.id} set={set} name={`${nameOf(set)} at ${clock(set.startMinutes)}`} locks={locks} /> : null}
          </details>
        </li>
      ))}
    </ul>
  );
}
