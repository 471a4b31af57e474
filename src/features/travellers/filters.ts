import { useSearchParams } from 'react-router-dom';
import { shownState, STEP_STATES, type ShownState } from '../../../shared/travellers/step';
import { stationNow } from './board-columns';
import type { BoardRow } from './board-rows';

/** What the board is narrowed down to; all of it stands in the address. */
export interface BoardFilter {
  stationId: string | null;
  state: ShownState | null;
  /** Part of a code or name, as typed. */
  piece: string;
  /** Code of the traveller whose detail is open. */
  open: string | null;
}

const plain = (text: string) => text.toUpperCase().replace(/[\s-]/g, '');

/**
 * Whether a traveller is in a state: any of its steps for the states of work, all of it for `passed` and `waiting`, which
 * nearly every traveller has somewhere.
 */
export const isInState = (row: BoardRow, state: ShownState): boolean =>
  state === 'passed' || state === 'waiting'
    ? row.state === state
    : row.steps.some((step) => shownState(step) === state);

/** Whether a filter lets a traveller through. */
export function matches(filter: BoardFilter, row: BoardRow): boolean {
  if (filter.stationId !== null && stationNow(row) !== filter.stationId) return false;
  if (filter.state !== null && !isInState(row, filter.state)) return false;
  const wanted = plain(filter.piece);
  return wanted === '' || plain(row.piece.code).includes(wanted) || plain(row.piece.name).includes(wanted);
}

/** How many travellers are in a state. */
export const countInState = (rows: readonly BoardRow[], state: ShownState): number =>
  rows.filter((row) => isInState(row, state)).length;

/** Read a filter from an address's query. */
export function filterFrom(query: URLSearchParams): BoardFilter {
  const state = query.get('state');
  return {
    stationId: query.get('station'),
    state: STEP_STATES.find((known) => known === state) ?? null,
    piece: query.get('piece') ?? '',
    open: query.get('open'),
  };
}

/** The query of a filter; what is not set is not written. */
export function queryOf(filter: BoardFilter): URLSearchParams {
  const query = new URLSearchParams();
  if (filter.stationId) query.set('station', filter.stationId);
  if (filter.state) query.set('state', filter.state);
  if (filter.piece) query.set('piece', filter.piece);
  if (filter.open) query.set('open', filter.open);
  return query;
}

/** The filter in the address, and the way to change it. */
export function useBoardFilter(): [BoardFilter, (change: Partial<BoardFilter>) => void] {
  const [query, setQuery] = useSearchParams();
  const change = (part: Partial<BoardFilter>) => {
    setQuery((now) => queryOf({ ...filterFrom(now), ...part }), {
      // Opening a traveller is a step that Back undoes; a filter is not.
      replace: !part.open,
      preventScrollReset: true,
    });
  };
  return [filterFrom(query), change];
}
