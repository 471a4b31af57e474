import type { StepRecord } from '../../../shared/contracts/live';
import { chainBehind } from '../../../shared/travellers/bench';
import { clockGate } from '../../../shared/travellers/clocks';
import type { WallPiece } from './wall-drawing';

/** A step that people can go to now. */
export interface Wanted {
  pieceId: string;
  code: string;
  step: StepRecord;
  hands: number;
}

/** Hands that a step lacks; 0 when it wants none. */
function handsOf(step: StepRecord, traveller: readonly StepRecord[], now: number): number {
  if (step.held) return 0;
  if (step.state === 'in hand')
    return step.startedAt === null ? Math.max(0, step.crewMin - step.crew.length) : 0;
  if (step.state !== 'ready' && step.state !== 'rework') return 0;
  return clockGate(traveller, step, now).refusal ? 0 : step.crewMin;
}

/**
 * Where hands are wanted: first crews that wait for one more, then the longest chains of work behind. Each kind of step
 * comes once before any comes twice, so that the wall does not name ten pieces for the same bench.
 * @param pieces every piece with its steps
 * @param now ms UTC
 */
export function handsWanted(pieces: readonly WallPiece[], now: number): Wanted[] {
  const all = pieces.flatMap(({ piece, steps }) =>
    steps.flatMap((step) => {
      const hands = handsOf(step, steps, now);
      if (hands === 0) return [];
      const behind = chainBehind(steps, step).seconds + step.plannedSeconds;
      return [{ pieceId: piece.id, code: piece.code, step, hands, behind }];
    }),
  );
  all.sort(
    (a, b) => Number(b.step.state === 'in hand') - Number(a.step.state === 'in hand') || b.behind - a.behind,
  );
  const seen = new Map<string, number>();
  return all
    .map((wanted) => {
      const kind = `${wanted.step.name} ${wanted.step.stationId}`;
      const turn = seen.get(kind) ?? 0;
      seen.set(kind, turn + 1);
      return { wanted, turn };
    })
    .sort((a, b) => a.turn - b.turn)
    .map(({ wanted: { pieceId, code, step, hands } }) => ({ pieceId, code, step, hands }));
}
