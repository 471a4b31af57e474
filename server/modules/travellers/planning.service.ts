import type { z } from 'zod';
import type {
  createSubAssembliesSchema,
  TemplateStep,
  templateSchema,
  TemplateView,
} from '../../../shared/contracts/travellers';
import { cutCount, jointCount } from '../../../shared/frames';
import { newId } from '../../../shared/kernel/ids';
import type { WriteScope } from '../../db/write';
import { AppError, fieldError, notFound } from '../../http/app-error';
import { loadFrame } from '../frames';
import { assertOpen } from '../installations';
import {
  claimsOn,
  highestNumber,
  jointsThatNeed,
  loadPiece,
  loadTemplate,
  piecesOf,
  stationIds,
} from './planning.repository';
import { codeOf, insertPieces, retirePiece } from './pieces.service';
import { SubAssembly, TravellerTemplate } from './traveller.entity';

type TemplateInput = z.infer<typeof templateSchema>;
type PiecesInput = z.infer<typeof createSubAssembliesSchema>;

/** A code that is read aloud has at most three figures. */
const HIGHEST_NUMBER = 999;

async function guardStations(
  scope: WriteScope,
  installationId: string,
  steps: readonly TemplateStep[],
): Promise<void> {
  const known = await stationIds(scope.manager, installationId);
  const fields = steps.flatMap((step, index) =>
    known.has(step.stationId)
      ? []
      : [
          {
            path: `steps.${index}.stationId`,
            code: 'unknown',
            message: 'This station is not there any more. Choose another one.',
          },
        ],
  );
  if (fields.length > 0) throw new AppError('VALIDATION', 'A step has no station.', { fields });
}

/** What an organiser is told of a template that was kept. */
export interface SavedTemplate {
  id: string;
  revision: number;
  /** Pieces whose travellers were made from it before and keep their steps. */
  travellers: number;
  note: string;
}

/**
 * Make a template, or change one. Travellers made from it before keep their steps.
 * @param id of the template to change; null for a new one
 * @throws AppError STALE_PAGE when somebody changed it since the form was filled, VALIDATION for a station that is gone
 */
export async function saveTemplate(
  scope: WriteScope,
  installationId: string,
  id: string | null,
  input: TemplateInput,
): Promise<SavedTemplate> {
  await assertOpen(scope, installationId);
  await guardStations(scope, installationId, input.steps);
  const known = id === null ? null : await loadTemplate(scope.manager, installationId, id);
  if (id !== null && !known) throw notFound();
  if (known && input.revision !== known.revision) throw staleTemplate(known);
  const revision = await scope.revision();
  const templateId = known?.id ?? newId();
  const fields = { name: input.name, steps: input.steps, revision };
  if (known) await scope.manager.update(TravellerTemplate, { id: templateId }, fields);
  else await scope.manager.insert(TravellerTemplate, { id: templateId, installationId, ...fields });
  await scope.log({ action: known ? 'template.edited' : 'template.added', subject: { templateId } });
  const travellers = known ? await piecesOf(scope.manager, templateId) : 0;
  return { id: templateId, revision, travellers, note: keptNote(travellers) };
}

function keptNote(travellers: number): string {
  if (travellers === 0) return 'Kept. Pieces made from now on have these steps.';
  const many = travellers > 1;
  return `Kept. ${travellers} ${many ? 'travellers' : 'traveller'} made from it before ${many ? 'keep their' : 'keeps its'} steps; to change ${many ? 'them' : 'it'}, take ${many ? 'those pieces' : 'that piece'} out and make ${many ? 'them' : 'it'} again.`;
}

const staleTemplate = (known: TemplateView) =>
  new AppError(
    'STALE_PAGE',
    `Somebody changed the template ${known.name} meanwhile. Load it again; yours was not saved.`,
    {
      details: { revision: known.revision },
    },
  );

/** Remove a template; travellers made from it stay as they are. */
export async function removeTemplate(
  scope: WriteScope,
  installationId: string,
  id: string,
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  if (!(await loadTemplate(scope.manager, installationId, id))) throw notFound();
  await scope.manager.delete(TravellerTemplate, { id });
  await scope.log({ action: 'template.removed', subject: { templateId: id } });
  return { id };
}

/**
 * Make pieces from a frame, each with a traveller from a template; codes go on from the highest of the letter.
 * @returns ids and codes in order
 * @throws AppError VALIDATION when frame or template is gone, or the letter has no codes left
 */
export async function createSubAssemblies(
  scope: WriteScope,
  installationId: string,
  input: PiecesInput,
): Promise<{ ids: string[]; codes: string[] }> {
  await assertOpen(scope, installationId);
  const frame = await loadFrame(scope.manager, installationId, input.frameId);
  if (!frame) throw fieldError('frameId', 'unknown', 'This frame is not there any more. Choose another one.');
  const template = await loadTemplate(scope.manager, installationId, input.templateId);
  if (!template)
    throw fieldError('templateId', 'unknown', 'This template is not there any more. Choose another one.');
  await guardStations(scope, installationId, template.steps);
  const from = await highestNumber(scope.manager, installationId, input.letter);
  if (from + input.quantity > HIGHEST_NUMBER) {
    throw fieldError(
      'quantity',
      'no-codes',
      `${input.letter} has ${HIGHEST_NUMBER} codes and ${Math.max(0, HIGHEST_NUMBER - from)} left, not ${input.quantity}. Take another letter.`,
    );
  }
  const counts = { cuts: cutCount(frame.geometry), joints: jointCount(frame.geometry) };
  const pieces = Array.from({ length: input.quantity }, (_, index) => ({
    id: newId(),
    frameId: frame.id,
    code: codeOf(input.letter, from + index + 1),
    name: input.quantity > 1 ? `${input.name} ${index + 1}` : input.name,
    position: from + index + 1,
    counts,
  }));
  await insertPieces(scope, installationId, pieces, template);
  const ids = pieces.map((piece) => piece.id);
  await scope.log({
    action: 'sub-assembly.added',
    subject: { ids, frameId: frame.id, templateId: template.id },
  });
  return { ids, codes: pieces.map((piece) => piece.code) };
}

/** Give a piece another name; its code stays. */
export async function renameSubAssembly(
  scope: WriteScope,
  installationId: string,
  id: string,
  name: string,
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  if (!(await loadPiece(scope.manager, installationId, id))) throw notFound();
  await scope.manager.update(SubAssembly, { id }, { name, revision: await scope.revision() });
  scope.changed('subAssemblies', id);
  await scope.log({ action: 'sub-assembly.renamed', subject: { subAssemblyId: id } });
  return { id };
}

/**
 * Take a piece out of the plan with its traveller.
 * @throws AppError IN_USE when somebody ever worked on it, or it meets other pieces at a field joint
 */
export async function removeSubAssembly(
  scope: WriteScope,
  installationId: string,
  id: string,
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  const piece = await loadPiece(scope.manager, installationId, id);
  if (!piece) throw notFound();
  const claims = await claimsOn(scope.manager, id);
  if (claims > 0) {
    throw new AppError(
      'IN_USE',
      `${piece.code} was worked on: ${claims} ${claims === 1 ? 'place was' : 'places were'} taken on its steps. It stays; hold it if it is not wanted.`,
      { details: { claims } },
    );
  }
  const joints = await jointsThatNeed(scope.manager, installationId, id);
  if (joints.length > 0) {
    throw new AppError(
      'IN_USE',
      `${piece.code} meets other pieces at ${joints.join(', ')}. Change the split instead, so that the joints follow.`,
      { details: { joints } },
    );
  }
  await retirePiece(scope, id);
  await scope.log({ action: 'sub-assembly.removed', subject: { subAssemblyId: id } });
  return { id };
}
