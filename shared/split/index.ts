export * from './limits';
export * from './partition';
export * from './pieces';
export { planPieces, planSplit, reviseSplit } from './plan-split';
export type { PlanControl, PlanPiecesInput, PlanSplitInput, ReviseSplitInput } from './plan-split';
