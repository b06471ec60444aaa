import type { ReactElement } from 'react';
import { Tag } from '@/components/ui/Tag';
import type { Reason } from '@/scheduling/planning/types';
import type { TodayResponse } from '@/shared/contracts/rounds';
import type { PlannedSetResponse } from '@/shared/contracts/plans';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatClock, formatDepth, formatMinutes } from '@/shared/display';
import { gatherDoses } from '@/shared/doseGroups';
import { reasonText } from '@/shared/reasons';
import { capital, counted, HALF_WAY } from '@/shared/roundWords';
import { skipWords } from '@/shared/skipWords';

type TodayRound = TodayResponse['rounds'][number];

const stateTags: Partial<Record<TodayRound['state'], { label: string; tone: 'hose' | 'water' | 'neutral' | 'dry' }>> = {
  running: { label: 'Running', tone: 'water' },
  done: { label: 'Done', tone: 'hose' },
  missed: { label: 'Not started', tone: 'dry' },
};

const isPast = ({ state }: TodayRound): boolean => state === 'done' || state === 'skipped';

/** The day's sets and moves down a line of time. Doses that repeat at one position stand together with their times. */
export function Timeline({ today, yard }: { today: TodayResponse; yard: YardResponse }): ReactElement | null {
  if (today.rounds.length === 0) {
    return null;
  }
  return (
    <section aria-labelledby="today-sets">
      <h2 id="today-sets" className="d-hidden">Sets and moves of today</h2>
      <ol className="t-line">
        {gatherDoses(today.rounds).flatMap((group) => {
          const [round] = group;
          if (group.length > 1 || round === undefined) {
            return [<DosesEntry key={round?.sets[0]?.id} rounds={group} yard={yard} today={today} />];
          }
          return round.sets.flatMap((set, index) => {
            const before = round.sets[index - 1];
            const entries = [<SetEntry key={set.id} set={set} round={round} yard={yard} today={today} first={index === 0} />];
            if (before && before.positionId !== set.positionId && before.tapId === set.tapId) {
              entries.unshift(<MoveEntry key={`${set.id}-move`} from={before} to={set} yard={yard} />);
            }
            return entries;
          });
        })}
      </ol>
    </section>
  );
}

function MoveEntry({ from, to, yard }: { from: PlannedSetResponse; to: PlannedSetResponse; yard: YardResponse }): ReactElement {
  const target = yard.positions.find((position) => position.id === to.positionId);
  return (
    <li className="t-move">
      <span className="t-time" data-soft="">{formatClock(from.startMinutes + from.minutes, yard.units)}</span>
      <span className="t-dot" data-kind="move" aria-hidden="true" />
      <p>
        {`Move the hose to ${target?.name ?? 'the next position'}`}
        {target && target.mark !== '' ? <span className="t-mark">{to.halfWay ? `${target.mark}, ${HALF_WAY}` : target.mark}</span> : null}
        {to.halfWay && target?.mark === '' ? <span className="t-mark">{capital(HALF_WAY)}</span> : null}
      </p>
    </li>
  );
}

function titleOf(set: PlannedSetResponse, yard: YardResponse): string {
  const position = yard.positions.find((one) => one.id === set.positionId);
  const zone = yard.zones.find((one) => one.id === set.zoneId);
  return zone && position && position.name !== zone.name ? `${zone.name}, ${position.name}` : position?.name ?? zone?.name ?? 'Position';
}

/** Sprinkler, minutes and depth; a number and its unit never part at the end of a line. */
function Facts({ set, yard, each = '' }: { set: PlannedSetResponse; yard: YardResponse; each?: string }): ReactElement {
  const position = yard.positions.find((one) => one.id === set.positionId);
  const sprinkler = yard.sprinklers.find((one) => one.id === position?.sprinklerId);
  const facts = [set.halfWay ? capital(HALF_WAY) : undefined, sprinkler?.name, formatMinutes(set.minutes) + each, formatDepth(set.depthMm, yard.units) + each].filter((fact) => fact !== undefined);
  return (
    <p className="t-facts">
      {facts.map((fact, index) => <span key={fact}>{index > 0 ? ' · ' : ''}<span className="t-whole">{fact}</span></span>)}
    </p>
  );
}

const skipped = (round: TodayRound): string => `Skipped: ${round.skipCause === null ? 'no cause given' : skipWords[round.skipCause].toLowerCase()}`;

function SetEntry({ set, round, yard, today, first }: { set: PlannedSetResponse; round: TodayRound; yard: YardResponse; today: TodayResponse; first: boolean }): ReactElement {
  const tag = stateTags[round.state];
  return (
    <li className="t-set" data-past={isPast(round) ? '' : undefined}>
      <span className="t-time">{formatClock(set.startMinutes, yard.units)}</span>
      <span className="t-dot" data-kind={set.kind} aria-hidden="true" />
      <div className="t-card" data-kind={set.kind}>
        <h3>{titleOf(set, yard)}</h3>
        {first && tag ? <Tag label={tag.label} tone={tag.tone} /> : null}
        {first && round.state === 'skipped' ? <Tag label={skipped(round)} /> : null}
        <Facts set={set} yard={yard} />
        <details className="t-why">
          <summary>Why</summary>
          <ul>{set.reasons.map((reason, index) => <li key={index}>{reasonText(reason as Reason, yard.units, today.today)}</li>)}</ul>
        </details>
      </div>
    </li>
  );
}

function DosesEntry({ rounds, yard, today }: { rounds: readonly TodayRound[]; yard: YardResponse; today: TodayResponse }): ReactElement {
  const sets = rounds.flatMap((round) => round.sets.map((set) => ({ round, set })));
  const [first] = sets;
  if (first === undefined) {
    return <></>;
  }
  return (
    <li className="t-set" data-past={rounds.every(isPast) ? '' : undefined}>
      <span className="t-time">{formatClock(first.set.startMinutes, yard.units)}</span>
      <span className="t-dot" data-kind="dose" aria-hidden="true" />
      <div className="t-card" data-kind="dose">
        <h3>{`${titleOf(first.set, yard)}: ${counted(sets.length, 'dose')}`}</h3>
        <Facts set={first.set} yard={yard} each=" each" />
        <ul className="t-doses">
          {sets.map(({ round, set }) => {
            const tag = stateTags[round.state];
            return (
              <li key={set.id} data-past={isPast(round) ? '' : undefined}>
                <span>{formatClock(set.startMinutes, yard.units)}</span>
                {tag ? <Tag label={tag.label} tone={tag.tone} /> : null}
                {round.state === 'skipped' ? <Tag label={skipped(round)} /> : null}
              </li>
            );
          })}
        </ul>
        <details className="t-why">
          <summary>Why</summary>
          <ul>{sets.map(({ set }) => <li key={set.id}>{`${formatClock(set.startMinutes, yard.units)}: ${set.reasons.map((reason) => reasonText(reason as Reason, yard.units, today.today)).join(' ')}`}</li>)}</ul>
        </details>
      </div>
    </li>
  );
}
