import { useState } from 'react';
import { placementSchema, type PlacementInput, type PlacementView } from '../../../shared/contracts/drawing';
import type { FieldProblem } from '../../../shared/contracts/errors';
import type { FrameView } from '../../../shared/contracts/frames';
import { parseLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { Action } from '../../components/ui/action';
import { CheckField } from '../../components/ui/choices';
import { Field, SelectField } from '../../components/ui/field';
import { Refusal } from '../../components/ui/refusal';
import { checkInput, typedNumber } from '../../lib/check-input';
import { typedLength } from '../../lib/formats';
import { useForm } from '../../lib/use-form';

type Kind = PlacementInput['pattern']['kind'];

interface Draft {
  frameId: string;
  name: string;
  at: Record<Axis, string>;
  turn: Record<Axis, string>;
  kind: Kind;
  count: string;
  counts: Record<Axis, string>;
  step: Record<Axis, string>;
  radius: string;
  turned: boolean;
}
type Axis = 'x' | 'y' | 'z';
const AXES: readonly Axis[] = ['x', 'y', 'z'];

const KINDS: readonly { kind: Kind; label: string }[] = [
  { kind: 'single', label: 'once' },
  { kind: 'row', label: 'in a row' },
  { kind: 'ring', label: 'round a ring' },
  { kind: 'grid', label: 'in a grid' },
];

function draftOf(unit: LengthUnit, frames: readonly FrameView[], placement?: PlacementView): Draft {
  const mm = (value: number) => typedLength(value, unit);
  const three = (point: Record<Axis, number> | undefined, words: (value: number) => string) => ({
    x: words(point?.x ?? 0),
    y: words(point?.y ?? 0),
    z: words(point?.z ?? 0),
  });
  const pattern = placement?.pattern;
  return {
    frameId: placement?.frameId ?? frames[0]?.id ?? '',
    name: placement?.name ?? '',
    at: three(placement?.at, mm),
    turn: three(placement?.turn, String),
    kind: pattern?.kind ?? 'single',
    count: pattern?.kind === 'row' || pattern?.kind === 'ring' ? String(pattern.count) : '4',
    counts: three(pattern?.kind === 'grid' ? pattern.counts : { x: 4, y: 3, z: 1 }, String),
    step: three(pattern?.kind === 'row' || pattern?.kind === 'grid' ? pattern.step : undefined, mm),
    radius: mm(pattern?.kind === 'ring' ? pattern.radius : 2000),
    turned: pattern?.kind === 'ring' ? pattern.turned : true,
  };
}

/** Lengths are typed in the installation's unit; what cannot be read is said beside its field. */
class Lengths {
  readonly problems: FieldProblem[] = [];
  constructor(private readonly unit: LengthUnit) {}

  mm(path: string, text: string): number {
    const typed = text.trim().replace(/^\u2212/, '-');
    // A place may lie before zero; a length by itself may not.
    const sign = typed.startsWith('-') ? -1 : 1;
    const size = parseLength(sign < 0 ? typed.slice(1) : typed === '' ? '0' : typed, this.unit);
    if (size !== null) return sign * size;
    this.problems.push({
      path,
      code: 'length',
      message: 'This is no length. Write it as 38, 38 mm or 1 1/2 in.',
    });
    return Number.NaN;
  }

  point(path: string, texts: Record<Axis, string>): Record<Axis, number> {
    return {
      x: this.mm(`${path}.x`, texts.x),
      y: this.mm(`${path}.y`, texts.y),
      z: this.mm(`${path}.z`, texts.z),
    };
  }
}

function inputOf(draft: Draft, unit: LengthUnit, placement?: PlacementView) {
  const lengths = new Lengths(unit);
  const numbers = (texts: Record<Axis, string>) => ({
    x: typedNumber(texts.x) ?? 0,
    y: typedNumber(texts.y) ?? 0,
    z: typedNumber(texts.z) ?? 0,
  });
  const pattern = (): unknown => {
    switch (draft.kind) {
      case 'single':
        return { kind: 'single' };
      case 'row':
        return {
          kind: 'row',
          count: typedNumber(draft.count),
          step: lengths.point('pattern.step', draft.step),
        };
      case 'ring':
        return {
          kind: 'ring',
          count: typedNumber(draft.count),
          radius: lengths.mm('pattern.radius', draft.radius),
          turned: draft.turned,
        };
      case 'grid':
        return {
          kind: 'grid',
          counts: numbers(draft.counts),
          step: lengths.point('pattern.step', draft.step),
        };
    }
  };
  const input = {
    frameId: draft.frameId,
    name: draft.name,
    at: lengths.point('at', draft.at),
    turn: numbers(draft.turn),
    pattern: pattern(),
    ...(placement ? { revision: placement.revision } : {}),
  };
  return { input, problems: lengths.problems };
}

/** Where a frame stands and how its copies are set out. */
export function PlacementForm({
  installationId,
  unit,
  frames,
  placement,
  onSaved,
  onCancel,
}: {
  installationId: string;
  unit: LengthUnit;
  frames: readonly FrameView[];
  placement?: PlacementView;
  onSaved: (id: string, body: PlacementInput) => unknown;
  onCancel: () => void;
}) {
  const [draft, setDraft] = useState(() => draftOf(unit, frames, placement));
  const set = (part: Partial<Draft>) => setDraft({ ...draft, ...part });
  const frame = frames.find(({ id }) => id === draft.frameId);
  const path = `/installations/${installationId}/placements`;
  const check = () => {
    const named = { ...draft, name: draft.name.trim() === '' ? (frame?.name ?? '') : draft.name };
    const { input, problems } = inputOf(named, unit, placement);
    return checkInput(placementSchema, input, problems);
  };
  const form = useForm<{ id: string }>({
    request: () => {
      const checked = check();
      if ('problems' in checked) return checked;
      return placement
        ? { method: 'PUT', path: `${path}/${placement.id}`, body: checked.body }
        : { method: 'POST', path, body: checked.body };
    },
    onDone: ({ id }) => {
      const checked = check();
      return 'body' in checked ? onSaved(id, checked.body) : undefined;
    },
  });
  return (
    <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
      <Refusal error={form.error} unplaced={form.unplaced} />
      <SelectField
        label="frame"
        value={draft.frameId}
        onChange={(event) => set({ frameId: event.target.value })}
        error={form.problem('frameId')}
      >
        {frames.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
      </SelectField>
      <Field
        label="name of this place"
        placeholder={frame?.name}
        value={draft.name}
        onChange={(event) => set({ name: event.target.value })}
        error={form.problem('name')}
        hint="Left empty it is the frame's."
      />
      <Three
        legend={draft.kind === 'ring' ? 'centre of the ring' : 'position'}
        path="at"
        texts={draft.at}
        onChange={(at) => set({ at })}
        problem={form.problem}
      />
      <Three
        legend="turned about, degrees"
        path="turn"
        texts={draft.turn}
        onChange={(turn) => set({ turn })}
        problem={form.problem}
      />
      <SelectField
        label="set out"
        value={draft.kind}
        onChange={(event) => set({ kind: event.target.value as Kind })}
        error={form.problem('pattern')}
      >
        {KINDS.map(({ kind, label }) => (
          <option key={kind} value={kind}>
            {label}
          </option>
        ))}
      </SelectField>
      {(draft.kind === 'row' || draft.kind === 'ring') && (
        <Field
          label="how many"
          inputMode="numeric"
          value={draft.count}
          onChange={(event) => set({ count: event.target.value })}
          error={form.problem('pattern.count')}
        />
      )}
      {draft.kind === 'grid' && (
        <Three
          legend="how many along"
          path="pattern.counts"
          texts={draft.counts}
          onChange={(counts) => set({ counts })}
          problem={form.problem}
        />
      )}
      {(draft.kind === 'row' || draft.kind === 'grid') && (
        <Three
          legend="from one to the next"
          path="pattern.step"
          texts={draft.step}
          onChange={(step) => set({ step })}
          problem={form.problem}
        />
      )}
      {draft.kind === 'ring' && (
        <>
          <Field
            label="radius"
            value={draft.radius}
            onChange={(event) => set({ radius: event.target.value })}
            error={form.problem('pattern.radius')}
          />
          <CheckField checked={draft.turned} onChange={(event) => set({ turned: event.target.checked })}>
            Each turns with the ring
          </CheckField>
        </>
      )}
      <div className="flex flex-wrap items-center gap-6">
        <Action type="submit" look="main" busy={form.busy}>
          {placement ? 'Keep it' : 'Place it'}
        </Action>
        <Action look="words" onClick={onCancel}>
          Leave it
        </Action>
      </div>
    </form>
  );
}

function Three({
  legend,
  path,
  texts,
  onChange,
  problem,
}: {
  legend: string;
  path: string;
  texts: Record<Axis, string>;
  onChange: (texts: Record<Axis, string>) => void;
  problem: (path: string) => string | undefined;
}) {
  return (
    <fieldset className="grid gap-1">
      <legend className="field-label">{legend}</legend>
      <div className="grid grid-cols-3 items-start gap-3">
        {AXES.map((axis) => (
          <Field
            key={axis}
            label={axis}
            aria-label={`${legend}, ${axis}`}
            autoComplete="off"
            value={texts[axis]}
            onChange={(event) => onChange({ ...texts, [axis]: event.target.value })}
            error={problem(`${path}.${axis}`)}
          />
        ))}
      </div>
    </fieldset>
  );
}
