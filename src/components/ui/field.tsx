import type { ComponentPropsWithRef, ReactNode } from 'react';
import { Measured, useFieldIds } from './measured';
import type { MeasuredFrame } from './measured';

export type FieldProps = MeasuredFrame & { unit?: ReactNode } & Omit<
    ComponentPropsWithRef<'input'>,
    'size' | 'className'
  >;

/** A measured field: what is typed stands on a base line between two ticks. */
export function Field({ label, error, hint, optional, size, unit, className, ...input }: FieldProps) {
  const ids = useFieldIds(input.id, error, hint);
  return (
    <Measured {...{ label, error, hint, optional, size, className, ids, unit }}>
      <input
        {...input}
        id={ids.fieldId}
        className="field-input"
        aria-invalid={error ? true : undefined}
        aria-describedby={ids.described}
      />
    </Measured>
  );
}

export type TextAreaProps = MeasuredFrame & Omit<ComponentPropsWithRef<'textarea'>, 'className'>;

/** A measured field of several lines. */
export function TextArea({ label, error, hint, optional, size, className, ...area }: TextAreaProps) {
  const ids = useFieldIds(area.id, error, hint);
  return (
    <Measured {...{ label, error, hint, optional, size, className, ids }}>
      <textarea
        rows={3}
        {...area}
        id={ids.fieldId}
        className="field-input"
        aria-invalid={error ? true : undefined}
        aria-describedby={ids.described}
      />
    </Measured>
  );
}

export type SelectFieldProps = MeasuredFrame & Omit<ComponentPropsWithRef<'select'>, 'size' | 'className'>;

/** A measured field with a list to choose from; its options are children, as in a `select`. */
export function SelectField({ label, error, hint, optional, size, className, ...select }: SelectFieldProps) {
  const ids = useFieldIds(select.id, error, hint);
  return (
    <Measured {...{ label, error, hint, optional, size, className, ids }}>
      <select
        {...select}
        id={ids.fieldId}
        className="field-input"
        aria-invalid={error ? true : undefined}
        aria-describedby={ids.described}
      />
      <svg className="field-caret" width="14" height="10" viewBox="0 0 14 10" aria-hidden="true">
        <path d="M1 1.5 7 8.5 13 1.5" stroke="currentColor" strokeWidth="1.5" fill="none" />
      </svg>
    </Measured>
  );
}
