import { describe, expect, it } from 'vitest';
import type { StepRecord } from '../../../shared/contracts/live';
import {
  boardGroups,
  countInSpan,
  isAligned,
  stationsBeside,
} from '../../../src/features/travellers/board-columns';
import { boardRows } from '../../../src/features/travellers/board-rows';
import { countInState, filterFrom, matches, queryOf } from '../../../src/features/travellers/filters';
import { liveOf, pieceRecord, stepRecord } from './fixtures';

type Plan = readonly (readonly [name: string, stationId: string, state: StepRecord['state']])[];

/** A traveller by its code and steps. */
function traveller(code: string, plan: Plan) {
  return {
    piece: pieceRecord({ id: code, code, name: `Piece ${code}` }),
    steps: plan.map(([name, stationId, state], i) =>
      stepRecord({
        id: `${code}-${i}`,
        subAssemblyId: code,
        position: i + 1,
        name,
        operation: name,
        stationId,
        state,
      }),
    ),
  };
}

function rowsOf(...travellers: ReturnType<typeof traveller>[]) {
  const { records } = liveOf({
    subAssemblies: travellers.map(({ piece }) => piece),
    steps: travellers.flatMap(({ steps }) => steps),
  });
  return boardRows(records.subAssemblies, records.steps);
}

const FULL = (a: StepRecord['state'], b: StepRecord['state'], c: StepRecord['state']): Plan => [
  ['cut', 'saw', a],
  ['tack', 'glue', b],
  ['glue out', 'glue', c],
];

describe('boardRows', () => {
  it('boardRows > pieces in any order > by code as people count, V-9 before V-10, removed ones left out', () => {
    const rows = rowsOf(traveller('V-10', []), traveller('V-9', []), traveller('L-1', []));
    expect(rows.map((row) => row.piece.code)).toEqual(['L-1', 'V-9', 'V-10']);
    const { records } = liveOf({ subAssemblies: [pieceRecord({ removed: true })] });
    expect(boardRows(records.subAssemblies, records.steps)).toEqual([]);
  });

  it('boardRows > one step of many travellers changes > only that row is a new object', () => {
    const a = traveller('V-1', FULL('passed', 'ready', 'waiting'));
    const b = traveller('V-2', FULL('passed', 'ready', 'waiting'));
    const subAssemblies = [a.piece, b.piece];
    const before = liveOf({ subAssemblies, steps: [...a.steps, ...b.steps] }).records;
    const changed = { ...a.steps[1]!, state: 'in hand' as const, revision: 2 };
    const after = liveOf({ subAssemblies, steps: [a.steps[0]!, changed, a.steps[2]!, ...b.steps] }).records;
    const old = boardRows(before.subAssemblies, before.steps);
    const next = boardRows(after.subAssemblies, after.steps);
    expect(next[0]).not.toBe(old[0]);
    expect(next[0]?.state).toBe('in hand');
    expect(next[1]).toBe(old[1]);
  });
});

describe('boardGroups', () => {
  it('boardGroups > travellers with one other sequence > columns of the commonest, neighbours at one station under one line', () => {
    const [group, ...others] = boardGroups(
      rowsOf(
        traveller('V-1', FULL('ready', 'waiting', 'waiting')),
        traveller('V-2', [
          ['cut', 'saw', 'passed'],
          ['coat', 'paint', 'ready'],
        ]),
        traveller('V-3', FULL('passed', 'passed', 'in hand')),
      ),
    );
    expect(others).toEqual([]);
    expect(group?.columns.map((column) => column.name)).toEqual(['cut', 'tack', 'glue out']);
    expect(group?.spans).toEqual([
      { stationIds: ['saw'], from: 0, to: 1 },
      { stationIds: ['glue'], from: 1, to: 3 },
    ]);
    expect(group?.rows.map((row) => isAligned(group, row))).toEqual([true, false, true]);
  });

  it('boardGroups > letters with different steps > a chain for each; with the same steps > one chain for both', () => {
    const lantern: Plan = [
      ['cut', 'saw', 'ready'],
      ['hang', 'zone', 'waiting'],
    ];
    const bay = FULL('ready', 'waiting', 'waiting');
    expect(
      boardGroups(rowsOf(traveller('L-1', lantern), traveller('V-1', bay))).map((group) => group.letters),
    ).toEqual([['L'], ['V']]);
    expect(
      boardGroups(rowsOf(traveller('L-1', bay), traveller('V-1', bay))).map((group) => group.letters),
    ).toEqual([['L', 'V']]);
  });

  it('countInSpan > the same station over two spans > each traveller counts where its step is, one of its own only once', () => {
    const plan = (...states: StepRecord['state'][]): Plan => [
      ['lay out', 'bench', states[0] ?? 'waiting'],
      ['tack', 'glue', states[1] ?? 'waiting'],
      ['clean', 'bench', states[2] ?? 'waiting'],
    ];
    const [group] = boardGroups(
      rowsOf(
        traveller('V-1', plan('ready')),
        traveller('V-2', plan('passed', 'passed', 'in hand')),
        traveller('V-3', plan('passed', 'passed', 'passed')),
        traveller('V-4', [['wire', 'bench', 'ready']]),
        traveller('V-5', [['glaze', 'kiln', 'ready']]),
      ),
    );
    const counts = group?.spans.map((span) => countInSpan(group, span, span.stationIds[0] ?? ''));
    expect(counts).toEqual([2, 0, 1]);
    expect(group && stationsBeside(group)).toEqual(['kiln']);
  });
});

describe('filters', () => {
  const rows = rowsOf(
    traveller('V-01', FULL('passed', 'to check', 'waiting')),
    traveller('V-07', FULL('passed', 'passed', 'passed')),
    traveller('L-07', FULL('in hand', 'waiting', 'waiting')),
  );
  const ask = (query: string) =>
    rows.filter((row) => matches(filterFrom(new URLSearchParams(query)), row)).map((row) => row.piece.code);

  it('matches > station, state and code from an address > travellers whose present step is there', () => {
    expect(ask('')).toHaveLength(3);
    expect(ask('station=glue')).toEqual(['V-01']);
    expect(ask('state=passed')).toEqual(['V-07']);
    expect(ask('state=to+check')).toEqual(['V-01']);
    expect(ask('state=no-such-state')).toHaveLength(3);
    expect(ask('piece=v07')).toEqual(['V-07']);
    expect(ask('piece=-07')).toEqual(['L-07', 'V-07']);
    expect(ask('piece=07&state=in+hand')).toEqual(['L-07']);
  });

  it('queryOf > any filter > read back as it was; nothing set > an empty query', () => {
    const filter = { stationId: 'glue', state: 'to check', piece: 'v 0', open: 'V-01' } as const;
    expect(filterFrom(queryOf(filter))).toEqual(filter);
    expect(queryOf({ stationId: null, state: null, piece: '', open: null }).toString()).toBe('');
  });

  it('countInState > waiting steps behind a step in work > no traveller counts as waiting', () => {
    expect(countInState(rows, 'waiting')).toBe(0);
    expect(countInState(rows, 'in hand')).toBe(1);
  });
});
