import type { ReactElement } from 'react';
import { addDays, daysBetween } from '@/scheduling/units/civilDay';
import type { SeasonResponse } from '@/shared/contracts/season';
import { formatCivilDay } from '@/shared/display';
import { grassWords } from '@/shared/zoneWords';

const YEAR_DAYS = 365;

interface Bar {
  name: string;
  tone: 'seed' | 'shade' | 'water';
  windows: { fromOn: string; untilOn: string }[];
}

function barsOf({ grasses, preventer, freeze }: SeasonResponse): Bar[] {
  return [
    ...grasses.map(({ grass, sowing }): Bar => ({ name: grasses.length === 1 ? 'Overseeding' : grassWords[grass], tone: 'seed', windows: sowing })),
    { name: 'Weed preventer', tone: 'shade', windows: preventer.opensOn !== null && preventer.closesOn !== null ? [{ fromOn: preventer.opensOn, untilOn: preventer.closesOn }] : [] },
    { name: 'First freeze', tone: 'water', windows: freeze === null ? [] : [{ fromOn: freeze.earlyOn, untilOn: freeze.lateOn }] },
  ];
}

/** The windows of the coming twelve months side by side. Each is also told in words below, so the band itself is a drawing. */
export function YearBand({ season }: { season: SeasonResponse }): ReactElement {
  const { today } = season;
  const at = (on: string) => Math.min(100, Math.max(0, (100 * daysBetween(today, on)) / YEAR_DAYS));
  const months = Array.from({ length: YEAR_DAYS }, (_, index) => addDays(today, index)).filter((on) => on.endsWith('-01'));
  const bars = barsOf(season);
  const label = bars.map(({ name, windows }) => `${name}: ${windows.map(({ fromOn, untilOn }) => `${formatCivilDay(fromOn, 'dated')} to ${formatCivilDay(untilOn, 'dated')}`).join(', ') || 'none'}`).join('. ');
  return (
    <div className="y-band" role="img" aria-label={label}>
      {bars.map(({ name, tone, windows }) => (
        <div key={name} className="y-row">
          <span className="y-name">{name}</span>
          <span className="y-line">
            {windows.filter(({ fromOn }) => daysBetween(today, fromOn) < YEAR_DAYS).map(({ fromOn, untilOn }) => (
              <span key={fromOn} data-tone={tone} style={{ left: `${at(fromOn)}%`, width: `${Math.max(1, at(addDays(untilOn, 1)) - at(fromOn))}%` }} />
            ))}
          </span>
        </div>
      ))}
      <div className="y-row">
        <span className="y-name">today</span>
        <span className="y-months">{months.map((on, index) => <span key={on} data-odd={index % 2 === 1 ? '' : undefined} style={{ left: `${at(on)}%` }}>{formatCivilDay(on, 'short').slice(-3)}</span>)}</span>
      </div>
    </div>
  );
}
