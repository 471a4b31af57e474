import type { SplitPlan } from '../../shared/contracts/split';
import { openHighs } from './highs-solver';
import {
  planPieces,
  planSplit,
  reviseSplit,
  SplitRefusal,
  type PlanPiecesInput,
  type PlanSplitInput,
  type ReviseSplitInput,
} from '../../shared/split';
import type { TaskControl } from './tasks';

/** Every computation that runs off the request's thread. */
export const TASKS = {
  split: async (
    input: PlanSplitInput,
    control: TaskControl,
  ): Promise<{ plan: SplitPlan; problem: null } | { plan: null; problem: string }> => {
    try {
      return { plan: planSplit(input, { solver: await openHighs(), ...control }), problem: null };
    } catch (error) {
      // What an error is does not survive the way out of the thread; its words do.
      if (error instanceof SplitRefusal) return { plan: null, problem: error.message };
      throw error;
    }
  },
  'revise-split': async (input: ReviseSplitInput, control: TaskControl) =>
    reviseSplit(input, { solver: await openHighs(), ...control }),
  'plan-pieces': async (input: PlanPiecesInput, control: TaskControl) =>
    planPieces(input, { solver: await openHighs(), ...control }),
};

export type TaskKind = keyof typeof TASKS;
export type TaskInput<K extends TaskKind> = Parameters<(typeof TASKS)[K]>[0];
export type TaskOutput<K extends TaskKind> = Awaited<ReturnType<(typeof TASKS)[K]>>;
