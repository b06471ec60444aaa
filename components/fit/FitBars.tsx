import type { CSSProperties, ReactElement } from 'react';
import type { FitAnswer } from '@/scheduling/sprinkler/hoseHours';
import { hoursText } from './fitWords';

/** Hose-hours needed, water and moves, over those had. */
export function FitBars({ answer }: { answer: FitAnswer }): ReactElement {
  const most = Math.max(answer.neededHours, answer.hadHours, 0.1);
  const share = (hours: number) => ({ '--share': hours / most }) as CSSProperties;
  const moves = answer.moveHours > 0 ? `, of which ${hoursText(answer.moveHours)} are moves` : '';
  return (
    <div className="f-bars" role="img" aria-label={`Hours a week: ${hoursText(answer.neededHours)} needed${moves}; ${hoursText(answer.hadHours)} had.`}>
      <div className="f-bar-row">
        <span className="f-bar-label">{`Needed ${hoursText(answer.neededHours)} h`}{answer.fits ? null : <span className="f-short">{`${hoursText(answer.neededHours - answer.hadHours)} h short`}</span>}</span>
        <span className="f-track">
          <span className="f-bar" data-kind="water" style={share(answer.waterHours)} />
          <span className="f-bar" data-kind="moves" style={share(answer.moveHours)} />
          {answer.fits ? null : <span className="f-bar" data-kind="short" style={share(answer.neededHours - answer.hadHours)} />}
        </span>
      </div>
      <div className="f-bar-row">
        <span className="f-bar-label">{`Had ${hoursText(answer.hadHours)} h`}</span>
        <span className="f-track"><span className="f-bar" data-kind="had" style={share(answer.hadHours)} /></span>
      </div>
    </div>
  );
}
