import type { StepRecord, SubAssemblyRecord } from '../../../shared/contracts/live';
import { shownState, subAssemblyState, type ShownState } from '../../../shared/travellers/step';
import type { LiveMaps } from '../../lib/live-state';
import { travellerSteps } from '../../lib/world';

/** One traveller as the board shows it. */
export interface BoardRow {
  piece: SubAssemblyRecord;
  /** In order of position. */
  steps: readonly StepRecord[];
  state: ShownState;
  /** The step that gives the traveller its state; the last one when all have passed, null for an empty traveller. */
  current: StepRecord | null;
}

const byCode = new Intl.Collator('en', { numeric: true });
const known = new WeakMap<SubAssemblyRecord, BoardRow>();

const sameSteps = (a: readonly StepRecord[], b: readonly StepRecord[]) =>
  a.length === b.length && a.every((step, i) => step === b[i]);

/** The row of a piece; the very same object for as long as neither the piece nor one of its steps changed. */
function rowOf(piece: SubAssemblyRecord, steps: readonly StepRecord[]): BoardRow {
  const before = known.get(piece);
  if (before && sameSteps(before.steps, steps)) return before;
  const state = subAssemblyState(steps);
  const current =
    (state === 'passed' ? steps.at(-1) : steps.find((step) => shownState(step) === state)) ?? null;
  const row = { piece, steps, state, current };
  known.set(piece, row);
  return row;
}

/**
 * Every traveller in the order of its code, which never changes by itself.
 * @param pieces the live sub-assemblies; removed ones are left out
 * @param steps the live steps
 */
export function boardRows(pieces: LiveMaps['subAssemblies'], steps: LiveMaps['steps']): BoardRow[] {
  return [...pieces.values()]
    .filter((piece) => !piece.removed)
    .sort((a, b) => byCode.compare(a.code, b.code))
    .map((piece) => rowOf(piece, travellerSteps(steps, piece.id)));
}
