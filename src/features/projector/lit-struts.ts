import { shareDone, subAssemblyState, type ShownState, type Step } from '../../../shared/travellers/step';

/** How a piece stands on the wall: so many of its struts, in order of assembly, carry its state. */
export interface Lit {
  state: ShownState;
  /** Struts that are lit, of those it has. */
  struts: number;
}

/**
 * How many struts of a piece are lit: as many of all as its passed minutes are of its minutes.
 * @param steps of its traveller
 * @param struts how many it has
 * @returns all of them only when every step has passed; at least one from the moment on that anything may begin, so that
 *   its state is seen; none while it waits
 */
export function litStruts(
  steps: readonly Pick<Step, 'state' | 'held' | 'plannedSeconds'>[],
  struts: number,
): Lit {
  const state = subAssemblyState(steps);
  if (state === 'passed') return { state, struts };
  if (state === 'waiting') return { state, struts: 0 };
  const share = Math.round(shareDone(steps) * struts);
  return { state, struts: Math.min(Math.max(share, 1), Math.max(struts - 1, 1), struts) };
}
