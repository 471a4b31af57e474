import { useRef, useState } from 'react';
import type { DrawingView, PlacementInput, PlacementView } from '../../../shared/contracts/drawing';
import { newId } from '../../../shared/kernel/ids';
import { get, send } from '../../lib/api';

type Body = Omit<PlacementInput, 'revision'>;
type Change =
  | { kind: 'added'; id: string; body: Body }
  | { kind: 'removed'; id: string; body: Body }
  | { kind: 'edited'; id: string; before: Body; after: Body };

const bodyOf = ({ frameId, name, at, turn, pattern }: Body): Body => ({ frameId, name, at, turn, pattern });

/**
 * Undo and redo of changes of the drawing that were made on this page: each is one more change on the server, so that others see it and
 * the day log has it.
 */
export function useHistory(installationId: string, onDone: () => unknown) {
  const [done, setDone] = useState<readonly Change[]>([]);
  const [undone, setUndone] = useState<readonly Change[]>([]);
  const [error, setError] = useState<unknown>(null);
  // A placement that comes back has another id; changes that lie before it mean the same one.
  const idNow = useRef(new Map<string, string>());
  const busy = useRef(false);
  const path = `/installations/${installationId}/placements`;
  const now = (id: string): string => {
    let current = id;
    for (let next = idNow.current.get(current); next !== undefined; next = idNow.current.get(current))
      current = next;
    return current;
  };

  const put = async (id: string, body: Body) => {
    const view = await get<DrawingView>(`/installations/${installationId}/drawing`);
    const known = view.placements.find((placement) => placement.id === now(id));
    await send('PUT', `${path}/${now(id)}`, { ...body, revision: known?.revision ?? 0 }, newId());
  };
  const bring = async (id: string, body: Body) => {
    const made = await send<{ id: string }>('POST', path, body, newId());
    idNow.current.set(now(id), made.id);
  };
  const take = (id: string) => send('DELETE', `${path}/${now(id)}`, undefined, newId());

  const play = async (change: Change, back: boolean) => {
    if (change.kind === 'edited') await put(change.id, back ? change.before : change.after);
    else if ((change.kind === 'added') === back) await take(change.id);
    else await bring(change.id, change.body);
  };
  const go = (back: boolean) => {
    const [from, setFrom, setTo] = back ? [done, setDone, setUndone] : [undone, setUndone, setDone];
    const change = from.at(-1);
    if (!change || busy.current) return;
    busy.current = true;
    setError(null);
    play(change, back)
      .then(() => {
        setFrom((list) => list.slice(0, -1));
        setTo((list) => [...list, change]);
        return onDone();
      })
      .catch((problem: unknown) => setError(problem))
      .finally(() => {
        busy.current = false;
      });
  };
  const note = (change: Change) => {
    setDone((list) => [...list, change]);
    setUndone([]);
  };
  return {
    canUndo: done.length > 0,
    canRedo: undone.length > 0,
    error,
    undo: () => go(true),
    redo: () => go(false),
    added: (id: string, body: Body) => note({ kind: 'added', id, body: bodyOf(body) }),
    removed: (placement: PlacementView) =>
      note({ kind: 'removed', id: placement.id, body: bodyOf(placement) }),
    edited: (id: string, before: PlacementView, after: Body) =>
      note({ kind: 'edited', id, before: bodyOf(before), after: bodyOf(after) }),
  };
}
