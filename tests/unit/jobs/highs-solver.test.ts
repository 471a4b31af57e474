import { describe, expect, it } from 'vitest';
import { openHighs } from '../../../server/jobs/highs-solver';
import type { LinearProgram, ProgramColumn } from '../../../shared/kernel/linear-program';

const solver = await openHighs();

const column = (cost: number, entries: ProgramColumn['entries'], more: Partial<ProgramColumn> = {}) => ({
  cost,
  lower: 0,
  upper: Infinity,
  integer: false,
  entries,
  ...more,
});
const atLeast = (lower: number) => ({ lower, upper: Infinity });
const atMost = (upper: number) => ({ lower: -Infinity, upper });

// Wyndor Glass: Hillier & Lieberman, Introduction to Operations Research, section 3.1 (from memory): 2 and 6 batches, 36,000.
const wyndor: LinearProgram = {
  sense: 'maximise',
  rows: [atMost(4), atMost(12), atMost(18)],
  columns: [
    column(3, [
      [0, 1],
      [2, 3],
    ]),
    column(5, [
      [1, 2],
      [2, 2],
    ]),
  ],
};

describe('openHighs', () => {
  it('solve > the Wyndor Glass program > optimum, values and shadow prices of the textbook', () => {
    const answer = solver.solve(wyndor);
    expect(answer).toMatchObject({ status: 'optimal', objective: 36, bound: 36 });
    expect(answer.values.map((value) => Math.round(value * 1e6) / 1e6)).toEqual([2, 6]);
    expect(answer.duals.map((value) => Math.round(value * 1e6) / 1e6)).toEqual([0, 1.5, 1]);
  });

  it('solve > whole numbers wanted > a whole answer, no duals, bound and objective agree', () => {
    const answer = solver.solve({
      sense: 'maximise',
      rows: [atMost(5), atMost(45)],
      columns: [
        column(
          5,
          [
            [0, 1],
            [1, 5],
          ],
          { integer: true },
        ),
        column(
          8,
          [
            [0, 1],
            [1, 9],
          ],
          { integer: true },
        ),
      ],
    });
    // Hillier & Lieberman, section 12.7 (from memory): relaxed 41.25, whole 40 at (0, 5).
    expect(answer).toMatchObject({ status: 'optimal', objective: 40, bound: 40, duals: [] });
    expect(answer.values.map((value) => Math.round(value) + 0)).toEqual([0, 5]);
  });

  it('solve > conditions that contradict each other, and a cost that falls for ever > said as such, no values', () => {
    const tooLittle = solver.solve({
      sense: 'minimise',
      rows: [atLeast(4)],
      columns: [column(1, [[0, 1]], { upper: 3 })],
    });
    expect(tooLittle).toMatchObject({ status: 'infeasible', values: [] });
    const endless = solver.solve({ sense: 'minimise', rows: [atLeast(0)], columns: [column(-1, [[0, 1]])] });
    expect(endless).toMatchObject({ status: 'unbounded', values: [] });
  });

  it('open > columns added and a bound changed > each run starts from the last one and is right', () => {
    const open = solver.open({ sense: 'minimise', rows: [atLeast(4)], columns: [column(3, [[0, 2]])] });
    expect(open.run()).toMatchObject({ objective: 6, duals: [1.5] });
    open.addColumns([column(1, [[0, 2]])]);
    expect(open.run()).toMatchObject({ objective: 2, values: [0, 2] });
    open.setColumnBounds(1, 0, 1);
    expect(open.run()).toMatchObject({ objective: 4, values: [1, 1] });
    open.close();
  });

  it('run > no time for a hard program > an honest bound, and again with time on the same program the optimum', () => {
    // Equal shares of awkward numbers: easy to state, slow to prove.
    const sizes = Array.from({ length: 40 }, (_, index) => 1000 + ((index * 7919) % 997));
    const total = sizes.reduce((sum, size) => sum + size, 0);
    const program: LinearProgram = {
      sense: 'maximise',
      rows: [atMost(Math.floor(total / 2))],
      columns: sizes.map((size) => column(size, [[0, size]], { upper: 1, integer: true })),
    };
    const open = solver.open(program);
    const hurried = open.run({ seconds: 0 });
    expect(['limit', 'feasible']).toContain(hurried.status);
    expect(hurried.bound).toBeGreaterThanOrEqual(hurried.values.length > 0 ? hurried.objective : -Infinity);
    const full = open.run({ seconds: 20 });
    expect(full.objective).toBeLessThanOrEqual(Math.floor(total / 2));
    expect(full.bound).toBeGreaterThanOrEqual(full.objective);
    open.close();
  });
});
