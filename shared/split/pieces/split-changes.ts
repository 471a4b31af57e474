import { greatestAssignment } from './assignment';
import type { Overlap } from './assignment';

/** What names a strut through changes of the drawing. */
export type StrutKey = string | number;

/** A piece as travellers were made for it. */
export type KnownPiece = { id: string; code: string; struts: readonly StrutKey[] };
/** A piece of the new split. */
export type NewPiece = { struts: readonly StrutKey[] };
/** A step of an old piece's traveller, in the words of the travellers. */
export type StepProgress = { id: string; name: string; state: string };

/** What becomes of a piece. `piece` is an index into the new split, `id` and `code` are the old piece's. */
export type PieceChange =
  | { kind: 'unchanged'; piece: number; id: string; code: string }
  | { kind: 'changed'; piece: number; id: string; code: string; added: StrutKey[]; removed: StrutKey[] }
  | { kind: 'new'; piece: number; added: StrutKey[] }
  | { kind: 'gone'; id: string; code: string; removed: StrutKey[] };

/** A change that would touch work that has begun. */
export type TouchedPiece = {
  id: string;
  code: string;
  kind: 'changed' | 'gone';
  added: StrutKey[];
  removed: StrutKey[];
  steps: StepProgress[];
};

export type SplitChanges = {
  /** New pieces in their order, then pieces that are gone, by the order of the old ones. */
  changes: PieceChange[];
  /** Not empty: the update is refused as a whole; see `applyToTheRest`. */
  touched: TouchedPiece[];
};

/** States in which nothing has been done yet: such a step may be changed. */
const UNTOUCHED: ReadonlySet<string> = new Set(['waiting', 'ready']);

const startedSteps = (steps: readonly StepProgress[] | undefined): StepProgress[] =>
  (steps ?? []).filter(({ state }) => !UNTOUCHED.has(state));

/** How many struts each old and new piece have in common. */
function overlapsOf(before: readonly KnownPiece[], after: readonly NewPiece[]): Overlap[] {
  const oldOf = new Map<StrutKey, number>();
  before.forEach(({ struts }, piece) => struts.forEach((strut) => oldOf.set(strut, piece)));
  const shared = new Map<string, Overlap>();
  after.forEach(({ struts }, column) => {
    for (const strut of struts) {
      const row = oldOf.get(strut);
      if (row === undefined) continue;
      const key = `${row}:${column}`;
      const known = shared.get(key);
      if (known) known.weight += 1;
      else shared.set(key, { row, column, weight: 1 });
    }
  });
  return [...shared.values()];
}

/**
 * What a new split changes of the pieces that travellers were made for, and where it would touch work that has begun.
 * @param before the pieces as they are; no strut in two of them
 * @param after the pieces of the new split; no strut in two of them
 * @param progress per id of an old piece the steps of its traveller; a step counts as begun when it is neither waiting nor ready
 * @returns each old piece matched with at most one new one, so that matched pieces have as many struts in common as possible; among equal
 *   ones so that a piece with begun work keeps a successor. A piece whose struts are the same is always matched with itself.
 * Source: own; assignment by the Hungarian method.
 */
export function splitChanges(
  before: readonly KnownPiece[],
  after: readonly NewPiece[],
  progress: ReadonlyMap<string, readonly StepProgress[]>,
): SplitChanges {
  const begun = before.map(({ id }) => startedSteps(progress.get(id)));
  // Whole numbers: a strut in common outweighs all preferences for begun work together.
  const strut = before.length + 1;
  const newOf = greatestAssignment(
    before.length,
    overlapsOf(before, after).map((overlap) => ({
      ...overlap,
      weight: overlap.weight * strut + (begun[overlap.row]!.length > 0 ? 1 : 0),
    })),
  );
  const oldOf = new Map(newOf.flatMap((piece, old): [number, number][] => (piece < 0 ? [] : [[piece, old]])));

  const changes = after.map(({ struts }, piece): PieceChange => {
    const old = before[oldOf.get(piece) ?? -1];
    if (!old) return { kind: 'new', piece, added: [...struts] };
    const [was, is] = [new Set(old.struts), new Set(struts)];
    const added = struts.filter((key) => !was.has(key));
    const removed = old.struts.filter((key) => !is.has(key));
    const { id, code } = old;
    return added.length + removed.length === 0
      ? { kind: 'unchanged', piece, id, code }
      : { kind: 'changed', piece, id, code, added, removed };
  });
  newOf.forEach((piece, old) => {
    const { id, code, struts } = before[old]!;
    if (piece < 0) changes.push({ kind: 'gone', id, code, removed: [...struts] });
  });

  const stepsOf = new Map(before.map(({ id }, old) => [id, begun[old]!]));
  const touched = changes.flatMap((change): TouchedPiece[] => {
    if (change.kind !== 'changed' && change.kind !== 'gone') return [];
    const steps = stepsOf.get(change.id)!;
    if (steps.length === 0) return [];
    const { kind, id, code, removed } = change;
    return [{ kind, id, code, added: kind === 'changed' ? change.added : [], removed, steps }];
  });
  return { changes, touched };
}

/** A new split in which pieces with begun work stay as they are. */
export type RestOfSplit = {
  pieces: { id: string | null; code: string | null; struts: StrutKey[] }[];
  /** Pieces with begun work that were left as they are. */
  kept: { id: string; code: string }[];
  /** Why it still cannot be applied: struts of begun pieces that the new drawing does not have. */
  missing: { id: string; code: string; struts: StrutKey[] }[];
};

/**
 * Applies a new split to all pieces but those whose change would touch begun work.
 * @param before as for `splitChanges`
 * @param after as for `splitChanges`
 * @param changes what `splitChanges` returned for the two
 * @returns begun pieces with exactly their old struts, then the new pieces without those struts, under the code of their old piece
 *   where that one was not kept; pieces left without struts vanish. What a kept piece would have got is added to nothing: such struts
 *   stand in a piece of their own without a code. Whether pieces that gave up struts are still connected is for the caller to look at
 *   (see `splitFigures`). Not to be applied while `missing` names anything.
 * Source: own.
 */
export function applyToTheRest(
  before: readonly KnownPiece[],
  after: readonly NewPiece[],
  { changes, touched }: SplitChanges,
): RestOfSplit {
  const held = new Set(touched.map(({ id }) => id));
  const kept = before.filter(({ id }) => held.has(id));
  const frozen = new Set(kept.flatMap(({ struts }) => struts));
  const drawn = new Set(after.flatMap(({ struts }) => struts));
  const pieces: RestOfSplit['pieces'] = kept.map(({ id, code, struts }) => ({
    id,
    code,
    struts: [...struts],
  }));
  for (const change of changes) {
    if (change.kind === 'gone') continue;
    const struts = after[change.piece]!.struts.filter((key) => !frozen.has(key));
    if (struts.length === 0) continue;
    const known = change.kind !== 'new' && !held.has(change.id);
    pieces.push({ id: known ? change.id : null, code: known ? change.code : null, struts });
  }
  return {
    pieces,
    kept: kept.map(({ id, code }) => ({ id, code })),
    missing: kept.flatMap(({ id, code, struts }) => {
      const gone = struts.filter((key) => !drawn.has(key));
      return gone.length === 0 ? [] : [{ id, code, struts: gone }];
    }),
  };
}
