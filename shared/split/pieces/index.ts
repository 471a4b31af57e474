export { pieceFrames } from './piece-frame';
export type { PieceFrame } from './piece-frame';
export { moved } from './rigid-motion';
export type { Motion, Rotation } from './rigid-motion';
export type { PieceShape } from './piece-traits';
export { identicalPieces } from './identical-pieces';
export type { PieceGroup, PieceLikeness } from './identical-pieces';
export { numberedPieces } from './numbered-pieces';
export type { NumberedPieces } from './numbered-pieces';
export { planarRings } from './planar-rings';
export type { Ring } from './ring-plane';
export { areLinked } from './ring-plane';
export { chooseFlats } from './flats';
export type { Flats, FlatsOptions } from './flats';
export { pieceAdjacency, pieceMeetings } from './neighbours';
export type { PieceMeeting } from './neighbours';
export { assemblyMoves } from './assembly-moves';
export type { AssemblyOptions } from './assembly-moves';
export { strutsInOrder } from './moves';
export type { Brace, Hold, Move } from './moves';
export { moveText, strutNames } from './move-text';
export type { StrutNames } from './move-text';
export { pieceCodes, pieceLetter } from './codes';
export { PIECE_COLOURS, PIECE_PATTERNS, pieceMarks } from './piece-marks';
export type { MarkClash, PieceColour, PieceMark, PiecePattern } from './piece-marks';
export { applyToTheRest, splitChanges } from './split-changes';
export type {
  KnownPiece,
  NewPiece,
  PieceChange,
  RestOfSplit,
  SplitChanges,
  StepProgress,
  StrutKey,
  TouchedPiece,
} from './split-changes';
export { splitFigures } from './split-figures';
export type { PieceFigures, SplitFigures, SplitState, SplitWeights } from './split-figures';
export { moveStruts } from './move-struts';
export type { MoveOptions, MoveRefusal, PieceLimits, SplitProblem, StrutMove } from './move-struts';
