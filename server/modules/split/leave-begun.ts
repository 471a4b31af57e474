import type { StrutKey, TakeSplit } from '../../../shared/contracts/split';
import { applyToTheRest } from '../../../shared/split';
import type { ChangeMaker } from '../../db/write';
import type { Deps } from '../../deps';
import { Split } from './split.entity';
import { loadProposal, splitPieces, splitsOf } from './split.repository';
import { currentOf, readDrawing } from './split.service';
import { changesOf, textOf } from './take.service';

/**
 * Where the organiser wants begun work left as it is: plan the proposal anew around the pieces on which work has begun since it was made.
 * @returns the wish with the revision of the proposal that can be taken now; unchanged when nothing stands in the way
 * @throws AppError STALE_PAGE, SPLIT_OUT_OF_DATE
 */
export async function leaveBegun(
  deps: Deps,
  maker: ChangeMaker,
  installationId: string,
  input: TakeSplit,
): Promise<TakeSplit> {
  if (input.begun !== 'leave') return input;
  const { view, frames } = readDrawing(deps, installationId);
  const proposal = currentOf(
    splitsOf(deps.data.readHandle, installationId, view.revision).proposed,
    input.revision,
  );
  const { manager } = deps.data.reader;
  const known = (await splitPieces(manager, installationId)).filter((row) => row.kind === 'piece');
  const changes = await changesOf({ manager }, known, proposal.plan);
  if (changes.touched.length === 0) return input;
  const keyOf = new Map(proposal.plan.struts.map((key) => [textOf(key), key]));
  const rest = applyToTheRest(
    known.map(({ id, code, origin }) => ({ id, code, struts: origin.struts.map(textOf) })),
    proposal.plan.pieces.map((piece) => ({
      struts: piece.struts.map((strut) => textOf(proposal.plan.struts[strut] as StrutKey)),
    })),
    changes,
  );
  const keys = new Map(known.map((row) => [row.id, row.origin.keys[0] ?? null]));
  const plan = await deps.pool.run('plan-pieces', {
    placements: view.placements,
    frames,
    settings: view.settings,
    wish: proposal.wish,
    plan: proposal.plan,
    pieces: rest.pieces.map(({ id, struts }) => ({
      key: id === null ? null : (keys.get(id) ?? null),
      struts: struts.map((text) => keyOf.get(String(text))).filter((key) => key !== undefined),
    })),
  }).result;
  const revision = await deps.writer.runPlain({ maker, installationId }, async (scope) => {
    const now = currentOf(await loadProposal(scope.manager, installationId), input.revision);
    const next = await scope.revision();
    await scope.manager.update(Split, { id: now.id }, { plan, revision: next });
    await scope.log({ action: 'split.edited', subject: { splitId: now.id, left: changes.touched.length } });
    return next;
  });
  return { ...input, revision };
}
