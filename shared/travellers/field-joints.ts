import type { Step } from './step';

/** The traveller of a field joint: a shared step that needs the pieces that meet there. */
export interface FieldTraveller {
  /** Sub-assemblies that must have passed before it may begin. */
  needs: readonly string[];
  /** Its steps by position. */
  steps: readonly Step[];
}

/**
 * What a change of the pieces does to the field joints: the first step of each is ready as soon as all pieces that meet there have
 * passed; when one of them is sent back, whatever is not passed waits again and its places are given up, as with any step
 * whose earlier one is reopened. A field joint that has passed stays: it is glued.
 *
 * @param pieceId the piece that has just passed, or is not passed any more
 * @param travellers field joints that need it
 * @param passed whether all steps of a sub-assembly have passed, after the change
 * @returns the steps that change, whole
 * @source rules of the product, own
 */
export function followPieces(
  pieceId: string,
  travellers: readonly FieldTraveller[],
  passed: (subAssemblyId: string) => boolean,
): Step[] {
  if (!passed(pieceId)) return travellers.flatMap(({ steps }) => closed(steps));
  return travellers.flatMap(({ needs, steps }) => (needs.every(passed) ? opened(steps) : []));
}

function opened(steps: readonly Step[]): Step[] {
  const [first] = steps;
  return first?.state === 'waiting' ? [{ ...first, state: first.rework ? 'rework' : 'ready' }] : [];
}

function closed(steps: readonly Step[]): Step[] {
  return steps
    .filter((step) => step.state !== 'waiting' && step.state !== 'passed')
    .map((step) => ({
      ...step,
      state: 'waiting',
      crew: [],
      handOver: null,
      startedAt: null,
      finishedAt: null,
      finishedBy: null,
      dryUntil: null,
      flags: [],
    }));
}
