import type { z } from 'zod';
import type { DrawingView } from '../../../shared/contracts/drawing';
import type { RunView } from '../../../shared/contracts/runs';
import type {
  moveStrutsSchema,
  SplitPlan,
  SplitView,
  SplitWish,
  StrutKey,
} from '../../../shared/contracts/split';
import type { Frame } from '../../../shared/frames';
import { newId } from '../../../shared/kernel/ids';
import type { ChangeMaker, WriteScope } from '../../db/write';
import type { Deps } from '../../deps';
import { AppError, notFound } from '../../http/app-error';
import { drawingOf, framesOf } from '../frames';
import { assertOpen } from '../installations';
import { begunPieces, loadProposal, splitsOf } from './split.repository';
import { Split } from './split.entity';

/** Everything a computation needs of the drawing. */
export interface DrawingToSplit {
  view: DrawingView;
  frames: Map<string, Frame>;
}

/** The drawing with the geometry of its frames, read in one go. */
export function readDrawing(deps: Deps, installationId: string): DrawingToSplit {
  const { readHandle } = deps.data;
  return readHandle.transaction((): DrawingToSplit => {
    const view = drawingOf(readHandle, installationId);
    const wanted = new Set(view.placements.map((placement) => placement.frameId));
    const frames = framesOf(readHandle, installationId).filter((frame) => wanted.has(frame.id));
    return { view, frames: new Map(frames.map((frame) => [frame.id, frame.geometry])) };
  })();
}

/**
 * Start to split the drawing; the run's result is the new proposal's id.
 * @throws AppError DRAWING_EMPTY, RUN_ACTIVE
 */
export function startSplit(deps: Deps, maker: ChangeMaker, installationId: string, wish: SplitWish): RunView {
  const { view, frames } = readDrawing(deps, installationId);
  if (view.placements.length === 0) {
    throw new AppError(
      'DRAWING_EMPTY',
      'Nothing stands in the drawing yet. Place a frame first, then split it.',
    );
  }
  const { proposed } = splitsOf(deps.data.readHandle, installationId, view.revision);
  const input = {
    placements: view.placements,
    frames,
    settings: view.settings,
    wish,
    kept: [...begunPieces(deps.data.readHandle, installationId), ...keptOf(proposed, wish.keep)],
  };
  return deps.runs.start(installationId, 'split', 'split', input, async ({ plan, problem }) => {
    if (plan === null) throw new AppError('SPLIT_IMPOSSIBLE', problem);
    return deps.writer.runPlain({ maker, installationId }, (scope) =>
      saveProposal(scope, installationId, wish, plan, view.revision),
    );
  });
}

/** Pieces of the proposal that shall stay, by the struts they are made of. */
function keptOf(proposed: SplitView | null, keep: readonly string[]): { key: string; struts: StrutKey[] }[] {
  if (!proposed) return [];
  return proposed.plan.pieces
    .filter((piece) => keep.includes(piece.key))
    .map((piece) => ({
      key: piece.key,
      struts: piece.struts.map((strut) => proposed.plan.struts[strut] as StrutKey),
    }));
}

async function saveProposal(
  scope: WriteScope,
  installationId: string,
  wish: SplitWish,
  plan: SplitPlan,
  drawingRevision: number,
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  const known = await loadProposal(scope.manager, installationId);
  const revision = await scope.revision();
  const fields = { wish, plan, drawingRevision, revision, madeAt: scope.now };
  const id = known?.id ?? newId();
  if (known) await scope.manager.update(Split, { id }, fields);
  else await scope.manager.insert(Split, { id, installationId, status: 'proposed', ...fields });
  await scope.log({
    action: 'split.proposed',
    subject: { splitId: id, pieces: plan.pieces.length, fieldJoints: plan.figures.fieldJoints },
  });
  return { id };
}

/**
 * Give struts to another piece: computed off the request's thread, then written if nobody changed the proposal meanwhile.
 * @returns the use case that writes it
 * @throws AppError STALE_PAGE, SPLIT_OUT_OF_DATE, SPLIT_IMPOSSIBLE with what is wrong
 */
export async function moveStruts(
  deps: Deps,
  installationId: string,
  { struts, to, revision }: z.infer<typeof moveStrutsSchema>,
): Promise<(scope: WriteScope) => Promise<SplitView>> {
  const { view, frames } = readDrawing(deps, installationId);
  const { proposed } = splitsOf(deps.data.readHandle, installationId, view.revision);
  const checked = currentOf(proposed, revision);
  const { plan, problem } = await deps.pool.run('revise-split', {
    placements: view.placements,
    frames,
    settings: view.settings,
    wish: checked.wish,
    plan: checked.plan,
    move: { struts, to },
  }).result;
  if (problem !== null) throw new AppError('SPLIT_IMPOSSIBLE', problem);
  return async (scope) => {
    await assertOpen(scope, installationId);
    const known = currentOf(await loadProposal(scope.manager, installationId), revision);
    const next = await scope.revision();
    await scope.manager.update(Split, { id: known.id }, { plan, revision: next });
    await scope.log({ action: 'split.edited', subject: { splitId: known.id, struts: struts.length } });
    return { ...checked, plan, revision: next };
  };
}

/** The proposal the page was filled from, still up to date. */
export function currentOf<P extends { revision: number; outOfDate: boolean }>(
  proposed: P | null,
  revision: number,
): P {
  if (!proposed) throw notFound();
  if (proposed.revision !== revision) {
    throw new AppError(
      'STALE_PAGE',
      'Somebody changed the split meanwhile. Load it again; yours was not saved.',
      {
        details: { revision: proposed.revision },
      },
    );
  }
  if (proposed.outOfDate) {
    throw new AppError(
      'SPLIT_OUT_OF_DATE',
      'The drawing has changed since this split was computed. Split it again; pieces you keep stay.',
    );
  }
  return proposed;
}

/** Throw the proposal away; what was taken before stays. */
export async function discardProposal(
  scope: WriteScope,
  installationId: string,
): Promise<{ id: string | null }> {
  await assertOpen(scope, installationId);
  const known = await loadProposal(scope.manager, installationId);
  if (!known) return { id: null };
  await scope.manager.delete(Split, { id: known.id });
  await scope.log({ action: 'split.discarded', subject: { splitId: known.id } });
  return { id: known.id };
}
