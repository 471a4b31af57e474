import { useMemo } from 'react';
import type { StepRecord, SubAssemblyRecord } from '../../../shared/contracts/live';
import { bench, type Bench } from '../../../shared/travellers/bench';
import { useLive } from '../../lib/live';
import type { LiveState } from '../../lib/live-state';
import { useServerNow } from '../../lib/server-clock';
import { worldOf } from '../../lib/world';

const whole = (state: LiveState) => state;

/** Steps of each traveller in order, travellers by code; what was taken out of the plan is left out. */
export function travellersOf(state: LiveState): { piece: SubAssemblyRecord; steps: StepRecord[] }[] {
  const ofPiece = new Map<string, StepRecord[]>();
  for (const step of state.records.steps.values()) {
    if (step.removed) continue;
    const steps = ofPiece.get(step.subAssemblyId);
    if (steps) steps.push(step);
    else ofPiece.set(step.subAssemblyId, [step]);
  }
  return [...state.records.subAssemblies.values()]
    .filter((piece) => !piece.removed)
    .sort((a, b) => a.code.localeCompare(b.code, 'en', { numeric: true }))
    .map((piece) => ({
      piece,
      steps: (ofPiece.get(piece.id) ?? []).sort((a, b) => a.position - b.position),
    }));
}

/** Everything My bench shows of one person, from the live state. */
export interface MyBench extends Bench {
  now: number;
  state: LiveState;
  /** Steps this person did that dry now, or whose clock has just run out. */
  drying: StepRecord[];
  /** Started by nobody because hands are missing, where this person could help. */
  handsWanted: StepRecord[];
}

/** My bench of a person; undefined until the live state is there. */
export function useMyBench(installationId: string, personId: string): MyBench | undefined {
  const state = useLive(installationId, whole);
  const now = useServerNow(15_000);
  return useMemo(() => {
    if (!state) return undefined;
    const travellers = travellersOf(state);
    const sorted = bench(
      personId,
      travellers.map(({ steps }) => steps),
      (step) => worldOf(state, personId, step, now),
    );
    const mine = travellers.flatMap(({ steps }) => steps).filter((step) => step.doers.includes(personId));
    const drying = mine.filter((step) => step.state === 'drying');
    const here = new Set(sorted.inHand.map((step) => step.stationId));
    // Nearby first: where this person stands already.
    const handsWanted = sorted.canTake
      .filter(({ step }) => step.state === 'in hand' && step.crew.length < step.crewMin)
      .map(({ step }) => step as StepRecord)
      .sort((a, b) => Number(here.has(b.stationId)) - Number(here.has(a.stationId)));
    return { ...sorted, now, state, drying, handsWanted };
  }, [state, personId, now]);
}
