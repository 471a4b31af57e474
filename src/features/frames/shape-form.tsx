import { useDeferredValue, useMemo, useState } from 'react';
import type { Shape } from '../../../shared/frames';
import { formatLength, parseLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { Action } from '../../components/ui/action';
import { CheckField, OptionStruts } from '../../components/ui/choices';
import { Field, SelectField } from '../../components/ui/field';
import { EmptyNote } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { useForm } from '../../lib/use-form';
import type { Wish } from '../../lib/use-send';
import { FramePreview } from './frame-preview';
import {
  checkDraft,
  draftOf,
  frameOfDraft,
  measuresOf,
  SHAPES,
  type Measure,
  type ShapeDraft,
  type ShapeKind,
} from './shape-draft';

export type ShapeFormProps = {
  unit: LengthUnit;
  wish: Pick<Wish, 'method' | 'path'>;
  words: string;
  initial?: { name: string; shape: Shape };
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
      const checked = checkDraft(draft, unit);
      return 'problems' in checked ? checked : { ...wish, body: checked.body };
    },
    onDone,
  });
  const set = (part: Partial<ShapeDraft>) => setDraft({ ...draft, ...part });
  const asksBase = measuresOf(draft).some(({ key }) => key === 'sides');
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
        {asksBase && (
          <OptionStruts<ShapeDraft['baseBy']>
            legend="the base is given by"
            columns={2}
            value={draft.baseBy}
            onChange={(baseBy) => set({ baseBy })}
            error={form.problem('shape.baseBy')}
            options={[
              { value: 'edge', label: 'the length of a side' },
              { value: 'radius', label: 'its radius to the corners' },
            ]}
          />
        )}
        {draft.kind === 'antiprism' && (
          <CheckField
            checked={draft.uniform}
            onChange={(event) => set({ uniform: event.target.checked })}
            error={form.problem('shape.uniform')}
          >
            All struts of one length; the height follows
          </CheckField>
        )}
        <div className="grid grid-cols-2 items-start gap-x-6 gap-y-5 sm:grid-cols-3">
          {measuresOf(draft).map((measure) => (
            <MeasureField
              key={measure.key}
              measure={measure}
              unit={unit}
              baseBy={draft.baseBy}
              text={draft.texts[measure.key] ?? ''}
              onChange={(text) => set({ texts: { ...draft.texts, [measure.key]: text } })}
              error={form.problem(`shape.${measure.key}`)}
            />
          ))}
        </div>
        {draft.kind === 'vault-bay' && (
          <SelectField
            className="sm:w-1/2"
            label="diagonals"
            value={draft.diagonals}
            onChange={(event) => set({ diagonals: event.target.value as ShapeDraft['diagonals'] })}
            error={form.problem('shape.diagonals')}
          >
            <option value="staggered">staggered rows of triangles</option>
            <option value="alternating">alternating in each field</option>
            <option value="one-way">all one way</option>
            <option value="none">none, the fields stay open</option>
          </SelectField>
        )}
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

function MeasureField({
  measure,
  unit,
  baseBy,
  text,
  onChange,
  error,
}: {
  measure: Measure;
  unit: LengthUnit;
  baseBy: ShapeDraft['baseBy'];
  text: string;
  onChange: (text: string) => void;
  error: string | undefined;
}) {
  const isLength = measure.sort === 'length';
  const mm = isLength ? parseLength(text, unit) : null;
  // Typed in another unit, or as a fraction: say what it was read as.
  const readAs = mm !== null && /[^\d\s.,]/.test(text) ? `read as ${formatLength(mm, unit)}` : undefined;
  const label =
    measure.key === 'baseMm'
      ? baseBy === 'edge'
        ? 'side of the base'
        : 'radius of the base'
      : measure.label;
  return (
    <Field
      label={label}
      unit={isLength && readAs === undefined ? (unit === 'mm' ? 'mm' : 'in') : undefined}
      inputMode={isLength ? 'text' : 'numeric'}
      autoComplete="off"
      value={text}
      onChange={(event) => onChange(event.target.value)}
      error={error}
      hint={readAs}
    />
  );
}
