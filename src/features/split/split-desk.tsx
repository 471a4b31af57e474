import { useEffect, useMemo, useState } from 'react';
import type { RunView } from '../../../shared/contracts/runs';
import type { SplitPlan, SplitView } from '../../../shared/contracts/split';
import type { JoinedDrawing } from '../../../shared/frames';
import { formatLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { SpaceView } from '../../components/space/space-view';
import { Action } from '../../components/ui/action';
import { CheckField } from '../../components/ui/choices';
import { SelectField } from '../../components/ui/field';
import { DimensionHead } from '../../components/ui/heads';
import { EmptyNote, Note } from '../../components/ui/note';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { useDrawing, useJoinedDrawing } from '../../lib/drawing';
import { counted } from '../../lib/formats';
import { useSend } from '../../lib/use-send';
import { dashOf, PieceMark } from './piece-mark';
import { isUnderWay, useReloadSplits, useRun, useSplits } from './queries';
import { TakeForm } from './take-form';
import { WishForm } from './wish-form';

/** The split of the drawing: ask for it, look at it, change it by hand, make travellers of it. */
export function SplitDesk({ installationId, unit }: { installationId: string; unit: LengthUnit }) {
  const splits = useSplits(installationId);
  const drawing = useDrawing(installationId);
  const joined = useJoinedDrawing(installationId, drawing.data);
  const reload = useReloadSplits(installationId);
  const [runId, setRunId] = useState<string | null>(null);
  const [keep, setKeep] = useState<readonly string[]>([]);
  const [taken, setTaken] = useState('');
  const run = useRun(installationId, runId);
  const ended = run.data && !isUnderWay(run.data) ? run.data.id : null;
  useEffect(() => {
    if (ended !== null) void reload();
    // Once for each run that ends; `reload` is another function on every render.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [ended]);
  if (splits.error ?? drawing.error) return <Refusal error={splits.error ?? drawing.error} />;
  if (!splits.data || !drawing.data) return <Pending />;
  const { proposed } = splits.data;
  const shown = proposed ?? splits.data.taken;
  if (drawing.data.placements.length === 0) {
    return (
      <EmptyNote title="Nothing stands in the drawing yet.">
        <p className="mb-2">Place frames first; then they can be split into pieces.</p>
        <Action to={`/i/${installationId}/drawing?show=placed`}>Draw</Action>
      </EmptyNote>
    );
  }
  const busy = isUnderWay(run.data);
  return (
    <div className="grid gap-8">
      {taken !== '' && (
        <Note kind="done" title="The travellers are made.">
          {taken}
        </Note>
      )}
      {run.data && (
        <RunLine installationId={installationId} run={run.data} onStopped={() => void run.refetch()} />
      )}
      <div className="with-side">
        <div className="min-w-0">
          {shown && joined ? (
            <Shown
              key={shown.id}
              installationId={installationId}
              split={shown}
              joined={joined}
              unit={unit}
              keep={keep}
              onKeep={setKeep}
              onChanged={reload}
            />
          ) : (
            <EmptyNote title="Not split yet.">
              Say what a crew can build and carry, and the drawing is cut into such pieces.
            </EmptyNote>
          )}
        </div>
        <div className="grid content-start gap-8">
          <section className="grid gap-4" aria-labelledby="wish">
            <DimensionHead
              id="wish"
              right={keep.length > 0 ? `${counted(keep.length, 'piece')} kept` : undefined}
            >
              What a piece may be
            </DimensionHead>
            {!busy && (
              <WishForm
                installationId={installationId}
                unit={unit}
                wish={shown?.wish ?? null}
                keep={proposed ? keep : []}
                onStarted={(id) => {
                  setTaken('');
                  setRunId(id);
                }}
              />
            )}
          </section>
          {proposed && !busy && (
            <section className="grid gap-4" aria-labelledby="take">
              <DimensionHead id="take">Make travellers</DimensionHead>
              <TakeForm
                key={proposed.revision}
                installationId={installationId}
                split={proposed}
                onTaken={async (words) => {
                  setTaken(words);
                  setKeep([]);
                  setRunId(null);
                  await reload();
                }}
              />
            </section>
          )}
        </div>
      </div>
    </div>
  );
}

function RunLine({
  installationId,
  run,
  onStopped,
}: {
  installationId: string;
  run: RunView;
  onStopped: () => void;
}) {
  const stop = useSend(onStopped);
  if (run.status === 'failed') {
    return (
      <Note kind="refused" title="The drawing was not split.">
        {run.problem?.message}
      </Note>
    );
  }
  if (run.status === 'stopped') {
    return (
      <Note kind="ask" title="Stopped.">
        {run.result === null ? 'There was nothing to keep yet.' : 'The best so far is shown.'}
      </Note>
    );
  }
  if (run.status === 'done') return null;
  return (
    <div className="grid gap-2">
      <div className="flex flex-wrap items-center gap-x-6 gap-y-2">
        <progress className="run-progress" max={1} value={run.share} aria-label="how far the split is" />
        <span role="status">{`${Math.round(run.share * 100)} %, ${run.note || 'starting'}`}</span>
        <Action
          look="words"
          busy={stop.isPending}
          disabled={run.status === 'stopping'}
          onClick={() =>
            stop.mutate({ method: 'DELETE', path: `/installations/${installationId}/runs/${run.id}` })
          }
        >
          Stop
        </Action>
      </div>
      <Refusal error={stop.error} />
    </div>
  );
}

function Shown({
  installationId,
  split,
  joined,
  unit,
  keep,
  onKeep,
  onChanged,
}: {
  installationId: string;
  split: SplitView;
  joined: JoinedDrawing;
  unit: LengthUnit;
  keep: readonly string[];
  onKeep: (keep: readonly string[]) => void;
  onChanged: () => unknown;
}) {
  const { plan } = split;
  const [selected, setSelected] = useState<ReadonlySet<number>>(new Set());
  const [only, setOnly] = useState<string | null>(null);
  const [to, setTo] = useState('');
  const move = useSend(async () => {
    setSelected(new Set());
    await onChanged();
  });
  const index = useMemo(() => indexOf(plan), [plan]);
  const look = useMemo(
    () => (strut: number) => {
      const piece = index.pieceOf[strut];
      return {
        colour: piece?.mark.colour ?? 'pencil',
        dash: piece ? dashOf(piece.mark) : [],
        faint: only !== null && piece?.key !== only,
      };
    },
    [index, only],
  );
  const labels = useMemo(
    () =>
      plan.pieces
        .filter((piece) => only === null || piece.key === only)
        .map((piece) => ({
          at: middleOf(piece.joints.map((joint) => joined.frame.joints[joint])),
          text: piece.mark.letter,
          colour: piece.mark.colour,
        })),
    [plan, joined, only],
  );
  const fits = joined.frame.struts.length === plan.struts.length;
  const editable = split.status === 'proposed' && !split.outOfDate;
  const words = (strut: number) => {
    const [a = 0, b = 0] = joined.frame.struts[strut] ?? [];
    return `strut ${strut + 1}, joints ${a + 1} to ${b + 1}, piece ${index.pieceOf[strut]?.mark.letter ?? ''}`;
  };
  return (
    <section className="grid gap-6" aria-labelledby="proposal">
      <DimensionHead id="proposal" right={figureWords(plan)}>
        {split.status === 'proposed' ? 'The proposal' : 'The split as it was taken'}
      </DimensionHead>
      {split.outOfDate && (
        <Note kind="ask" title="The drawing has changed since.">
          Split it again. Pieces on which work has begun stay as they are.
        </Note>
      )}
      {plan.notes.map((note) => (
        <Note key={note} kind="ask" title="Look at this.">
          {note}
        </Note>
      ))}
      {fits && (
        <SpaceView
          joints={joined.frame.joints}
          struts={joined.frame.struts}
          label={`The drawing in ${counted(plan.pieces.length, 'piece')}`}
          look={look}
          labels={labels}
          numbers={only === null ? 'none' : 'struts'}
          selected={selected}
          {...(editable ? { onSelect: setSelected } : {})}
          describe={words}
        />
      )}
      {editable && selected.size > 0 && (
        <div className="grid gap-3">
          <div className="flex flex-wrap items-end gap-4">
            <SelectField
              label={`${counted(selected.size, 'strut')} chosen, to`}
              value={to}
              onChange={(event) => setTo(event.target.value)}
            >
              <option value="">a piece of their own</option>
              {plan.pieces.map((piece) => (
                <option key={piece.key} value={piece.key}>
                  {`piece ${piece.mark.letter}`}
                </option>
              ))}
            </SelectField>
            <Action
              busy={move.isPending}
              onClick={() =>
                move.mutate({
                  method: 'POST',
                  path: `/installations/${installationId}/split/move`,
                  body: { struts: [...selected], to: to === '' ? null : to, revision: split.revision },
                })
              }
            >
              Move them
            </Action>
          </div>
        </div>
      )}
      <Refusal error={move.error} />
      <PieceList
        plan={plan}
        unit={unit}
        only={only}
        onOnly={setOnly}
        {...(editable ? { keep, onKeep } : {})}
      />
    </section>
  );
}

function PieceList({
  plan,
  unit,
  only,
  onOnly,
  keep,
  onKeep,
}: {
  plan: SplitPlan;
  unit: LengthUnit;
  only: string | null;
  onOnly: (key: string | null) => void;
  keep?: readonly string[];
  onKeep?: (keep: readonly string[]) => void;
}) {
  return (
    <div className="relative overflow-x-auto" role="region" aria-label="The pieces" tabIndex={0}>
      <table className="split-pieces">
        <thead>
          <tr>
            <th scope="col">piece</th>
            <th scope="col">struts</th>
            <th scope="col">minutes</th>
            <th scope="col">mass</th>
            <th scope="col">size</th>
            <th scope="col">alike</th>
            <th scope="col">stiff</th>
            {keep && <th scope="col">when split again</th>}
          </tr>
        </thead>
        <tbody>
          {plan.pieces.map((piece) => {
            return (
              <tr key={piece.key}>
                <th scope="row">
                  <Action
                    look="words"
                    label={only === piece.key ? 'Show all pieces' : `Show piece ${piece.mark.letter} alone`}
                    onClick={() => onOnly(only === piece.key ? null : piece.key)}
                  >
                    <PieceMark mark={piece.mark} />
                  </Action>
                </th>
                <td>{piece.struts.length}</td>
                <td>{Math.round(piece.minutes)}</td>
                <td>{`${piece.massKg.toFixed(1)} kg`}</td>
                <td>{sizeWords(piece.sizeMm, unit)}</td>
                <td>{alikeWords(plan, piece)}</td>
                <td>{piece.mechanisms === 0 ? 'yes' : `moves ${counted(piece.mechanisms, 'way')}`}</td>
                {keep && onKeep && (
                  <td>
                    <CheckField
                      checked={keep.includes(piece.key)}
                      onChange={(event) =>
                        onKeep(
                          event.target.checked
                            ? [...keep, piece.key]
                            : keep.filter((key) => key !== piece.key),
                        )
                      }
                    >
                      keep
                    </CheckField>
                  </td>
                )}
              </tr>
            );
          })}
        </tbody>
      </table>
      <p className="text-small text-pencil">
        Stiff as a model with pins at the joints. Glue that is still warm lets a piece move that the model
        calls stiff; brace it until it has cooled, and a piece that moves until it hangs.
      </p>
    </div>
  );
}

/** Which pieces are made from one drawing: the first of them says how many, the others name it. */
function alikeWords(plan: SplitPlan, piece: SplitPlan['pieces'][number]): string {
  const alike = plan.pieces.filter((other) => other.group === piece.group);
  const [first] = alike;
  if (!first || alike.length === 1) return 'the only one';
  const hand = piece.hand ? `, ${piece.hand} hand` : '';
  return first.key === piece.key
    ? `${alike.length - 1} more like it${hand}`
    : `as ${first.mark.letter}${hand}`;
}

/** Three sides with the unit once. */
const sizeWords = (sides: readonly number[], unit: LengthUnit): string =>
  unit === 'mm'
    ? `${sides.map((side) => formatLength(side, 'mm').replace(' mm', '')).join(' × ')} mm`
    : sides.map((side) => formatLength(side, unit)).join(' × ');

function indexOf(plan: SplitPlan) {
  const pieceOf: (SplitPlan['pieces'][number] | undefined)[] = [];
  for (const piece of plan.pieces) for (const strut of piece.struts) pieceOf[strut] = piece;
  return { pieceOf };
}

function middleOf(points: readonly ({ x: number; y: number; z: number } | undefined)[]) {
  const sum = { x: 0, y: 0, z: 0 };
  for (const point of points) {
    sum.x += point?.x ?? 0;
    sum.y += point?.y ?? 0;
    sum.z += point?.z ?? 0;
  }
  const count = Math.max(1, points.length);
  return { x: sum.x / count, y: sum.y / count, z: sum.z / count };
}

function figureWords({ figures }: SplitPlan): string {
  const { pieces, fieldJoints, baseline } = figures;
  const plain = baseline.coordinateBisection;
  const saved = plain !== null && plain > fieldJoints ? `, ${plain} by plain halving` : '';
  return `${counted(pieces, 'piece')}, ${counted(fieldJoints, 'field joint')}${saved}`;
}
