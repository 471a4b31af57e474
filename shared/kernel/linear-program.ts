/** One variable of a linear program: its cost, its bounds and whether it must be a whole number. */
export type ProgramColumn = {
  cost: number;
  lower: number;
  /** `Infinity` where there is no limit. */
  upper: number;
  integer: boolean;
  /** The rows it stands in, by index from 0, each with its coefficient. */
  entries: readonly (readonly [row: number, coefficient: number])[];
};

/** One condition of a linear program: `lower <= sum of coefficient * variable <= upper`; infinite where it has no such side. */
export type ProgramRow = { lower: number; upper: number };

/** A (mixed-integer) linear program, written by columns. */
export type LinearProgram = {
  sense: 'minimise' | 'maximise';
  rows: readonly ProgramRow[];
  columns: readonly ProgramColumn[];
};

export type SolveLimits = {
  /** Seconds of wall clock; no limit when left out. */
  seconds?: number;
  /** Stop when the gap between the answer and the bound is at most this share; 0 when left out. */
  relativeGap?: number;
};

/** What a solver found. `feasible` is an answer that a limit kept from being proven. */
export type ProgramAnswer = {
  status: 'optimal' | 'feasible' | 'infeasible' | 'unbounded' | 'limit';
  /** The cost of `values`; NaN where there is no answer. */
  objective: number;
  /** What no answer can beat. */
  bound: number;
  /** One per column; empty where there is no answer. */
  values: readonly number[];
  /** One per row: the dual values of a program without whole numbers; empty otherwise. */
  duals: readonly number[];
};

/** A program kept in the solver, so that the next run starts from the last one's basis. */
export type OpenProgram = {
  addColumns(columns: readonly ProgramColumn[]): void;
  setColumnBounds(column: number, lower: number, upper: number): void;
  run(limits?: SolveLimits): ProgramAnswer;
  close(): void;
};

/** A solver of linear programs. It is a port: `shared/` names it, the server brings one, no page can pull it in. */
export type LinearSolver = {
  solve(program: LinearProgram, limits?: SolveLimits): ProgramAnswer;
  open(program: LinearProgram): OpenProgram;
};
