import { useMemo, useState } from 'react';
import { Link } from 'react-router-dom';
import type { FrameView } from '../../../shared/contracts/frames';
import type { StepRecord, SubAssemblyRecord } from '../../../shared/contracts/live';
import { renameSubAssemblySchema } from '../../../shared/contracts/travellers';
import { wireframeThumbnail } from '../../../shared/frames/flat-drawing';
import { shownState } from '../../../shared/travellers/step';
import { Action } from '../../components/ui/action';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { Field } from '../../components/ui/field';
import { Figures } from '../../components/ui/figures';
import { MarkedStick } from '../../components/ui/marked-stick';
import { Refusal } from '../../components/ui/refusal';
import { Sheet } from '../../components/ui/sheet';
import { WireSketch } from '../../components/ui/unrolled-drawing';
import { checkInput } from '../../lib/check-input';
import { counted, listed } from '../../lib/formats';
import { useForm } from '../../lib/use-form';

export type PiecesTableProps = {
  installationId: string;
  pieces: readonly SubAssemblyRecord[];
  stepsOf: ReadonlyMap<string, readonly StepRecord[]>;
  frames: readonly FrameView[];
  closed: boolean;
};

/** Every piece: code, sketch, steps, minutes. */
export function PiecesTable({ installationId, pieces, stepsOf, frames, closed }: PiecesTableProps) {
  const [renaming, setRenaming] = useState<string | null>(null);
  const sketches = useMemo(
    () => new Map(frames.map(({ id, geometry }) => [id, wireframeThumbnail(geometry, 44, 32)])),
    [frames],
  );
  const codes = new Map(pieces.map(({ id, code }) => [id, code]));
  const frameNames = new Map(frames.map(({ id, name }) => [id, name]));
  return (
    <Sheet caption="Sub-assemblies">
      <thead>
        <tr>
          <th scope="col">code</th>
          <th scope="col">
            <span className="sr-only">sketch</span>
          </th>
          <th scope="col">name</th>
          <th scope="col">frame</th>
          <th scope="col">traveller</th>
          <th scope="col" className="amount">
            planned
          </th>
          <th scope="col">
            <span className="sr-only">what you can do</span>
          </th>
        </tr>
      </thead>
      <tbody>
        {pieces.map((piece) => {
          const steps = stepsOf.get(piece.id) ?? [];
          const minutes = Math.round(steps.reduce((sum, step) => sum + step.plannedSeconds, 0) / 60);
          const path = `/installations/${installationId}/sub-assemblies/${piece.id}`;
          return (
            <tr key={piece.id}>
              <th scope="row">
                {piece.kind === 'piece' ? (
                  <Link
                    className="words-link"
                    to={`/i/${installationId}/sub-assemblies/${piece.id}/sheet`}
                    aria-label={`${piece.code}, its sheet`}
                  >
                    <Figures>{piece.code}</Figures>
                  </Link>
                ) : (
                  <Figures>{piece.code}</Figures>
                )}
              </th>
              <td>
                <WireSketch path={sketches.get(piece.frameId) ?? ''} width={44} height={32} />
              </td>
              <td>
                {renaming === piece.id ? (
                  <RenameForm piece={piece} path={path} onDone={() => setRenaming(null)} />
                ) : (
                  piece.name
                )}
              </td>
              <td data-label="frame">
                {piece.kind === 'piece'
                  ? (frameNames.get(piece.frameId) ?? '')
                  : `joins ${listed(piece.needs.map((id) => codes.get(id) ?? 'a piece'))}`}
              </td>
              <td>
                <span className="pieces-stick">
                  <MarkedStick
                    code={piece.code}
                    pitch={22}
                    height={24}
                    steps={steps.map((step) => ({ name: step.name, state: shownState(step) }))}
                  />
                </span>
              </td>
              <td className="amount" data-label="planned">
                <Figures>{`${minutes} min`}</Figures>
              </td>
              <td>
                {!closed && renaming !== piece.id && (
                  <span className="flex flex-wrap gap-x-4 desk:justify-end">
                    <Action look="words" label={`Rename ${piece.code}`} onClick={() => setRenaming(piece.id)}>
                      Rename
                    </Action>
                    <ConfirmAction
                      words="Take out"
                      look="words"
                      label={`Take out ${piece.code}`}
                      title={`Take out ${piece.code}, ${piece.name}?`}
                      confirm="Take it out"
                      wish={{ method: 'DELETE', path }}
                    >
                      <p>
                        {`Its traveller goes with it: ${counted(steps.length, 'step')}, ${minutes} minutes. `}
                        The code is not used again. A piece somebody has worked on stays.
                      </p>
                    </ConfirmAction>
                  </span>
                )}
              </td>
            </tr>
          );
        })}
      </tbody>
    </Sheet>
  );
}

function RenameForm({ piece, path, onDone }: { piece: SubAssemblyRecord; path: string; onDone: () => void }) {
  const [name, setName] = useState(piece.name);
  const form = useForm({
    request: () => {
      const checked = checkInput(renameSubAssemblySchema, { name });
      return 'problems' in checked ? checked : { method: 'PATCH', path, body: checked.body };
    },
    onDone,
  });
  return (
    <form className="grid gap-2" noValidate onSubmit={form.onSubmit}>
      <Refusal error={form.error} unplaced={form.unplaced} />
      <Field
        label={`name of ${piece.code}`}
        autoFocus
        value={name}
        onChange={(event) => setName(event.target.value)}
        error={form.problem('name')}
      />
      <span className="flex flex-wrap items-center gap-x-4">
        <Action type="submit" look="plain" busy={form.busy}>
          Keep it
        </Action>
        <Action look="words" onClick={onDone}>
          Leave it
        </Action>
      </span>
    </form>
  );
}
