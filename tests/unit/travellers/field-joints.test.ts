import { describe, expect, it } from 'vitest';
import { followPieces, type Step, type StepStateName } from '../../../shared/travellers';

const step = (position: number, state: StepStateName): Step => ({
  id: `s${position}`,
  subAssemblyId: 'joint',
  position,
  operation: 'other',
  name: 'Join',
  stationId: 'hall',
  hazards: ['ladder'],
  toolKinds: [],
  crewMin: 1,
  crewMax: 2,
  plannedSeconds: 300,
  clocks: null,
  needsCheck: true,
  state,
  held: null,
  crew: state === 'in hand' ? [{ personId: 'ann', claimedAt: 1 }] : [],
  doers: ['ann'],
  startedAt: null,
  finishedAt: null,
  finishedBy: null,
  dryUntil: null,
  passedAt: null,
  passedBy: null,
  rework: null,
  handOver: null,
  flags: [],
});
const states = (changed: readonly Step[]) => changed.map(({ id, state }) => [id, state]);
const among =
  (...passed: string[]) =>
  (id: string) =>
    passed.includes(id);

describe('followPieces', () => {
  const waiting = { needs: ['a', 'b'], steps: [step(1, 'waiting'), step(2, 'waiting')] };

  it('followPieces > the last piece that was missing passes > the first step opens, and only that', () => {
    expect(states(followPieces('b', [waiting], among('a', 'b')))).toEqual([['s1', 'ready']]);
  });

  it('followPieces > one of three pieces is still missing > nothing opens', () => {
    const three = { ...waiting, needs: ['a', 'b', 'c'] };
    expect(followPieces('b', [three], among('a', 'b'))).toEqual([]);
  });

  it('followPieces > a piece passes while the joint, typed in from paper, waits for its check > it stays there', () => {
    const typedIn = { needs: ['a', 'b'], steps: [step(1, 'to check')] };
    expect(followPieces('a', [typedIn], among('a'))).toEqual([]);
  });

  it('followPieces > a piece is sent back > work in hand on the joint waits and gives up its places, doers stay, what has passed stays', () => {
    const begun = { needs: ['a', 'b'], steps: [step(1, 'passed'), step(2, 'in hand'), step(3, 'waiting')] };
    const [changed, ...rest] = followPieces('a', [begun], among('b'));
    expect(rest).toEqual([]);
    expect(changed).toMatchObject({ id: 's2', state: 'waiting', crew: [], doers: ['ann'] });
  });
});
