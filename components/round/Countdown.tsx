import type { ReactElement } from 'react';
import { countdownText } from './roundView';

const radius = 132;
const around = 2 * Math.PI * radius;

export interface CountdownProps {
  secondsLeft: number;
  /** Part of the set that has passed, 0 to 1. */
  share: number;
  /** What the time runs to: 'until you move the hose'. */
  words: string;
}

/** Time left of a set as a closing ring, with overlapping discs behind it as the water falls on the lawn. */
export function Countdown({ secondsLeft, share, words }: CountdownProps): ReactElement {
  const over = secondsLeft < 0;
  const text = countdownText(secondsLeft);
  return (
    <div className="r-ring" data-over={over ? '' : undefined} role="timer" aria-label={over ? `Over by ${text}` : `${text} ${words}`}>
      <svg viewBox="0 0 300 300" aria-hidden="true">
        <g className="r-discs">
          <circle cx="128" cy="116" r="66" />
          <circle cx="196" cy="160" r="60" />
          <circle cx="122" cy="186" r="62" />
        </g>
        <circle className="r-track" cx="150" cy="150" r={radius} />
        <circle className="r-arc" cx="150" cy="150" r={radius} strokeDasharray={around} strokeDashoffset={over ? 0 : around * share} transform="rotate(-90 150 150)" />
      </svg>
      <div className="r-ring-words" aria-hidden="true">
        <span className="r-time" data-long={text.length > 5 ? '' : undefined}>{over ? `+${text}` : text}</span>
        <span className="r-until">{over ? 'over its time' : words}</span>
      </div>
    </div>
  );
}
