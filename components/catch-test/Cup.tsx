import { memo, type ClipboardEvent, type CSSProperties, type KeyboardEvent, type ReactElement } from 'react';
import type { CupForm } from './useCupForm';

export interface CupProps {
  register: CupForm['register'];
  /** Where it stands in the form's values. */
  cellKey: string;
  place: number;
  id: string;
  name: string;
  /** Written under the disc: its distance from the sprinkler. */
  caption?: string;
  /** Depth as a share of the fullest cup, 0 to 1. */
  share: number;
  isLow: boolean;
  isWrong: boolean;
  /** More than three signs, such as '2 1/2': the disc grows sideways. */
  isLong: boolean;
  /** Ids of the texts that tell the unit, and what is wrong. */
  describedBy: string;
  lowId: string;
  onMove: (event: KeyboardEvent<HTMLInputElement>, place: number) => void;
  onPasteRow: (event: ClipboardEvent<HTMLInputElement>, place: number) => void;
}

/** One cup: a disc to write in, in a ring of water that grows with its depth. */
export const Cup = memo(function Cup({ register, cellKey, place, id, name, caption, share, isLow, isWrong, isLong, describedBy, lowId, onMove, onPasteRow }: CupProps): ReactElement {
  const style = { '--share': share } as CSSProperties;
  return (
    <label className="ct-cup" data-low={isLow ? '' : undefined} data-wrong={isWrong ? '' : undefined} data-long={isLong ? '' : undefined} style={style}>
      <span className="d-hidden">{caption === undefined ? name : `${name}, at ${caption}`}</span>
      <span className="ct-disc">
        {share > 0 ? <span className="ct-ring" aria-hidden="true" /> : null}
        <input
          {...register(`cells.${cellKey}`)}
          id={id} type="text" inputMode="decimal" enterKeyHint="next" autoComplete="off"
          aria-describedby={isLow ? `${describedBy} ${lowId}` : describedBy} aria-invalid={isWrong || undefined}
          onFocus={(event) => event.target.select()}
          onKeyDown={(event) => onMove(event, place)}
          onPaste={(event) => onPasteRow(event, place)}
        />
      </span>
      {caption === undefined ? null : <span className="ct-caption" aria-hidden="true">{caption}</span>}
    </label>
  );
});
