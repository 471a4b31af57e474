import {
  MOST_STRUTS,
  type DrawingSettings,
  type PlacementInput,
  type PlacementPattern,
} from '../../../shared/contracts/drawing';
import { copiesOf } from '../../../shared/frames';
import { newId } from '../../../shared/kernel/ids';
import type { WriteScope } from '../../db/write';
import { AppError, fieldError, notFound } from '../../http/app-error';
import { assertOpen } from '../installations';
import { DrawingSettingsRow, Placement } from './drawing.entity';
import { loadDrawingSettings, loadPlacement, strutsPlaced } from './drawing.repository';
import { loadFrame } from './frames.repository';

const stale = (name: string, revision: number) =>
  new AppError(
    'STALE_PAGE',
    `Somebody changed ${name} meanwhile. Load the drawing again; yours was not saved.`,
    { details: { revision } },
  );

const copiesIn = (row: { place: string }) => copiesOf((JSON.parse(row.place) as PlacementInput).pattern);

/** The whole drawing must stay within what the screens and the split take. */
async function guardSize(
  scope: WriteScope,
  installationId: string,
  pattern: PlacementPattern,
  strutsOfFrame: number,
  exceptId: string | null,
): Promise<void> {
  const others = (await strutsPlaced(scope.manager, installationId)).filter((row) => row.id !== exceptId);
  const known = others.reduce((sum, row) => sum + row.struts * copiesIn(row), 0);
  const wanted = strutsOfFrame * copiesOf(pattern);
  if (known + wanted <= MOST_STRUTS) return;
  throw fieldError(
    'pattern',
    'too-many',
    `These copies are ${wanted.toLocaleString('en')} struts and the drawing has ${known.toLocaleString('en')} already; it takes ${MOST_STRUTS.toLocaleString('en')} in all. Set out fewer copies.`,
  );
}

/**
 * A frame that grows grows everywhere it stands; the drawing must stay within its limit.
 * @param struts how many the frame is to have
 * @throws AppError VALIDATION with the numbers
 */
export async function guardFrameSize(
  scope: WriteScope,
  installationId: string,
  frameId: string,
  struts: number,
): Promise<void> {
  const rows = await strutsPlaced(scope.manager, installationId);
  const own = rows.filter((row) => row.frameId === frameId);
  if (own.every((row) => struts <= row.struts)) return;
  const copies = own.reduce((sum, row) => sum + copiesIn(row), 0);
  const all = rows.reduce(
    (sum, row) => sum + (row.frameId === frameId ? struts : row.struts) * copiesIn(row),
    0,
  );
  if (all <= MOST_STRUTS) return;
  throw fieldError(
    'geometry',
    'too-many',
    `This frame stands ${copies} ${copies === 1 ? 'time' : 'times'} in the drawing; with ${struts.toLocaleString('en')} struts each the drawing would have ${all.toLocaleString('en')}, and it takes ${MOST_STRUTS.toLocaleString('en')} in all. Set out fewer copies first.`,
  );
}

/**
 * Put a frame into the drawing, or move what stands there.
 * @param id of the placement to change; null for a new one
 * @throws AppError VALIDATION for a frame that is gone or too many struts, STALE_PAGE when somebody changed it meanwhile
 */
export async function savePlacement(
  scope: WriteScope,
  installationId: string,
  id: string | null,
  input: PlacementInput,
): Promise<{ id: string; revision: number }> {
  await assertOpen(scope, installationId);
  const frame = await loadFrame(scope.manager, installationId, input.frameId);
  if (!frame) throw fieldError('frameId', 'unknown', 'This frame is not there any more. Choose another one.');
  const known = id === null ? null : await loadPlacement(scope.manager, installationId, id);
  if (id !== null && !known) throw notFound();
  if (known && input.revision !== known.revision) throw stale(known.name, known.revision);
  await guardSize(scope, installationId, input.pattern, frame.geometry.struts.length, id);
  const revision = await scope.revision();
  const { at, turn, pattern, name, frameId } = input;
  const fields = { frameId, name, place: { at, turn, pattern }, revision };
  const placementId = known?.id ?? newId();
  if (known) await scope.manager.update(Placement, { id: placementId }, fields);
  else {
    await scope.manager.insert(Placement, {
      id: placementId,
      installationId,
      position: revision,
      removedAt: null,
      ...fields,
    });
  }
  await scope.log({
    action: known ? 'placement.edited' : 'placement.added',
    subject: { placementId, frameId, copies: copiesOf(pattern) },
  });
  return { id: placementId, revision };
}

/** Take a placement out of the drawing; what was split from it before stays as it is until the split is taken anew. */
export async function removePlacement(
  scope: WriteScope,
  installationId: string,
  id: string,
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  if (!(await loadPlacement(scope.manager, installationId, id))) throw notFound();
  await scope.manager.update(Placement, { id }, { removedAt: scope.now, revision: await scope.revision() });
  await scope.log({ action: 'placement.removed', subject: { placementId: id } });
  return { id };
}

/**
 * Change what turns the drawing's lines into wood.
 * @throws AppError STALE_PAGE when somebody changed them meanwhile
 */
export async function saveDrawingSettings(
  scope: WriteScope,
  installationId: string,
  { revision: from, ...settings }: DrawingSettings & { revision?: number | undefined },
): Promise<{ revision: number }> {
  await assertOpen(scope, installationId);
  const known = await loadDrawingSettings(scope.manager, installationId);
  if ((from ?? 0) !== known.revision) throw stale("the drawing's wood and tolerances", known.revision);
  const revision = await scope.revision();
  await scope.manager.upsert(DrawingSettingsRow, { installationId, settings, revision }, ['installationId']);
  await scope.log({ action: 'drawing.settings-changed', subject: { ...settings } });
  return { revision };
}
