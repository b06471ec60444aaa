import type { ReactElement } from 'react';
import { Tag } from '@/components/ui/Tag';
import type { Reason } from '@/scheduling/planning/types';
import type { TodayResponse } from '@/shared/contracts/rounds';
import type { PlannedSetResponse } from '@/shared/contracts/plans';
import type { YardResponse } from '@/shared/contracts/yards';
import { formatClock, formatDepth, formatMinutes } from '@/shared/display';
import { reasonText } from '@/shared/reasons';
import { skipWords } from '@/shared/skipWords';

type TodayRound = TodayResponse['rounds'][number];

const stateTags: Partial<Record<TodayRound['state'], { label: string; tone: 'hose' | 'water' | 'neutral' | 'dry' }>> = {
  running: { label: 'Running', tone: 'water' },
  done: { label: 'Done', tone: 'hose' },
  missed: { label: 'Not started', tone: 'dry' },
};

/** The day's sets and moves down a line of time. */
export function Timeline({ today, yard }: { today: TodayResponse; yard: YardResponse }): ReactElement | null {
  if (today.rounds.length === 0) {
    return null;
  }
  return (
    <section aria-labelledby="today-sets">
      <h2 id="today-sets" className="d-hidden">Sets and moves of today</h2>
      <ol className="t-line">
        {today.rounds.flatMap((round) => round.sets.flatMap((set, index) => {
          const before = round.sets[index - 1];
          const entries = [<SetEntry key={set.id} set={set} round={round} yard={yard} today={today} first={index === 0} />];
          if (before && before.positionId !== set.positionId && before.tapId === set.tapId) {
            entries.unshift(<MoveEntry key={`${set.id}-move`} from={before} to={set} yard={yard} />);
          }
          return entries;
        }))}
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
      <p>{`Move the hose to ${target?.name ?? 'the next position'}`}</p>
    </li>
  );
}

function SetEntry({ set, round, yard, today, first }: { set: PlannedSetResponse; round: TodayRound; yard: YardResponse; today: TodayResponse; first: boolean }): ReactElement {
  const position = yard.positions.find((one) => one.id === set.positionId);
  const zone = yard.zones.find((one) => one.id === set.zoneId);
  const sprinkler = yard.sprinklers.find((one) => one.id === position?.sprinklerId);
  const tag = stateTags[round.state];
  const title = zone && position && position.name !== zone.name ? `${zone.name}, ${position.name}` : position?.name ?? zone?.name ?? 'Position';
  return (
    <li className="t-set" data-past={round.state === 'done' || round.state === 'skipped' ? '' : undefined}>
      <span className="t-time">{formatClock(set.startMinutes, yard.units)}</span>
      <span className="t-dot" data-kind={set.kind} aria-hidden="true" />
      <div className="t-card" data-kind={set.kind}>
        <h3>{title}</h3>
        <p className="t-facts">{[sprinkler?.name, formatMinutes(set.minutes), formatDepth(set.depthMm, yard.units)].filter(Boolean).join(' · ')}</p>
        <details className="t-why">
          <summary>Why</summary>
          <ul>{set.reasons.map((reason, index) => <li key={index}>{reasonText(reason as Reason, yard.units, today.today)}</li>)}</ul>
        </details>
        {first && tag ? <Tag label={tag.label} tone={tag.tone} /> : null}
        {first && round.state === 'skipped' ? <Tag label={`Skipped: ${round.skipCause === null ? 'no cause given' : skipWords[round.skipCause].toLowerCase()}`} /> : null}
      </div>
    </li>
  );
}
