import { useEffect, useRef, useState } from 'react';
import type { StepRecord } from '../../../shared/contracts/live';
import { shownState, type ShownState } from '../../../shared/travellers/step';
import { listed } from '../../lib/formats';
import type { LiveMaps } from '../../lib/live-state';
import { createStore, useStore } from '../../lib/store';

/** How long a change is told in its row. */
export const NOTE_MS = 7000;
/** More changed pieces at once than people can make are a reload, and no news. */
const MOST_AT_ONCE = 30;

/** A change that just came in. */
export interface LiveNote {
  text: string;
  state: ShownState;
  /** Of several changes of one piece the weightiest is told. */
  weight: number;
}

const added = (before: StepRecord, after: StepRecord, nameOf: (id: string) => string) =>
  listed(
    after.crew
      .filter(({ personId }) => before.crew.every((member) => member.personId !== personId))
      .map(({ personId }) => nameOf(personId)),
  );

/** What changed from one record of a step to the next, in words; null when nothing that people need to see. */
export function noteOf(
  before: StepRecord,
  after: StepRecord,
  nameOf: (id: string) => string,
): LiveNote | null {
  const state = shownState(after);
  const note = (weight: number, text: string): LiveNote => ({ text, state, weight });
  if (after.held && !before.held) return note(9, `${nameOf(after.held.by)} held it just now`);
  if (before.held && !after.held) return note(8, 'released just now');
  if (after.state !== before.state) {
    const told = newState(before, after, nameOf);
    if (told) return note(...told);
  }
  const came = added(before, after, nameOf);
  if (came) return note(5, `${came} joined just now`);
  const left = added(after, before, nameOf);
  if (left) return note(4, `${left} gave it back just now`);
  if (after.handOver && !before.handOver) return note(3, `offered to ${nameOf(after.handOver.to)} just now`);
  if (after.startedAt !== null && before.startedAt === null) return note(3, `${after.name} begun just now`);
  if (after.dryUntil !== null && after.dryUntil !== before.dryUntil) return note(2, 'dries longer');
  return null;
}

function newState(
  before: StepRecord,
  after: StepRecord,
  nameOf: (id: string) => string,
): [weight: number, text: string] | null {
  switch (after.state) {
    case 'passed':
      return [7, `${after.name} passed just now`];
    case 'rework':
      return [
        8,
        before.state === 'in hand' ? `${after.name} given back just now` : `${after.name} sent back`,
      ];
    case 'in hand':
      return [6, `${added(before, after, nameOf) || 'somebody'} took it just now`];
    case 'to check':
    case 'drying':
      return [6, `${after.finishedBy ? nameOf(after.finishedBy) : 'somebody'} finished just now`];
    case 'ready':
      return before.state === 'in hand'
        ? [4, `${added(after, before, nameOf) || 'somebody'} gave it back just now`]
        : [1, `${after.name} ready just now`];
    case 'waiting':
      return null;
  }
}

/**
 * The notes of everything that changed between two states of the steps.
 * @returns the weightiest note by sub-assembly; empty after a reload, when everything is new at once
 */
export function notesBetween(
  before: LiveMaps['steps'],
  after: LiveMaps['steps'],
  nameOf: (id: string) => string,
): Map<string, LiveNote> {
  const notes = new Map<string, LiveNote>();
  if (before.size === 0) return notes;
  for (const step of after.values()) {
    const old = before.get(step.id);
    if (!old || old === step || step.removed) continue;
    const note = noteOf(old, step, nameOf);
    const known = notes.get(step.subAssemblyId);
    if (note && note.weight > (known?.weight ?? 0)) notes.set(step.subAssemblyId, note);
  }
  return notes.size > MOST_AT_ONCE ? new Map<string, LiveNote>() : notes;
}

/** What just changed, by sub-assembly; each note goes after some seconds. */
export function useLiveNotes(
  steps: LiveMaps['steps'],
  nameOf: (id: string) => string,
): ReadonlyMap<string, LiveNote> {
  const [store] = useState(() => createStore<ReadonlyMap<string, LiveNote>>(new Map()));
  const seen = useRef(steps);
  const timers = useRef(new Set<ReturnType<typeof setTimeout>>());
  useEffect(() => {
    const fresh = notesBetween(seen.current, steps, nameOf);
    seen.current = steps;
    if (fresh.size === 0) return;
    store.set((now) => new Map([...now, ...fresh]));
    const timer = setTimeout(() => {
      timers.current.delete(timer);
      // A newer note of the same piece keeps its own time.
      store.set((now) => new Map([...now].filter(([id, note]) => fresh.get(id) !== note)));
    }, NOTE_MS);
    timers.current.add(timer);
  }, [steps, nameOf, store]);
  useEffect(() => {
    const running = timers.current;
    return () => running.forEach(clearTimeout);
  }, []);
  return useStore(store);
}
