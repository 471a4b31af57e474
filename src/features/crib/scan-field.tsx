import type { Ref } from 'react';
import { Field } from '../../components/ui/field';

export interface ScanFieldProps {
  label: string;
  value: string;
  onChange: (typed: string) => void;
  /** Enter was pressed, by hand or by a scanner that types. */
  onScan: () => void;
  error: string | undefined;
  hint: string | undefined;
  /** What the key of a phone says. */
  enter: 'next' | 'go';
  capitals?: boolean;
  /** Id of the datalist with what may be meant. */
  list?: string;
  ref?: Ref<HTMLInputElement>;
}

/** A field for a number: typed, or scanned by something that types the number and Enter. */
export function ScanField(props: ScanFieldProps) {
  const { label, value, onChange, onScan, error, hint, enter, capitals = false, list, ref } = props;
  return (
    <Field
      ref={ref}
      label={label}
      size="phone"
      value={value}
      list={list}
      autoComplete="off"
      autoCapitalize={capitals ? 'characters' : 'none'}
      autoCorrect="off"
      spellCheck={false}
      enterKeyHint={enter}
      error={error}
      hint={hint}
      // The next scan writes over what stands there.
      onFocus={(event) => event.target.select()}
      onChange={(event) => onChange(event.target.value)}
      onKeyDown={(event) => {
        if (event.key !== 'Enter') return;
        event.preventDefault();
        onScan();
        // The focus may have stayed: then, too, the next scan writes over.
        const field = event.currentTarget;
        if (document.activeElement === field) field.select();
      }}
    />
  );
}
