import type { App } from '../../server/app';
import { StepRow, SubAssembly } from '../../server/modules/travellers/traveller.entity';
import { newId } from '../../shared/kernel/ids';
import { inScope } from './fixtures';

/** A traveller of steps, the first of them ready; columns may be given for each step. */
export async function seedTraveller(
  app: App,
  installationId: string,
  stationId: string,
  steps: readonly Partial<StepRow>[],
  code = `V-${newId().slice(0, 4)}`,
  piece: Partial<SubAssembly> = {},
): Promise<{ pieceId: string; stepIds: string[] }> {
  const pieceId = newId();
  const rows = steps.map((step, index) => ({
    id: newId(),
    installationId,
    subAssemblyId: pieceId,
    position: index + 1,
    operation: 'lay out',
    name: `step ${index + 1}`,
    stationId,
    hazards: [],
    toolKinds: [],
    crewMin: 1,
    crewMax: 1,
    plannedSeconds: 600,
    clocks: null,
    needsCheck: 0,
    state: index === 0 ? ('ready' as const) : ('waiting' as const),
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
    removedAt: null,
    ...step,
  }));
  await inScope(app, installationId, async (scope) => {
    const revision = await scope.revision();
    await scope.manager.insert(SubAssembly, {
      id: pieceId,
      installationId,
      frameId: 'frame',
      templateId: null,
      code,
      name: 'A piece',
      position: 1,
      travellerRevision: 1,
      revision,
      removedAt: null,
      ...piece,
    });
    for (const row of rows) {
      await scope.manager.insert(StepRow, { ...row, revision });
      scope.changed('steps', row.id);
    }
    scope.changed('subAssemblies', pieceId);
  });
  return { pieceId, stepIds: rows.map((row) => row.id) };
}
