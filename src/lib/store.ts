import { useSyncExternalStore } from 'react';

/** A value outside React that components can read and follow. */
export interface Store<T> {
  get: () => T;
  set: (next: T | ((now: T) => T)) => void;
  subscribe: (listener: () => void) => () => void;
}

/** Make a store. */
export function createStore<T>(initial: T): Store<T> {
  let value = initial;
  const listeners = new Set<() => void>();
  return {
    get: () => value,
    set: (next) => {
      const made = typeof next === 'function' ? (next as (now: T) => T)(value) : next;
      if (Object.is(made, value)) return;
      value = made;
      for (const listener of listeners) listener();
    },
    subscribe: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}

/** Follow a store, or a part of it. */
export function useStore<T, S = T>(
  store: Store<T>,
  select: (value: T) => S = (value) => value as unknown as S,
): S {
  return useSyncExternalStore(store.subscribe, () => select(store.get()));
}
