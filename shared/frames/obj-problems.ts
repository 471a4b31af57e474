import type { FileProblem, ProblemList } from './file-problems';

export type ObjProblemCode =
  | 'OBJ_TOO_LARGE'
  | 'OBJ_CUT_OFF'
  | 'OBJ_MISSING_JOINT'
  | 'OBJ_BAD_INDEX'
  | 'OBJ_NOT_A_NUMBER'
  | 'OBJ_TOO_FAR'
  | 'OBJ_ZERO_LENGTH'
  | 'OBJ_DOUBLED_STRUT'
  | 'OBJ_BAD_FACE'
  | 'OBJ_UNKNOWN_LINE'
  | 'OBJ_NO_STRUTS'
  | 'OBJ_MORE_PROBLEMS';

/** One thing wrong with an OBJ file. */
export type ObjProblem = FileProblem<ObjProblemCode>;

/** Problems of an OBJ file while it is read. */
export type ObjProblemList = ProblemList<ObjProblemCode>;
