import type { StepRecord } from '../../../shared/contracts/live';
import type { BoardRow } from './board-rows';

/** One column of the chain: a step that the travellers of a group have in common. */
export interface Column {
  name: string;
  /** Where it is done, the commonest first. */
  stationIds: readonly string[];
}

/** Columns next to each other with the same stations: one dimension line. */
export interface Span {
  stationIds: readonly string[];
  /** First column, and the one after the last. */
  from: number;
  to: number;
}

/** Travellers one below the other under one chain. */
export interface Group {
  /** Letters of the codes, such as `L` or `L, V`. */
  letters: readonly string[];
  columns: readonly Column[];
  spans: readonly Span[];
  rows: readonly BoardRow[];
  /** The sequence of steps that the columns stand for. */
  sequence: string;
}

/** What makes two travellers go through the same steps: operation and name of each, in order. */
export const sequenceOf = (steps: readonly Pick<StepRecord, 'operation' | 'name'>[]): string =>
  steps.map((step) => `${step.operation}\t${step.name}`).join('\n');

/** The letters a code begins with. */
const lettersOf = (code: string): string => code.split('-', 1)[0] ?? code;

/** Things by how often they come, the commonest first; of equals the one that came first. */
function byFrequency(things: Iterable<string>): string[] {
  const counts = new Map<string, number>();
  for (const thing of things) counts.set(thing, (counts.get(thing) ?? 0) + 1);
  return [...counts].sort((a, b) => b[1] - a[1]).map(([thing]) => thing);
}

/**
 * The groups of the board. Pieces whose codes begin with the same letters stand under the commonest of their sequences;
 * letters that follow one another with the same sequence share a group.
 * @param rows every traveller, in the order shown; filters do not change the groups, so that columns stay where they are
 */
export function boardGroups(rows: readonly BoardRow[]): Group[] {
  const runs: { letters: string; rows: BoardRow[] }[] = [];
  for (const row of rows) {
    const letters = lettersOf(row.piece.code);
    const last = runs.at(-1);
    if (last?.letters === letters) last.rows.push(row);
    else runs.push({ letters, rows: [row] });
  }
  const groups: { letters: string[]; rows: BoardRow[]; sequence: string }[] = [];
  for (const run of runs) {
    const sequence = byFrequency(run.rows.map((row) => sequenceOf(row.steps)))[0] ?? '';
    const last = groups.at(-1);
    if (last?.sequence === sequence) {
      last.letters.push(run.letters);
      last.rows.push(...run.rows);
    } else groups.push({ letters: [run.letters], rows: run.rows, sequence });
  }
  return groups.map((group) => {
    const columns = columnsOf(group.rows.filter((row) => sequenceOf(row.steps) === group.sequence));
    return { ...group, columns, spans: spansOf(columns) };
  });
}

function columnsOf(aligned: readonly BoardRow[]): Column[] {
  return (aligned[0]?.steps ?? []).map((step, i) => ({
    name: step.name,
    stationIds: byFrequency(aligned.flatMap((row) => row.steps[i]?.stationId ?? [])),
  }));
}

function spansOf(columns: readonly Column[]): Span[] {
  const spans: Span[] = [];
  columns.forEach((column, i) => {
    const last = spans.at(-1);
    if (last && last.stationIds.join() === column.stationIds.join()) last.to = i + 1;
    else spans.push({ stationIds: column.stationIds, from: i, to: i + 1 });
  });
  return spans;
}

/** Whether a traveller goes through the very steps of its group's columns. */
export const isAligned = (group: Pick<Group, 'sequence'>, row: BoardRow): boolean =>
  sequenceOf(row.steps) === group.sequence;

/** Where a traveller is now: the station of its current step; nowhere when it has passed or waits. */
export const stationNow = (row: BoardRow): string | null =>
  row.state === 'passed' || row.state === 'waiting' ? null : (row.current?.stationId ?? null);

/**
 * How many travellers of a group are at a station within a span now. A traveller with steps of its own counts in the
 * first span that has its station.
 */
export function countInSpan(group: Group, span: Span, stationId: string): number {
  const first = group.spans.find((other) => other.stationIds.includes(stationId));
  return group.rows.filter((row) => {
    if (stationNow(row) !== stationId) return false;
    if (!isAligned(group, row)) return span === first;
    const at = row.steps.findIndex((step) => step === row.current);
    return at >= span.from && at < span.to;
  }).length;
}

/** Stations at which a group's travellers are now and that stand over none of its columns. */
export function stationsBeside(group: Group): string[] {
  const over = new Set(group.spans.flatMap((span) => span.stationIds));
  return byFrequency(group.rows.flatMap((row) => stationNow(row) ?? [])).filter((id) => !over.has(id));
}
