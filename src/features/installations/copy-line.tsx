import { useId, useState } from 'react';
import { Action } from '../../components/ui/action';
import { Field } from '../../components/ui/field';

/** Copies a text; on plain http there is no clipboard, and the field is selected to be copied by hand. */
async function copyText(text: string, field: HTMLInputElement | null): Promise<boolean> {
  try {
    await navigator.clipboard.writeText(text);
    return true;
  } catch {
    field?.focus();
    field?.select();
    return false;
  }
}

/** An address to pass on, with the way to copy it. */
export function CopyLine({ label, text }: { label: string; text: string }) {
  const id = useId();
  const [told, setTold] = useState<'copied' | 'selected' | null>(null);
  const copy = async () => {
    const field = document.getElementById(id);
    const copied = await copyText(text, field instanceof HTMLInputElement ? field : null);
    setTold(copied ? 'copied' : 'selected');
  };
  return (
    <div className="grid gap-2">
      <Field id={id} label={label} value={text} readOnly onFocus={(event) => event.target.select()} />
      <div className="flex flex-wrap items-center gap-x-5">
        <Action look="plain" onClick={() => void copy()}>
          Copy
        </Action>
        <span role="status">
          {told === 'copied' && 'Copied.'}
          {told === 'selected' && 'It is selected: press Ctrl and C, or hold it and choose Copy.'}
        </span>
      </div>
    </div>
  );
}
