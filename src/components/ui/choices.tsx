import { useId } from 'react';
import type { ComponentPropsWithRef, ReactNode } from 'react';
import { FieldError } from './measured';

/** The strut of an option: thin with hollow joints, or thick with filled ones when chosen. */
function OptionStrut({ chosen }: { chosen: boolean }) {
  return (
    <svg className="option-strut" width="40" height="16" viewBox="0 0 40 16" aria-hidden="true">
      <path d={chosen ? 'M6 8H34' : 'M10 8H30'} stroke="currentColor" strokeWidth={chosen ? 4 : 1.5} />
      {[6, 34].map((x) =>
        chosen ? (
          <circle key={x} cx={x} cy="8" r="5" fill="currentColor" />
        ) : (
          <circle key={x} cx={x} cy="8" r="4" fill="none" stroke="currentColor" strokeWidth="1.5" />
        ),
      )}
    </svg>
  );
}

export type Option<V extends string> = {
  value: V;
  label: ReactNode;
  detail?: ReactNode;
  disabled?: boolean;
};

export type OptionStrutsProps<V extends string> = {
  /** The question. */
  legend: ReactNode;
  options: readonly Option<V>[];
  value: V | null;
  onChange: (value: V) => void;
  name?: string;
  columns?: 1 | 2;
  error?: string | undefined;
  hint?: ReactNode;
  required?: boolean;
  disabled?: boolean;
  /** The question is large when it is the page's matter, small above a field. */
  question?: boolean;
};

/** One answer out of several: radio buttons whose marks are struts. Arrow keys move between them. */
export function OptionStruts<V extends string>(props: OptionStrutsProps<V>) {
  const { legend, options, value, onChange, columns = 1, error, hint, question = false } = props;
  const own = useId();
  const name = props.name ?? own;
  const errorId = `${own}-error`;
  const hintId = `${own}-hint`;
  return (
    <fieldset
      className="options"
      disabled={props.disabled}
      aria-describedby={[error ? errorId : '', hint ? hintId : ''].filter(Boolean).join(' ') || undefined}
    >
      <legend className={question ? 'options-question' : 'field-label'}>{legend}</legend>
      {error && <FieldError id={errorId}>{error}</FieldError>}
      <div className="options-rows" data-columns={columns}>
        {options.map((option) => {
          const chosen = option.value === value;
          return (
            <label key={option.value} className="option" data-chosen={chosen ? '' : undefined}>
              <input
                type="radio"
                className="hidden-control"
                name={name}
                value={option.value}
                checked={chosen}
                required={props.required}
                disabled={option.disabled}
                aria-invalid={error ? true : undefined}
                onChange={() => {
                  onChange(option.value);
                }}
              />
              <OptionStrut chosen={chosen} />
              <span>
                {option.label}
                {option.detail !== undefined && <span className="option-detail">{option.detail}</span>}
              </span>
            </label>
          );
        })}
      </div>
      {hint && (
        <span className="field-hint" id={hintId}>
          {hint}
        </span>
      )}
    </fieldset>
  );
}

export type CheckFieldProps = {
  children: ReactNode;
  detail?: ReactNode;
  error?: string | undefined;
  /** Words for a box in a table, where its row already says what it is. */
  hideWords?: boolean;
} & Omit<ComponentPropsWithRef<'input'>, 'type' | 'children' | 'className'>;

/** A box of crossed lines to tick. */
export function CheckField({ children, detail, error, hideWords = false, ...input }: CheckFieldProps) {
  const own = useId();
  const errorId = `${input.id ?? own}-error`;
  return (
    <div className="check">
      <label className="check-row">
        <input
          {...input}
          type="checkbox"
          className="hidden-control"
          aria-invalid={error ? true : undefined}
          aria-describedby={error ? errorId : undefined}
        />
        <svg className="check-box" width="24" height="24" viewBox="0 0 24 24" aria-hidden="true">
          <path d="M1 5H23M1 19H23M5 1V23M19 1V23" className="check-lines" fill="none" />
          <path d="M8 12.5 11 16 17.5 7" className="check-tick" fill="none" />
        </svg>
        <span className={hideWords ? 'sr-only' : undefined}>
          {children}
          {detail !== undefined && <span className="option-detail">{detail}</span>}
        </span>
      </label>
      {error && <FieldError id={errorId}>{error}</FieldError>}
    </div>
  );
}
