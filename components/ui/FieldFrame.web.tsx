import type { ReactElement, ReactNode } from 'react';

/** What a control needs to be tied to its label, hint and error. */
export interface ControlWiring {
  id: string;
  'aria-describedby': string | undefined;
  'aria-invalid': true | undefined;
}

export interface FieldFrameProps {
  /** DOM id of the control; the texts around it get ids made from it. */
  id: string;
  /** Always visible. */
  label: string;
  /** Help that stands under the label from the start. */
  hint?: string;
  /** Where a default comes from; shows the mark "default" beside the label and this text under the control. */
  defaultSource?: string;
  /** What is wrong and how to put it right. */
  error?: string;
  /** Shows the word "optional" beside the label. */
  optional?: boolean;
  /** Extra ids that describe the control, such as its unit. */
  describedBy?: string;
  /** `group` for several controls under one label (fieldset and legend). */
  kind?: 'single' | 'group';
  children: (wiring: ControlWiring) => ReactNode;
}

/** Label above, hint, control, error below, with every tie that assistive technology needs. All fields stand in one. */
export function FieldFrame({ id, label, hint, defaultSource, error, optional, describedBy, kind = 'single', children }: FieldFrameProps): ReactElement {
  const hintId = `${id}-hint`;
  const sourceId = `${id}-source`;
  const errorId = `${id}-error`;
  const description = [describedBy, hint && hintId, defaultSource && sourceId, error && errorId].filter(Boolean).join(' ');
  const wiring: ControlWiring = { id, 'aria-describedby': description === '' ? undefined : description, 'aria-invalid': error ? true : undefined };
  const marks = (
    <>
      {optional && <span className="d-field-mark">optional</span>}
      {defaultSource && <span className="d-field-default">default</span>}
    </>
  );
  const around = (
    <>
      {hint && <p className="d-field-hint" id={hintId}>{hint}</p>}
      {children(wiring)}
      {defaultSource && <p className="d-field-hint" id={sourceId}>Default: {defaultSource}</p>}
      {error && (
        <p className="d-field-error" id={errorId}>
          <span className="d-field-error-mark" aria-hidden="true">!</span>
          <span>{error}</span>
        </p>
      )}
    </>
  );
  if (kind === 'group') {
    return (
      <fieldset className="d-field" aria-describedby={wiring['aria-describedby']} data-invalid={error ? '' : undefined}>
        <legend className="d-field-label">{label}{marks}</legend>
        {around}
      </fieldset>
    );
  }
  return (
    <div className="d-field" data-invalid={error ? '' : undefined}>
      <div className="d-field-head">
        <label className="d-field-label" htmlFor={id}>{label}</label>
        {marks}
      </div>
      {around}
    </div>
  );
}
