import { useDeferredValue, useMemo, useState } from 'react';
import type { Shape, ShapeField } from '../../../shared/frames';
import { formatLength, parseLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { Action } from '../../components/ui/action';
import { CheckField } from '../../components/ui/choices';
import { Field, SelectField } from '../../components/ui/field';
import { EmptyNote } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { useForm } from '../../lib/use-form';
import type { Wish } from '../../lib/use-send';
import { FramePreview } from './frame-preview';
import {
  checkDraft,
  draftOf,
  fieldsOf,
  frameOfDraft,
  SHAPES,
  valueOf,
  type ShapeDraft,
  type ShapeKind,
} from './shape-draft';

export type ShapeFormProps = {
  unit: LengthUnit;
  wish: Pick<Wish, 'method' | 'path'>;
  words: string;
  initial?: { name: string; shape: Shape; revision?: number };
  onDone: (reply: { id: string }) => unknown;
  onCancel: () => void;
};

/** A frame by its shape and measures; the drawing follows what is typed. */
export function ShapeForm({ unit, wish, words, initial, onDone, onCancel }: ShapeFormProps) {
  const [draft, setDraft] = useState<ShapeDraft>(() => draftOf(unit, initial?.name, initial?.shape));
  const drawn = useDeferredValue(draft);
  const frame = useMemo(() => frameOfDraft(drawn, unit), [drawn, unit]);
  const form = useForm<{ id: string }>({
    request: () => {
      const checked = checkDraft(draft, unit, initial?.revision);
      return 'problems' in checked ? checked : { ...wish, body: checked.body };
    },
    onDone,
  });
  const set = (part: Partial<ShapeDraft>) => setDraft({ ...draft, ...part });
  const setValue = (key: string, value: string | boolean) =>
    set({ values: { ...draft.values, [key]: value } });
  return (
    <div className="grid gap-8">
      <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
        <Refusal error={form.error} unplaced={form.unplaced} />
        <div className="grid items-start gap-x-6 gap-y-5 sm:grid-cols-2">
          <Field
            label="name of the frame"
            value={draft.name}
            onChange={(event) => set({ name: event.target.value })}
            error={form.problem('name')}
          />
          <SelectField
            label="shape"
            value={draft.kind}
            onChange={(event) => set({ kind: event.target.value as ShapeKind })}
            error={form.problem('shape.kind')}
          >
            {SHAPES.map(({ kind, label }) => (
              <option key={kind} value={kind}>
                {label}
              </option>
            ))}
          </SelectField>
        </div>
        <div className="grid grid-cols-2 items-start gap-x-6 gap-y-5 sm:grid-cols-3">
          {fieldsOf(draft).map((field) => (
            <ShapeFieldInput
              key={field.key}
              field={field}
              value={valueOf(draft, field)}
              unit={unit}
              label={labelOf(field, draft)}
              onChange={(value) => setValue(field.key, value)}
              error={form.problem(`shape.${field.key}`)}
            />
          ))}
        </div>
        <div className="flex flex-wrap items-center gap-6">
          <Action type="submit" look="main" busy={form.busy}>
            {words}
          </Action>
          <Action look="words" onClick={onCancel}>
            Leave it
          </Action>
        </div>
      </form>
      {frame ? (
        <FramePreview frame={frame} unit={unit} name={draft.name} />
      ) : (
        <EmptyNote title="Nothing to draw yet.">
          The drawing appears as soon as every measure can be built.
        </EmptyNote>
      )}
    </div>
  );
}

/** A base is called by how it is given. */
const labelOf = (field: ShapeField, draft: ShapeDraft): string =>
  field.key === 'baseMm'
    ? draft.values.baseBy === 'edge'
      ? 'side of the base'
      : 'radius of the base'
    : field.label;

function ShapeFieldInput({
  field,
  value,
  unit,
  label,
  onChange,
  error,
}: {
  field: ShapeField;
  value: string | boolean;
  unit: LengthUnit;
  label: string;
  onChange: (value: string | boolean) => void;
  error: string | undefined;
}) {
  if (field.sort === 'yes') {
    return (
      <div className="col-span-full">
        <CheckField
          checked={value === true}
          onChange={(event) => onChange(event.target.checked)}
          error={error}
        >
          {label}
        </CheckField>
      </div>
    );
  }
  const text = String(value);
  if (field.sort === 'choice') {
    return (
      <SelectField
        className="col-span-full sm:col-span-2"
        label={label}
        value={text}
        onChange={(event) => onChange(event.target.value)}
        error={error}
      >
        {field.options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </SelectField>
    );
  }
  const isLength = field.sort === 'length';
  const mm = isLength ? parseLength(text, unit) : null;
  // Typed in another unit, or as a fraction: say what it was read as.
  const readAs = mm !== null && /[^\d\s.,]/.test(text) ? `read as ${formatLength(mm, unit)}` : undefined;
  return (
    <Field
      label={label}
      unit={isLength && readAs === undefined ? UNIT_WORDS[unit] : field.sort === 'angle' ? '°' : undefined}
      inputMode={field.sort === 'count' ? 'numeric' : 'text'}
      autoComplete="off"
      value={text}
      onChange={(event) => onChange(event.target.value)}
      error={error}
      hint={readAs}
    />
  );
}

const UNIT_WORDS: Readonly<Record<LengthUnit, string>> = { mm: 'mm', inch: 'in' };
