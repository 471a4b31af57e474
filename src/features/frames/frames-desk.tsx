import { useNavigate, useSearchParams } from 'react-router-dom';
import type { LengthUnit } from '../../../shared/kernel/lengths';
import { Action } from '../../components/ui/action';
import { ChoiceRow, DimensionHead } from '../../components/ui/heads';
import { EmptyNote } from '../../components/ui/note';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { DrawingDesk } from './drawing-desk';
import { FrameList } from './frame-list';
import { drawnFrames, useFrameList, useReloadFrames } from './frame-list-query';
import { FramePage } from './frame-page';
import { ObjForm } from './obj-form';
import { ShapeForm } from './shape-form';

/** The frames at the left, the chosen or the new one beside them. */
export function FramesDesk({
  installationId,
  unit,
  mayEdit,
}: {
  installationId: string;
  unit: LengthUnit;
  mayEdit: boolean;
}) {
  const [search, setSearch] = useSearchParams();
  const navigate = useNavigate();
  const list = useFrameList(installationId);
  const reload = useReloadFrames(installationId);
  const path = `/installations/${installationId}/frames`;
  const page = `/i/${installationId}/drawing`;
  const making = mayEdit ? search.get('new') : null;
  if (list.error) return <Refusal error={list.error} />;
  if (!list.data) return <Pending />;
  const frames = drawnFrames(list.data);
  const chosen = making ? undefined : (frames.find(({ id }) => id === search.get('frame')) ?? frames[0]);
  const made = async ({ id }: { id: string }) => {
    await reload();
    await navigate(`${page}?frame=${id}`);
  };
  const leave = () => void navigate(page);
  const shown = search.get('show') === 'placed' ? 'placed' : 'frames';
  const form = {
    unit,
    wish: { method: 'POST', path } as const,
    words: 'Add this frame',
    onDone: made,
    onCancel: leave,
  };
  const tabs = (
    <ChoiceRow
      label="what is shown"
      value={shown}
      onChange={(show) => setSearch(show === 'placed' ? { show } : {})}
      choices={[
        { value: 'frames', label: 'Frames' },
        { value: 'placed', label: 'The whole drawing' },
      ]}
    />
  );
  if (shown === 'placed') {
    return (
      <div className="grid gap-6">
        {tabs}
        <DrawingDesk installationId={installationId} unit={unit} frames={frames} mayEdit={mayEdit} />
      </div>
    );
  }
  return (
    <div className="grid gap-6">
      {tabs}
      <div className="frames-desk">
        <div className="grid content-start gap-4">
          {mayEdit && (
            <div className="flex flex-wrap gap-x-2 gap-y-1">
              <Action to={`${page}?new=shape`}>A new shape</Action>
              <Action to={`${page}?new=file`}>From a file</Action>
            </div>
          )}
          <FrameList
            frames={frames}
            chosenId={chosen?.id ?? null}
            hrefOf={({ id }) => `${page}?frame=${id}`}
          />
        </div>
        <div className="min-w-0">
          {making === 'shape' && (
            <section className="grid gap-5" aria-labelledby="new-shape">
              <DimensionHead id="new-shape">A new shape</DimensionHead>
              <ShapeForm {...form} />
            </section>
          )}
          {making === 'file' && (
            <section className="grid gap-5" aria-labelledby="new-file">
              <DimensionHead id="new-file">From a file</DimensionHead>
              <ObjForm {...form} />
            </section>
          )}
          {chosen && (
            <FramePage
              key={chosen.id}
              frame={chosen}
              unit={unit}
              path={path}
              mayEdit={mayEdit}
              onChanged={reload}
              onRemoved={async () => {
                await reload();
                await navigate(page);
              }}
            />
          )}
          {!chosen && !making && (
            <EmptyNote title="No frame yet.">
              A frame is one wireframe shape: joints and struts. Make one from its measures, or read it from a
              file.
            </EmptyNote>
          )}
        </div>
      </div>
    </div>
  );
}
