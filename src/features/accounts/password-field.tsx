import { useState } from 'react';
import { Field } from '../../components/ui/field';
import { CheckField } from '../../components/ui/choices';

export type PasswordFieldProps = {
  label: string;
  value: string;
  onChange: (value: string) => void;
  autoComplete: 'current-password' | 'new-password';
  error?: string | undefined;
  /** For a new one: how long it has to be, and how to find one. */
  least?: number;
  name?: string;
};

/** Characters as people count them. */
const count = (text: string): number => Array.from(text).length;

function advice(value: string, least: number): string {
  const length = count(value);
  const rule = `At least ${least} characters, any you like, spaces too. A short sentence is easy to remember.`;
  if (length === 0) return rule;
  if (length < least) return `${length} of at least ${least} characters. ${least - length} more.`;
  return `${length} characters: long enough. Do not use it anywhere else.`;
}

/** A password that can be shown and pasted. */
export function PasswordField({
  label,
  value,
  onChange,
  autoComplete,
  error,
  least,
  name,
}: PasswordFieldProps) {
  const [shown, setShown] = useState(false);
  return (
    <div className="grid gap-1">
      <Field
        label={label}
        name={name}
        type={shown ? 'text' : 'password'}
        autoComplete={autoComplete}
        autoCapitalize="none"
        spellCheck={false}
        value={value}
        onChange={(event) => onChange(event.target.value)}
        error={error}
        hint={least === undefined ? undefined : advice(value, least)}
      />
      <CheckField checked={shown} onChange={(event) => setShown(event.target.checked)}>
        Show what I type
      </CheckField>
    </div>
  );
}
