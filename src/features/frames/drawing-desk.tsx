import { useMemo, useState } from 'react';
import type { PlacementInput, PlacementView } from '../../../shared/contracts/drawing';
import type { FrameView } from '../../../shared/contracts/frames';
import { copiesOf } from '../../../shared/frames';
import { formatLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { SpaceView } from '../../components/space/space-view';
import { Action } from '../../components/ui/action';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { ChoiceRow, DimensionHead } from '../../components/ui/heads';
import { EmptyNote } from '../../components/ui/note';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { useDrawing, useJoinedDrawing, useReloadDrawing } from '../../lib/drawing';
import { counted } from '../../lib/formats';
import { CutLengthsTable } from './cut-lengths-table';
import { DrawingFigures } from './drawing-figures';
import { DrawingSettingsForm } from './drawing-settings-form';
import { PlacementForm } from './placement-form';
import { useHistory } from './use-history';

type Numbers = 'none' | 'joints' | 'struts';
type Open = { what: 'new' } | { what: 'settings' } | { what: 'placement'; id: string } | null;

/** All frames where they stand: placed, moved, set out in rows, rings and grids. */
export function DrawingDesk({
  installationId,
  unit,
  frames,
  mayEdit,
}: {
  installationId: string;
  unit: LengthUnit;
  frames: readonly FrameView[];
  mayEdit: boolean;
}) {
  const drawing = useDrawing(installationId);
  const joined = useJoinedDrawing(installationId, drawing.data);
  const reload = useReloadDrawing(installationId);
  const [open, setOpen] = useState<Open>(null);
  const [numbers, setNumbers] = useState<Numbers>('none');
  const history = useHistory(installationId, reload);
  const chosen = open?.what === 'placement' ? open.id : null;
  const look = useMemo(() => {
    const ofStrut = joined?.sources.map(([placementId]) => placementId) ?? [];
    return (strut: number) => ({
      colour: chosen !== null && ofStrut[strut] === chosen ? 's-hand' : 'ink',
      dash: [],
      faint: chosen !== null && ofStrut[strut] !== chosen,
    });
  }, [joined, chosen]);
  if (drawing.error) return <Refusal error={drawing.error} />;
  if (!drawing.data) return <Pending />;
  const view = drawing.data;
  const shut = () => setOpen(null);
  const saved = async () => {
    await reload();
    shut();
  };
  const empty = !joined || joined.frame.struts.length === 0;
  return (
    <div className="with-side">
      <section className="grid content-start gap-6" aria-labelledby="in-space">
        <DimensionHead
          id="in-space"
          right={joined ? counted(joined.frame.struts.length, 'strut') : undefined}
        >
          Where everything stands
        </DimensionHead>
        {empty ? (
          <EmptyNote title="Nothing stands here yet.">
            Make a frame, then place it: once, in a row, round a ring or in a grid.
          </EmptyNote>
        ) : (
          <>
            <ChoiceRow<Numbers>
              label="numbers"
              value={numbers}
              onChange={setNumbers}
              choices={[
                { value: 'none', label: 'No numbers' },
                { value: 'joints', label: 'Joints' },
                { value: 'struts', label: 'Struts' },
              ]}
            />
            <SpaceView
              joints={joined.frame.joints}
              struts={joined.frame.struts}
              label={`The drawing: ${counted(joined.frame.struts.length, 'strut')} and ${counted(joined.frame.joints.length, 'joint')}`}
              look={look}
              numbers={numbers}
            />
            <DrawingFigures joined={joined} settings={view.settings} unit={unit} />
            <CutLengthsTable frame={joined.frame} settings={view.settings} unit={unit} />
          </>
        )}
      </section>
      <div className="grid content-start gap-8">
        <section className="grid gap-4" aria-labelledby="placed">
          <DimensionHead id="placed" right={counted(view.placements.length, 'placement')}>
            Placed
          </DimensionHead>
          {mayEdit && (
            <div className="flex flex-wrap gap-x-4 gap-y-1">
              <Action onClick={() => setOpen({ what: 'new' })}>Place a frame</Action>
              <Action look="words" disabled={!history.canUndo} onClick={history.undo}>
                Undo
              </Action>
              <Action look="words" disabled={!history.canRedo} onClick={history.redo}>
                Redo
              </Action>
            </div>
          )}
          <Refusal error={history.error} />
          {open?.what === 'new' && (
            <PlacementForm
              installationId={installationId}
              unit={unit}
              frames={frames}
              onSaved={(id, body) => {
                history.added(id, body);
                return saved();
              }}
              onCancel={shut}
            />
          )}
          <ul className="grid gap-1">
            {view.placements.map((placement) => (
              <PlacementRow
                key={placement.id}
                placement={placement}
                frames={frames}
                unit={unit}
                open={chosen === placement.id}
                mayEdit={mayEdit}
                installationId={installationId}
                onOpen={() =>
                  setOpen(chosen === placement.id ? null : { what: 'placement', id: placement.id })
                }
                onSaved={(id, body) => {
                  history.edited(id, placement, body);
                  return saved();
                }}
                onRemoved={() => {
                  history.removed(placement);
                  return saved();
                }}
              />
            ))}
          </ul>
        </section>
        <section className="grid gap-4" aria-labelledby="wood">
          <DimensionHead id="wood">Wood and tolerances</DimensionHead>
          <DrawingSettingsForm
            key={view.settingsRevision}
            installationId={installationId}
            unit={unit}
            view={view}
            mayEdit={mayEdit}
            onSaved={reload}
          />
        </section>
      </div>
    </div>
  );
}

const patternWords = (pattern: PlacementView['pattern']): string => {
  switch (pattern.kind) {
    case 'single':
      return 'once';
    case 'row':
      return `a row of ${pattern.count}`;
    case 'ring':
      return `a ring of ${pattern.count}`;
    case 'grid':
      return `a grid of ${copiesOf(pattern)}`;
  }
};

function PlacementRow({
  placement,
  frames,
  unit,
  open,
  mayEdit,
  installationId,
  onOpen,
  onSaved,
  onRemoved,
}: {
  placement: PlacementView;
  frames: readonly FrameView[];
  unit: LengthUnit;
  open: boolean;
  mayEdit: boolean;
  installationId: string;
  onOpen: () => void;
  onSaved: (id: string, body: PlacementInput) => unknown;
  onRemoved: () => unknown;
}) {
  const frame = frames.find(({ id }) => id === placement.frameId);
  const { at } = placement;
  return (
    <li className="grid gap-3 border-b border-rule py-2">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4">
        <Action look="words" onClick={onOpen} label={`${placement.name}, ${open ? 'close' : 'open'}`}>
          {placement.name}
        </Action>
        <span className="text-small text-pencil">
          {`${frame?.name ?? 'a frame that is gone'}, ${patternWords(placement.pattern)}, at ${[at.x, at.y, at.z].map((mm) => formatLength(mm, unit)).join(', ')}`}
        </span>
      </div>
      {open && mayEdit && (
        <>
          <PlacementForm
            installationId={installationId}
            unit={unit}
            frames={frames}
            placement={placement}
            onSaved={onSaved}
            onCancel={onOpen}
          />
          <ConfirmAction
            words="Take out"
            look="words"
            title={`Take ${placement.name} out of the drawing?`}
            confirm="Take it out"
            wish={{ method: 'DELETE', path: `/installations/${installationId}/placements/${placement.id}` }}
            onDone={onRemoved}
          >
            The frame itself stays. Undo brings it back.
          </ConfirmAction>
        </>
      )}
    </li>
  );
}
