import loadHighs, { type Highs, type Model, type ModelStatusCode } from 'highs';
import type {
  LinearProgram,
  LinearSolver,
  OpenProgram,
  ProgramAnswer,
  ProgramColumn,
  SolveLimits,
} from '../../shared/kernel/linear-program';

let loaded: Promise<Highs> | null = null;

/** The solver HiGHS in this thread; its code is loaded once. A run blocks the thread: use it in a worker. */
export async function openHighs(): Promise<LinearSolver> {
  loaded ??= loadHighs();
  const highs = await loaded;
  return {
    open: (program) => new Opened(highs, program),
    solve: (program, limits) => {
      const opened = new Opened(highs, program);
      try {
        return opened.run(limits);
      } finally {
        opened.close();
      }
    },
  };
}

/** Columns as the solver takes them: packed, column after column. */
function packed(columns: readonly ProgramColumn[]) {
  const size = columns.reduce((sum, column) => sum + column.entries.length, 0);
  const starts = new Int32Array(columns.length + 1);
  const indices = new Int32Array(size);
  const values = new Float64Array(size);
  let at = 0;
  for (const [index, column] of columns.entries()) {
    for (const [row, coefficient] of column.entries) {
      indices[at] = row;
      values[at] = coefficient;
      at += 1;
    }
    starts[index + 1] = at;
  }
  return {
    cost: Float64Array.from(columns, (column) => column.cost),
    lower: Float64Array.from(columns, (column) => column.lower),
    upper: Float64Array.from(columns, (column) => column.upper),
    integers: Int32Array.from(columns, (column) => (column.integer ? 1 : 0)),
    matrix: { format: 'csc' as const, starts, indices, values },
  };
}

const OPTIMAL: ModelStatusCode = 7;
const INFEASIBLE: ModelStatusCode = 8;
const UNBOUNDED: readonly ModelStatusCode[] = [9, 10];
/** The solver takes finite numbers only. */
const UNLIMITED_SECONDS = 1e9;
/** A native value that says that a point meets all conditions. */
const FEASIBLE_POINT = 2;

class Opened implements OpenProgram {
  private readonly model: Model & { dispose(): void };
  private readonly rows: number;
  private count: number;
  private hasIntegers: boolean;
  private readonly minimise: boolean;

  constructor(highs: Highs, program: LinearProgram) {
    const { cost, lower, upper, integers, matrix } = packed(program.columns);
    this.rows = program.rows.length;
    this.count = program.columns.length;
    this.hasIntegers = integers.includes(1);
    this.minimise = program.sense === 'minimise';
    const { objectiveSense } = highs.constants;
    this.model = highs.createModel({
      numCols: this.count,
      numRows: this.rows,
      sense: this.minimise ? objectiveSense.minimize : objectiveSense.maximize,
      colCost: cost,
      colLower: lower,
      colUpper: upper,
      rowLower: Float64Array.from(program.rows, (row) => row.lower),
      rowUpper: Float64Array.from(program.rows, (row) => row.upper),
      matrix: { ...matrix, numRows: this.rows, numCols: this.count },
      // Integrality makes it a mixed-integer run, which gives no duals: leave it out where no column needs it.
      ...(this.hasIntegers ? { integrality: integers } : {}),
    });
    this.model.options.set({ output_flag: false });
  }

  addColumns(columns: readonly ProgramColumn[]): void {
    if (columns.length === 0) return;
    for (const column of columns) {
      this.model.addCol(column.cost, column.lower, column.upper, {
        indices: column.entries.map(([row]) => row),
        values: column.entries.map(([, coefficient]) => coefficient),
      });
      if (column.integer) {
        this.model.changeColIntegrality(this.count, 1);
        this.hasIntegers = true;
      }
      this.count += 1;
    }
  }

  setColumnBounds(column: number, lower: number, upper: number): void {
    this.model.changeColBounds(column, lower, upper);
  }

  run(limits: SolveLimits = {}): ProgramAnswer {
    // The solver's clock adds up over runs; a limit is meant for this one.
    this.model.zeroAllClocks();
    this.model.options.set({
      time_limit: limits.seconds ?? UNLIMITED_SECONDS,
      mip_rel_gap: limits.relativeGap ?? 0,
    });
    this.model.run();
    const code = this.model.getModelStatus();
    const found =
      code === OPTIMAL || Number(this.model.info.get('primal_solution_status')) === FEASIBLE_POINT;
    const status = statusOf(code, found);
    if (!found || status === 'infeasible' || status === 'unbounded') {
      const worst = this.minimise ? -Infinity : Infinity;
      return { status, objective: Number.NaN, bound: worst, values: [], duals: [] };
    }
    const solution = this.model.getSolution();
    const objective = this.model.getObjectiveValue();
    return {
      status,
      objective,
      bound: this.boundOf(status, objective),
      values: Array.from(solution.colValue),
      duals: this.hasIntegers ? [] : Array.from(solution.rowDual),
    };
  }

  close(): void {
    this.model.dispose();
  }

  private boundOf(status: ProgramAnswer['status'], objective: number): number {
    if (!this.hasIntegers) return status === 'optimal' ? objective : this.minimise ? -Infinity : Infinity;
    return Number(this.model.info.get('mip_dual_bound'));
  }
}

function statusOf(code: ModelStatusCode, found: boolean): ProgramAnswer['status'] {
  if (code === OPTIMAL) return 'optimal';
  if (code === INFEASIBLE) return 'infeasible';
  if (UNBOUNDED.includes(code)) return 'unbounded';
  return found ? 'feasible' : 'limit';
}
