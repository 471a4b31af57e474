import { useId } from 'react';
import type { ReactNode } from 'react';

export type MeasuredFrame = {
  label: ReactNode;
  /** What is wrong, what it means, what to do; stands beside the field. */
  error?: string | undefined;
  /** How to fill it in. */
  hint?: ReactNode;
  /** Shown after the label when the field may stay empty. */
  optional?: boolean;
  size?: 'desk' | 'phone' | 'glove';
  className?: string;
};

/** The ids that tie a field to its label, hint and error. */
export function useFieldIds(id: string | undefined, error: string | undefined, hint: ReactNode) {
  const own = useId();
  const fieldId = id ?? own;
  const errorId = `${fieldId}-error`;
  const hintId = `${fieldId}-hint`;
  const described = [error ? errorId : '', hint ? hintId : ''].filter(Boolean).join(' ') || undefined;
  return { fieldId, errorId, hintId, described };
}

/** The error of a field: two short bars as on a held step, and words. */
export function FieldError({ id, children }: { id: string; children: ReactNode }) {
  return (
    <span className="field-error" id={id}>
      <svg width="12" height="12" viewBox="0 0 12 12" aria-hidden="true">
        <path d="M0 6H12M4 1.5V10.5M8 1.5V10.5" stroke="currentColor" strokeWidth="1.6" fill="none" />
      </svg>
      <span>{children}</span>
    </span>
  );
}

type MeasuredProps = MeasuredFrame & {
  ids: ReturnType<typeof useFieldIds>;
  unit?: ReactNode;
  children: ReactNode;
};

/** Label above, base line with two end ticks, unit at the right, error and hint below. */
export function Measured({
  label,
  error,
  hint,
  optional,
  size,
  className,
  ids,
  unit,
  children,
}: MeasuredProps) {
  return (
    <div className={['field', className].filter(Boolean).join(' ')} data-size={size}>
      <label className="field-label" htmlFor={ids.fieldId}>
        {label}
        {optional && <span>, may stay empty</span>}
      </label>
      <div className="measure" data-wrong={error ? '' : undefined}>
        {children}
        {unit !== undefined && <span className="field-unit">{unit}</span>}
      </div>
      {error && <FieldError id={ids.errorId}>{error}</FieldError>}
      {hint && (
        <span className="field-hint" id={ids.hintId}>
          {hint}
        </span>
      )}
    </div>
  );
}
