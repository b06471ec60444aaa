import { useEffect, useId, useState, type KeyboardEvent, type ReactElement } from 'react';
import { errorMessage } from '@/components/data/apiError';
import { usePlaces } from '@/components/data/usePlaces';
import type { Place } from '@/shared/contracts/places';

export interface PlaceFieldProps {
  chosen: Place | null;
  onChoose: (place: Place | null) => void;
  error?: string;
}

/** 'Larkspur, California, United States'. */
export function placeLabel(place: Place): string {
  return [place.name, place.region, place.country].filter((part) => part !== '').join(', ');
}

function useSettled(text: string, afterMs: number): string {
  const [settled, setSettled] = useState(text);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(text), afterMs);
    return () => clearTimeout(timer);
  }, [text, afterMs]);
  return settled;
}

/** Finds a place by name in the built-in gazetteer: a combobox as in the ARIA Authoring Practices. */
export function PlaceField({ chosen, onChoose, error }: PlaceFieldProps): ReactElement {
  const id = useId();
  const [text, setText] = useState(chosen === null ? '' : placeLabel(chosen));
  const [open, setOpen] = useState(false);
  const [active, setActive] = useState(0);
  const places = usePlaces(useSettled(chosen === null ? text : '', 200));
  const found = places.data?.places ?? [];
  const shown = open && chosen === null && found.length > 0;
  const choose = (place: Place) => {
    setText(placeLabel(place));
    setOpen(false);
    onChoose(place);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (!shown) {
      return;
    }
    if (event.key === 'ArrowDown' || event.key === 'ArrowUp') {
      event.preventDefault();
      setActive((active + (event.key === 'ArrowDown' ? 1 : found.length - 1)) % found.length);
    } else if (event.key === 'Enter') {
      const place = found[active];
      if (place) {
        event.preventDefault();
        choose(place);
      }
    } else if (event.key === 'Escape') {
      setOpen(false);
    }
  };
  const nothing = text.trim().length >= 2 && chosen === null && places.isSuccess && found.length === 0;
  const status = error ?? (places.error ? errorMessage(places.error) : nothing ? 'No place of that name. Try the next larger town.' : undefined);
  return (
    <div className="d-field">
      <label className="d-field-label" htmlFor={id}>Nearest town</label>
      <p className="d-field-hint" id={`${id}-hint`}>For weather, sun and the clock. Any town within a few miles will do.</p>
      <div className="s-place">
        <input
          id={id} className="d-input" type="text" role="combobox" autoComplete="off" aria-autocomplete="list" aria-expanded={shown} aria-controls={`${id}-list`}
          aria-activedescendant={shown ? `${id}-${active}` : undefined} aria-describedby={`${id}-hint ${id}-status`} aria-invalid={error !== undefined || undefined}
          value={text}
          onChange={(event) => {
            setText(event.target.value);
            setOpen(true);
            setActive(0);
            if (chosen !== null) {
              onChoose(null);
            }
          }}
          onFocus={() => setOpen(true)} onBlur={() => setOpen(false)} onKeyDown={onKeyDown}
        />
        {shown ? (
          <ul className="s-places" id={`${id}-list`} role="listbox" aria-label="Places">
            {found.map((place, index) => (
              // The press comes before the field loses the focus, so the list is still there.
              <li key={place.id} id={`${id}-${index}`} role="option" aria-selected={index === active} onMouseDown={(event) => { event.preventDefault(); choose(place); }}>
                {placeLabel(place)}
              </li>
            ))}
          </ul>
        ) : null}
      </div>
      <p className={error === undefined ? 'd-field-hint' : 'd-field-error'} id={`${id}-status`} role="status">{status ?? (chosen === null ? '' : `Clock: ${chosen.timeZone}`)}</p>
    </div>
  );
}
