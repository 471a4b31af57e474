export { analyseStiffness, countStiffness } from './analyse-stiffness';
export type { Stiffness, StiffnessCounts, StiffnessRefusal } from './analyse-stiffness';
export { proposeBraces } from './propose-braces';
export type {
  BraceOptions,
  BraceProposal,
  BraceRefusal,
  BraceShortfall,
  ProposedBrace,
} from './propose-braces';
export { shownMovement } from './shown-movement';
export { PIN_JOINT_WORDS, stiffnessText } from './stiffness-words';
