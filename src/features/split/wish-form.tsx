import { useState } from 'react';
import type { FieldProblem } from '../../../shared/contracts/errors';
import type { RunView } from '../../../shared/contracts/runs';
import { DEFAULT_SPLIT_WISH, splitWishSchema, type SplitWish } from '../../../shared/contracts/split';
import { parseLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { Action } from '../../components/ui/action';
import { Field } from '../../components/ui/field';
import { Refusal } from '../../components/ui/refusal';
import { checkInput, typedNumber } from '../../lib/check-input';
import { typedLength } from '../../lib/formats';
import { useForm } from '../../lib/use-form';

type Texts = Record<
  'pieces' | 'mostStruts' | 'mostMinutes' | 'minutesPerCut' | 'minutesPerJoint' | 'mostKg' | 'x' | 'y' | 'z',
  string
>;

const textsOf = (wish: SplitWish, unit: LengthUnit): Texts => ({
  pieces: wish.pieces === null ? '' : String(wish.pieces),
  mostStruts: wish.mostStruts === null ? '' : String(wish.mostStruts),
  mostMinutes: wish.mostMinutes === null ? '' : String(wish.mostMinutes),
  minutesPerCut: String(wish.minutesPerCut),
  minutesPerJoint: String(wish.minutesPerJoint),
  mostKg: wish.mostKg === null ? '' : String(wish.mostKg),
  x: wish.box ? typedLength(wish.box.x, unit) : '',
  y: wish.box ? typedLength(wish.box.y, unit) : '',
  z: wish.box ? typedLength(wish.box.z, unit) : '',
});

const NUMBERS = [
  { key: 'pieces', label: 'pieces wanted', hint: 'Left empty: as few as the limits allow.' },
  { key: 'mostStruts', label: 'struts in a piece, at most', hint: '' },
  { key: 'mostMinutes', label: 'crew minutes in a piece, at most', hint: 'Left empty, no limit.' },
  { key: 'mostKg', label: 'mass that two may carry, kg', hint: 'What people lift is their own to say.' },
  { key: 'minutesPerCut', label: 'minutes for each strut', hint: '' },
  { key: 'minutesPerJoint', label: 'minutes for each joint', hint: '' },
] as const;

/** What pieces are wanted; starts the split. */
export function WishForm({
  installationId,
  unit,
  wish,
  keep,
  onStarted,
}: {
  installationId: string;
  unit: LengthUnit;
  wish: SplitWish | null;
  keep: readonly string[];
  onStarted: (runId: string) => void;
}) {
  const [texts, setTexts] = useState(() => textsOf(wish ?? DEFAULT_SPLIT_WISH, unit));
  const [seed, setSeed] = useState(wish?.seed ?? DEFAULT_SPLIT_WISH.seed);
  const set = (part: Partial<Texts>) => setTexts({ ...texts, ...part });
  const form = useForm<RunView>({
    request: () => {
      const problems: FieldProblem[] = [];
      const box = boxOf(texts, unit, problems);
      const number = (key: keyof Texts) => typedNumber(texts[key]) ?? null;
      const input = {
        pieces: number('pieces'),
        mostStruts: number('mostStruts'),
        mostMinutes: number('mostMinutes'),
        mostKg: number('mostKg'),
        minutesPerCut: number('minutesPerCut') ?? 0,
        minutesPerJoint: number('minutesPerJoint') ?? 0,
        box,
        keep: [...keep],
        seed,
      };
      const checked = checkInput(splitWishSchema, input, problems);
      return 'problems' in checked
        ? checked
        : { method: 'POST', path: `/installations/${installationId}/split/runs`, body: checked.body };
    },
    onDone: (run) => {
      // The next press looks for another split, not for the same one again.
      setSeed(seed + 1);
      onStarted(run.id);
    },
  });
  return (
    <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
      <Refusal error={form.error} unplaced={form.unplaced} />
      <div className="grid items-start gap-x-6 gap-y-5 sm:grid-cols-2">
        {NUMBERS.map(({ key, label, hint }) => (
          <Field
            key={key}
            label={label}
            hint={hint || undefined}
            inputMode="decimal"
            autoComplete="off"
            value={texts[key]}
            onChange={(event) => set({ [key]: event.target.value })}
            error={form.problem(key)}
          />
        ))}
      </div>
      <fieldset className="grid gap-1">
        <legend className="field-label">box it must fit: bench, door or van</legend>
        <div className="grid grid-cols-3 items-start gap-3">
          {(['x', 'y', 'z'] as const).map((axis, at) => (
            <Field
              key={axis}
              label={['long', 'wide', 'high'][at] ?? axis}
              autoComplete="off"
              value={texts[axis]}
              onChange={(event) => set({ [axis]: event.target.value })}
              error={form.problem(`box.${axis}`)}
            />
          ))}
        </div>
        <p className="text-small text-pencil">
          All three empty: no limit. A piece may be turned by quarter turns.
        </p>
      </fieldset>
      <div>
        <Action type="submit" look="main" busy={form.busy}>
          {wish ? 'Split again' : 'Split the drawing'}
        </Action>
      </div>
    </form>
  );
}

function boxOf(texts: Texts, unit: LengthUnit, problems: FieldProblem[]): SplitWish['box'] {
  const axes = ['x', 'y', 'z'] as const;
  if (axes.every((axis) => texts[axis].trim() === '')) return null;
  const read = (axis: 'x' | 'y' | 'z'): number => {
    const mm = parseLength(texts[axis], unit);
    if (mm === null)
      problems.push({
        path: `box.${axis}`,
        code: 'length',
        message: 'This is no length. Fill in all three, or none.',
      });
    return mm ?? Number.NaN;
  };
  return { x: read('x'), y: read('y'), z: read('z') };
}
