import { useState } from 'react';
import { createFrameSchema } from '../../../shared/contracts/frames';
import {
  applyFrameEdit,
  validateFrame,
  type EditedFrame,
  type Frame,
  type FrameEdit,
} from '../../../shared/frames';
import { parseLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { Action } from '../../components/ui/action';
import { Field } from '../../components/ui/field';
import { DimensionHead } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { checkInput } from '../../lib/check-input';
import { counted, typedLength } from '../../lib/formats';
import { useForm } from '../../lib/use-form';
import type { Wish } from '../../lib/use-send';
import { FramePreview } from './frame-preview';

const ROWS = 40;

/** A frame by the numbers of its joints and struts, every change to be undone. */
export function FrameTable({
  unit,
  wish,
  initial,
  onDone,
  onCancel,
}: {
  unit: LengthUnit;
  wish: Pick<Wish, 'method' | 'path'>;
  initial: { name: string; geometry: Frame; revision: number };
  onDone: () => unknown;
  onCancel: () => void;
}) {
  const [name, setName] = useState(initial.name);
  const [frame, setFrame] = useState(initial.geometry);
  const [back, setBack] = useState<readonly FrameEdit[]>([]);
  const [again, setAgain] = useState<readonly FrameEdit[]>([]);
  const [refused, setRefused] = useState<string | null>(null);
  const [page, setPage] = useState(0);

  const apply = (edit: FrameEdit): EditedFrame | null => {
    const done = applyFrameEdit(frame, edit);
    setRefused(done.ok ? null : done.refusal.message);
    if (!done.ok) return null;
    setFrame(done.value.frame);
    return done.value;
  };
  const edit = (change: FrameEdit) => {
    const done = apply(change);
    if (!done) return;
    setBack([...back, done.inverse]);
    setAgain([]);
  };
  const step = (from: readonly FrameEdit[], to: readonly FrameEdit[], undo: boolean) => {
    const change = from.at(-1);
    const done = change && apply(change);
    if (!done) return;
    const [left, added] = [from.slice(0, -1), [...to, done.inverse]];
    setBack(undo ? left : added);
    setAgain(undo ? added : left);
  };
  const form = useForm({
    request: () => {
      const checked = checkInput(createFrameSchema, {
        kind: 'table',
        name,
        geometry: frame,
        revision: initial.revision,
      });
      return 'problems' in checked ? checked : { ...wish, body: checked.body };
    },
    onDone,
  });
  const problems = validateFrame(frame);
  const pages = Math.max(1, Math.ceil(Math.max(frame.joints.length, frame.struts.length) / ROWS));
  const from = Math.min(page, pages - 1) * ROWS;
  return (
    <div className="grid gap-8">
      <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
        <Refusal error={form.error} unplaced={form.unplaced} />
        {refused !== null && <Note kind="refused" title={refused} />}
        <Field
          label="name of the frame"
          value={name}
          onChange={(event) => setName(event.target.value)}
          error={form.problem('name')}
        />
        <div className="flex flex-wrap gap-x-5 gap-y-1">
          <Action look="words" disabled={back.length === 0} onClick={() => step(back, again, true)}>
            Undo
          </Action>
          <Action look="words" disabled={again.length === 0} onClick={() => step(again, back, false)}>
            Redo
          </Action>
          {pages > 1 && (
            <>
              <Action look="words" disabled={page === 0} onClick={() => setPage(page - 1)}>
                {`Rows before ${from + 1}`}
              </Action>
              <Action look="words" disabled={page >= pages - 1} onClick={() => setPage(page + 1)}>
                {`Rows after ${from + ROWS}`}
              </Action>
            </>
          )}
        </div>
        <div className="grid items-start gap-x-10 gap-y-6 wide:grid-cols-2">
          <JointRows frame={frame} from={from} unit={unit} onEdit={edit} onRefused={setRefused} />
          <StrutRows frame={frame} from={from} onEdit={edit} onRefused={setRefused} />
        </div>
        {problems.length > 0 && (
          <Note kind="ask" title="This cannot be built as it is.">
            <ul className="grid gap-1">
              {problems.slice(0, 8).map(({ message }) => (
                <li key={message}>{message}</li>
              ))}
            </ul>
          </Note>
        )}
        <div className="flex flex-wrap items-center gap-6">
          <Action type="submit" look="main" busy={form.busy}>
            Keep it
          </Action>
          <Action look="words" onClick={onCancel}>
            Leave it
          </Action>
        </div>
      </form>
      {problems.length === 0 && <FramePreview frame={frame} unit={unit} name={name} />}
    </div>
  );
}

const NO_LENGTH =
  'is no length. Type it like 400, 40 cm or 1 1/2 in; with a minus before it where it lies before zero.';

/** A typed coordinate in mm, or null. */
function coordinate(text: string, unit: LengthUnit): number | null {
  const typed = text.trim();
  const size = parseLength(typed.startsWith('-') ? typed.slice(1) : typed, unit);
  return size === null ? null : typed.startsWith('-') ? -size : size;
}

function JointRows({
  frame,
  from,
  unit,
  onEdit,
  onRefused,
}: {
  frame: Frame;
  from: number;
  unit: LengthUnit;
  onEdit: (edit: FrameEdit) => void;
  onRefused: (words: string) => void;
}) {
  const [added, setAdded] = useState({ x: '0', y: '0', z: '0' });
  const move = (joint: number, axis: 'x' | 'y' | 'z', text: string) => {
    const at = frame.joints[joint];
    const mm = coordinate(text, unit);
    if (!at) return;
    if (mm === null) onRefused(`"${text}" ${NO_LENGTH}`);
    else if (Math.abs(mm - at[axis]) > 0.005)
      onEdit({ kind: 'move-joint', joint, to: { ...at, [axis]: mm } });
  };
  const add = () => {
    const [x, y, z] = (['x', 'y', 'z'] as const).map((axis) => coordinate(added[axis], unit));
    if (x === null || y === null || z === null || x === undefined || y === undefined || z === undefined)
      onRefused(`One of ${added.x}, ${added.y}, ${added.z} ${NO_LENGTH}`);
    else onEdit({ kind: 'add-joint', at: { x, y, z } });
  };
  return (
    <section className="grid gap-2" aria-label="Joints">
      <DimensionHead as="h3" right={counted(frame.joints.length, 'joint')}>
        Joints
      </DimensionHead>
      <table className="frame-table">
        <thead>
          <tr>
            <th scope="col">joint</th>
            {(['x', 'y', 'z'] as const).map((axis) => (
              <th key={axis} scope="col">
                {axis}
              </th>
            ))}
            <th scope="col">
              <span className="sr-only">what you can do</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {frame.joints.slice(from, from + ROWS).map((joint, row) => (
            <tr key={`${from + row}:${joint.x}:${joint.y}:${joint.z}`}>
              <th scope="row">{from + row + 1}</th>
              {(['x', 'y', 'z'] as const).map((axis) => (
                <td key={axis}>
                  <input
                    className="table-input"
                    aria-label={`joint ${from + row + 1}, ${axis}`}
                    defaultValue={typedLength(joint[axis], unit)}
                    onBlur={(event) => move(from + row, axis, event.target.value)}
                  />
                </td>
              ))}
              <td>
                <Action
                  look="words"
                  label={`Take out joint ${from + row + 1}`}
                  onClick={() => onEdit({ kind: 'delete-joint', joint: from + row })}
                >
                  Take out
                </Action>
              </td>
            </tr>
          ))}
          <tr>
            <th scope="row">new</th>
            {(['x', 'y', 'z'] as const).map((axis) => (
              <td key={axis}>
                <input
                  className="table-input"
                  aria-label={`new joint, ${axis}`}
                  value={added[axis]}
                  onChange={(event) => setAdded({ ...added, [axis]: event.target.value })}
                />
              </td>
            ))}
            <td>
              <Action look="words" onClick={add}>
                Add this joint
              </Action>
            </td>
          </tr>
        </tbody>
      </table>
    </section>
  );
}

function StrutRows({
  frame,
  from,
  onEdit,
  onRefused,
}: {
  frame: Frame;
  from: number;
  onEdit: (edit: FrameEdit) => void;
  onRefused: (words: string) => void;
}) {
  const [ends, setEnds] = useState<[string, string]>(['', '']);
  const add = () => {
    const [a, b] = ends.map((text) => Number(text.trim()) - 1);
    if (a === undefined || b === undefined || !Number.isInteger(a) || !Number.isInteger(b))
      onRefused('Give the numbers of two joints.');
    else onEdit({ kind: 'add-strut', from: a, to: b });
  };
  return (
    <section className="grid gap-2" aria-label="Struts">
      <DimensionHead as="h3" right={counted(frame.struts.length, 'strut')}>
        Struts
      </DimensionHead>
      <table className="frame-table">
        <thead>
          <tr>
            <th scope="col">strut</th>
            <th scope="col">from joint</th>
            <th scope="col">to joint</th>
            <th scope="col">
              <span className="sr-only">what you can do</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {frame.struts.slice(from, from + ROWS).map(([a, b], row) => (
            <tr key={`${from + row}:${a}:${b}`}>
              <th scope="row">{from + row + 1}</th>
              <td>{a + 1}</td>
              <td>{b + 1}</td>
              <td>
                <div className="flex flex-wrap gap-x-4">
                  <Action
                    look="words"
                    label={`Put a joint into the middle of strut ${from + row + 1}`}
                    onClick={() => onEdit({ kind: 'split-strut', strut: from + row, share: 0.5 })}
                  >
                    Halve
                  </Action>
                  <Action
                    look="words"
                    label={`Take out strut ${from + row + 1}`}
                    onClick={() => onEdit({ kind: 'delete-strut', strut: from + row })}
                  >
                    Take out
                  </Action>
                </div>
              </td>
            </tr>
          ))}
          <tr>
            <th scope="row">new</th>
            {([0, 1] as const).map((end) => (
              <td key={end}>
                <input
                  className="table-input"
                  inputMode="numeric"
                  aria-label={`new strut, ${end === 0 ? 'from' : 'to'} joint`}
                  value={ends[end]}
                  onChange={(event) =>
                    setEnds(end === 0 ? [event.target.value, ends[1]] : [ends[0], event.target.value])
                  }
                />
              </td>
            ))}
            <td>
              <Action look="words" onClick={add}>
                Add this strut
              </Action>
            </td>
          </tr>
        </tbody>
      </table>
    </section>
  );
}
