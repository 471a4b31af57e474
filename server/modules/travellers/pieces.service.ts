import type { SplitOrigin } from '../../../shared/contracts/split';
import type { TemplateStep } from '../../../shared/contracts/travellers';
import { newId } from '../../../shared/kernel/ids';
import { plannedSeconds } from '../../../shared/travellers';
import type { WriteScope } from '../../db/write';
import { StepRow, SubAssembly } from './traveller.entity';

/** SQLite takes 32,766 values in one statement; a step has 24. */
const STEPS_AT_ONCE = 200;

/** What is to be built, and what there is to do on it. */
export interface NewPiece {
  id: string;
  frameId: string;
  code: string;
  name: string;
  position: number;
  counts: { cuts: number; joints: number };
  kind?: SubAssembly['kind'];
  /** Sub-assemblies that must have passed before its first step is ready. */
  needs?: string[];
  origin?: SplitOrigin;
}

/** A code that is read aloud: letter and number, at least two figures. */
export const codeOf = (letter: string, number: number): string =>
  `${letter}-${String(number).padStart(2, '0')}`;

/**
 * Write sub-assemblies, each with a traveller of the given steps; they are noted as changed, the day-log entry is the caller's.
 * @param template id (null for steps that no template has) and steps, at least one
 */
export async function insertPieces(
  scope: WriteScope,
  installationId: string,
  pieces: readonly NewPiece[],
  template: { id: string | null; steps: readonly TemplateStep[] },
): Promise<void> {
  if (pieces.length === 0) return;
  const revision = await scope.revision();
  await scope.manager.insert(
    SubAssembly,
    pieces.map(({ counts: _counts, kind, needs, origin, ...piece }) => ({
      ...piece,
      installationId,
      templateId: template.id,
      kind: kind ?? 'piece',
      needs: needs ?? [],
      origin: origin ?? null,
      travellerRevision: 1,
      revision,
      removedAt: null,
    })),
  );
  const steps = pieces.flatMap((piece) =>
    template.steps.map((step, index) => stepRow(step, index, { ...piece, installationId, revision })),
  );
  for (let at = 0; at < steps.length; at += STEPS_AT_ONCE) {
    await scope.manager.insert(StepRow, steps.slice(at, at + STEPS_AT_ONCE));
  }
  for (const piece of pieces) scope.changed('subAssemblies', piece.id);
  for (const step of steps) scope.changed('steps', step.id);
}

function stepRow(
  { minutes, needsCheck, ...step }: TemplateStep,
  index: number,
  piece: Pick<NewPiece, 'id' | 'counts' | 'needs'> & { installationId: string; revision: number },
) {
  const first = index === 0 && (piece.needs ?? []).length === 0;
  return {
    id: newId(),
    installationId: piece.installationId,
    subAssemblyId: piece.id,
    position: index + 1,
    ...step,
    plannedSeconds: plannedSeconds(minutes, piece.counts),
    needsCheck: needsCheck ? 1 : 0,
    state: first ? ('ready' as const) : ('waiting' as const),
    held: null,
    startedAt: null,
    finishedAt: null,
    finishedBy: null,
    dryUntil: null,
    passedAt: null,
    passedBy: null,
    rework: null,
    handOver: null,
    flags: [],
    revision: piece.revision,
    removedAt: null,
  };
}

/** Take a sub-assembly out of the plan with its traveller; whether it may go is the caller's question. */
export async function retirePiece(scope: WriteScope, id: string): Promise<void> {
  const revision = await scope.revision();
  await scope.manager.update(SubAssembly, { id }, { removedAt: scope.now, revision });
  const steps = await scope.manager.query<{ id: string }[]>(
    'UPDATE step SET removed_at = ?, revision = ? WHERE sub_assembly_id = ? RETURNING id',
    [scope.now, revision, id],
  );
  scope.changed('subAssemblies', id);
  for (const step of steps) scope.changed('steps', step.id);
}

/**
 * Give a sub-assembly on which nobody has worked another drawing: its traveller gets the next revision and the steps new minutes.
 * @param steps of its template, in order of position
 */
export async function redrawPiece(
  scope: WriteScope,
  id: string,
  change: { frameId: string; origin: SplitOrigin; counts: NewPiece['counts'] },
  steps: readonly TemplateStep[],
): Promise<void> {
  const revision = await scope.revision();
  await scope.manager.query(
    `UPDATE sub_assembly SET frame_id = ?, origin = ?, revision = ?, traveller_revision = traveller_revision + 1 WHERE id = ?`,
    [change.frameId, JSON.stringify(change.origin), revision, id],
  );
  scope.changed('subAssemblies', id);
  for (const [index, step] of steps.entries()) {
    const rows = await scope.manager.query<{ id: string }[]>(
      `UPDATE step SET planned_seconds = ?, revision = ?
       WHERE sub_assembly_id = ? AND position = ? AND operation = ? AND removed_at IS NULL RETURNING id`,
      [plannedSeconds(step.minutes, change.counts), revision, id, index + 1, step.operation],
    );
    for (const row of rows) scope.changed('steps', row.id);
  }
}

/** Note where a sub-assembly lies in a new split that leaves it as it is. */
export async function rehomePiece(
  scope: WriteScope,
  id: string,
  origin: SplitOrigin,
  needs?: readonly string[],
): Promise<void> {
  await scope.manager.update(
    SubAssembly,
    { id },
    { origin, revision: await scope.revision(), ...(needs ? { needs: [...needs] } : {}) },
  );
  scope.changed('subAssemblies', id);
}
