import { useState } from 'react';
import type { ReactNode } from 'react';
import { FieldError, useFieldIds } from './measured';

export type CodeFieldProps = {
  label: ReactNode;
  value: string;
  /** Gets the code as it is meant: capitals and figures only, at most `length` of them. */
  onChange: (code: string) => void;
  length?: number;
  error?: string | undefined;
  hint?: ReactNode;
  id?: string;
  name?: string;
  autoFocus?: boolean;
};

/** A code read from a poster: one cell per character, and one real input over them. */
export function CodeField({
  label,
  value,
  onChange,
  length = 6,
  error,
  hint,
  id,
  name,
  autoFocus,
}: CodeFieldProps) {
  const ids = useFieldIds(id, error, hint);
  const [focused, setFocused] = useState(false);
  const next = Math.min(value.length, length - 1);
  return (
    <div className="field">
      <label className="field-label" htmlFor={ids.fieldId}>
        {label}
      </label>
      <div className="code-cells" data-wrong={error ? '' : undefined}>
        {Array.from({ length }, (_, i) => (
          <span
            key={i}
            className="code-cell"
            data-next={focused && i === next ? '' : undefined}
            aria-hidden="true"
          >
            {value[i] ?? ''}
          </span>
        ))}
        <input
          id={ids.fieldId}
          name={name}
          className="code-input"
          type="text"
          autoCapitalize="characters"
          autoComplete="off"
          autoCorrect="off"
          spellCheck={false}
          autoFocus={autoFocus}
          value={value}
          aria-invalid={error ? true : undefined}
          aria-describedby={ids.described}
          onFocus={() => {
            setFocused(true);
          }}
          onBlur={() => {
            setFocused(false);
          }}
          onChange={(event) => {
            onChange(readCode(event.target.value, length));
          }}
        />
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

/** What a typed or pasted code means: spaces and dashes are for the eye only. */
function readCode(text: string, length: number): string {
  return text
    .toUpperCase()
    .replace(/[^A-Z0-9]/g, '')
    .slice(0, length);
}
