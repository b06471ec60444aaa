import type { CSSProperties, ReactElement } from 'react';
import type { FitMonthResponse } from '@/shared/contracts/fit';
import { chartWords, isShort, monthHours, monthName } from './monthFitWords';

/** Hose-hours needed over those had, a pair of bars for each month: lying on a phone, standing on a wide page. */
export function MonthBars({ months, tightestMonth }: { months: readonly FitMonthResponse[]; tightestMonth: string | null }): ReactElement {
  const most = Math.max(0.1, ...months.flatMap((month) => [month.neededHours, month.hadHours]));
  const share = (hours: number) => ({ '--share': hours / most }) as CSSProperties;
  return (
    <div className="fm-chart" role="img" aria-label={chartWords(months)}>
      <div className="fm-key" aria-hidden>
        <span><i className="fm-swatch" data-kind="water" />needed</span>
        {months.some((month) => month.doseHours > 0) ? <span><i className="fm-swatch" data-kind="doses" />for new seed</span> : null}
        <span><i className="fm-swatch" data-kind="moves" />moves</span>
        <span><i className="fm-swatch" data-kind="had" />had</span>
        {months.some(isShort) ? <span><i className="fm-swatch" data-kind="short" />lacking</span> : null}
      </div>
      <div className="fm-months" aria-hidden>
        {months.map((month) => {
          const beyond = Math.min(month.shortHours, month.neededHours);
          const doses = Math.min(month.doseHours, month.neededHours);
          const moves = Math.min(month.moveHours, month.neededHours - doses);
          return (
            <div key={month.month} className="fm-month" data-tightest={month.month === tightestMonth ? '' : undefined}>
              <span className="fm-name">{monthName(month.month).slice(0, 3)}</span>
              <span className="fm-pair">
                <span className="fm-needed" style={share(month.neededHours)}>
                  <span className="fm-part" data-kind="water" style={{ flexGrow: Math.max(0, month.neededHours - doses - moves) }} />
                  <span className="fm-part" data-kind="doses" style={{ flexGrow: doses }} />
                  <span className="fm-part" data-kind="moves" style={{ flexGrow: moves }} />
                  {beyond > 0 ? <span className="fm-short" style={{ '--short': beyond / month.neededHours } as CSSProperties} /> : null}
                </span>
                <span className="fm-had" style={share(month.hadHours)} />
              </span>
              <span className="fm-numbers">
                <span className="fm-number" data-short={isShort(month) ? '' : undefined}>{monthHours(month.neededHours)}</span>
                <span className="fm-of">{`of ${monthHours(month.hadHours)} h`}</span>
              </span>
            </div>
          );
        })}
      </div>
    </div>
  );
}
