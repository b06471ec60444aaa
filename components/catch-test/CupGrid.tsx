import { useCallback, useContext, type ClipboardEvent, type CSSProperties, type KeyboardEvent, type ReactElement } from 'react';
import type { FieldPath } from 'react-hook-form';
import type { CupTestResult } from '@/scheduling/sprinkler/cupTest';
import { Button } from '@/components/ui/Button';
import { Row } from '@/components/ui/Row';
import { Stack } from '@/components/ui/Stack';
import { Text } from '@/components/ui/Text';
import { fieldId, FormIdContext } from '@/components/ui/useField';
import type { UnitSystem } from '@/shared/contracts/common';
import { formatLength } from '@/shared/display';
import { cellKey, cupName, readingUnit, type CupDraft, type ReadCups } from './cupDraft';
import { pasteReadings } from './cupPaste';
import { lowQuarterText } from './cupWords';
import { Cup } from './Cup';
import type { CupForm } from './useCupForm';

export interface CupGridProps {
  form: CupForm;
  draft: CupDraft;
  read: ReadCups;
  result: CupTestResult | null;
  units: UnitSystem;
}

/** The cups as they stand, each to be written in; the lowest quarter is ringed and named. */
export function CupGrid({ form, draft, read, result, units }: CupGridProps): ReactElement {
  const formId = useContext(FormIdContext) ?? 'cups';
  const { shape, layout } = read;
  const { setValue, register, trigger } = form;
  const { kind } = draft;
  const errors = (form.formState.errors.cells ?? {}) as Record<string, { message?: string } | undefined>;
  const columns = shape?.columns ?? 1;
  const count = shape?.count ?? 0;
  const keyOf = useCallback((place: number) => cellKey({ kind }, columns, place), [kind, columns]);
  const idOf = useCallback((place: number) => fieldId(formId, `cells.${keyOf(place)}`), [formId, keyOf]);

  const onMove = useCallback((event: KeyboardEvent<HTMLInputElement>, place: number) => {
    const step = event.key === 'Enter' ? 1 : event.key === 'ArrowDown' ? columns : event.key === 'ArrowUp' ? -columns : 0;
    if (step !== 0) {
      event.preventDefault();
      document.getElementById(idOf(place + (kind === 'row' && event.key !== 'Enter' ? Math.sign(step) : step)))?.focus();
    }
  }, [columns, idOf, kind]);
  const onPasteRow = useCallback((event: ClipboardEvent<HTMLInputElement>, place: number) => {
    const pasted = pasteReadings(event.clipboardData.getData('text'), place, { rows: Math.ceil(count / columns), columns, count });
    if (pasted !== null) {
      event.preventDefault();
      let last = place;
      pasted.forEach((value, at) => {
        setValue(`cells.${keyOf(at)}`, value, { shouldDirty: true, shouldTouch: true });
        last = Math.max(last, at);
      });
      void trigger('cells');
      document.getElementById(idOf(last))?.focus();
    }
  }, [columns, count, idOf, keyOf, setValue, trigger]);

  const fullest = Math.max(0, ...read.values.map((value) => value ?? 0));
  const lowest = new Set(result !== null && result.meanMm > 0 ? result.lowQuarterCups : []);
  const wrong = Array.from({ length: count }, (_, place) => ({ place, message: errors[keyOf(place)]?.message })).filter(({ message }) => message !== undefined);
  const isByArea = kind === 'row' && draft.pattern === 'full_circle';
  const hintId = `${formId}-cups-hint`;
  const lowId = `${formId}-cups-low`;
  const wrongId = `${formId}-cups-wrong`;
  const resize = (by: number) => setValue('cups', String(count + by), { shouldDirty: true, shouldValidate: true });
  return (
    <section className="ct-card" aria-labelledby="ct-read">
      <div className="ct-head">
        <span className="ct-step">3</span>
        <span className="ct-summary"><Text variant="heading3" level={2} id="ct-read">Read the cups</Text></span>
      </div>
      <Stack gap={16}>
        <p className="ct-hint" id={hintId}>{`What each cup holds, in ${readingUnit(draft)}. Leave a cup empty that tipped or got lost.`}</p>
        <span className="d-hidden" id={lowId}>In the lowest quarter</span>
        {shape === null ? <Text role="status">The cups appear when it is clear how they stand.</Text> : (
          <div className="ct-field">
            {kind === 'row' ? <span className="ct-sprinkler">From the sprinkler</span> : null}
            <div className="ct-grid" role="group" aria-labelledby="ct-read" data-kind={kind} style={{ '--columns': columns } as CSSProperties}>
              {Array.from({ length: count }, (_, place) => (
                <Cup
                  key={keyOf(place)} register={register} cellKey={keyOf(place)} place={place} id={idOf(place)} name={cupName(kind, columns, place)}
                  caption={layout?.kind === 'row' ? formatLength(layout.firstDistanceM + place * layout.spacingM, units) : undefined}
                  share={fullest > 0 ? (read.values[place] ?? 0) / fullest : 0} isLow={lowest.has(place)} isWrong={errors[keyOf(place)] !== undefined}
                  isLong={(draft.cells[keyOf(place)] ?? '').trim().length > 3}
                  describedBy={errors[keyOf(place)] === undefined ? hintId : `${hintId} ${wrongId}`} lowId={lowId} onMove={onMove} onPasteRow={onPasteRow}
                />
              ))}
            </div>
          </div>
        )}
        {kind === 'row' && shape !== null ? (
          <Row>
            <Button size="small" label="One cup farther out" disabled={count >= 40} onPress={() => resize(1)} />
            <Button size="small" kind="plain" label="Take the last cup away" disabled={count <= 1} onPress={() => resize(-1)} />
          </Row>
        ) : null}
        {wrong.length > 0 ? (
          <ul className="ct-wrong" id={wrongId}>
            {wrong.map(({ place, message }) => (
              <li key={place}>
                <a className="d-link" data-kind="inline" href={`#${idOf(place)}`} onClick={(event) => {
                  event.preventDefault();
                  form.setFocus(`cells.${keyOf(place)}` as FieldPath<CupDraft>);
                }}>{message}</a>
              </li>
            ))}
          </ul>
        ) : null}
        {result !== null && lowest.size > 0 ? (
          <p className="ct-low"><span className="ct-low-mark" aria-hidden="true" />{lowQuarterText(kind, columns, result, isByArea)}</p>
        ) : null}
      </Stack>
    </section>
  );
}
