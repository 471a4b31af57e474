import { describe, expect, it } from 'vitest';
import { templateStepSchema } from '../../../shared/contracts/travellers';
import { defaultTemplateSteps } from '../../../shared/travellers/default-template';
import { OPERATIONS, plannedSeconds } from '../../../shared/travellers';

const STATIONS = [
  { id: 'bench-1', kind: 'bench' },
  { id: 'saw-1', kind: 'saw' },
  { id: 'glue-1', kind: 'glue' },
  { id: 'glue-2', kind: 'glue' },
  { id: 'bay', kind: 'paint bay' },
  { id: 'hall', kind: 'hanging zone' },
];

describe('plannedSeconds', () => {
  it.each([
    [{ fixed: 4, perCut: 0.6, perJoint: 0 }, { cuts: 30, joints: 12 }, 22 * 60],
    [{ fixed: 3, perCut: 0, perJoint: 1 }, { cuts: 30, joints: 12 }, 15 * 60],
    [{ fixed: 4, perCut: 0.2, perJoint: 0.3 }, { cuts: 6, joints: 4 }, 384],
    [{ fixed: 1.008, perCut: 0, perJoint: 0 }, { cuts: 1, joints: 1 }, 60],
    [{ fixed: 2.01, perCut: 0, perJoint: 0 }, { cuts: 1, joints: 1 }, 121],
  ])('plannedSeconds > %j for %j > %d whole seconds', (minutes, counts, seconds) => {
    expect(plannedSeconds(minutes, counts)).toBe(seconds);
  });

  it('plannedSeconds > next to nothing, or nothing > one minute at least', () => {
    expect(plannedSeconds({ fixed: 0, perCut: 0, perJoint: 0 }, { cuts: 9, joints: 9 })).toBe(60);
    expect(plannedSeconds({ fixed: 0.5, perCut: 0, perJoint: 0 }, { cuts: 0, joints: 0 })).toBe(60);
  });
});

describe('defaultTemplateSteps', () => {
  const steps = defaultTemplateSteps(STATIONS);

  it('defaultTemplateSteps > stations of every kind > the usual order, each at the first station of its kind', () => {
    expect(steps.map(({ name, stationId }) => [name, stationId])).toEqual([
      ['cut', 'saw-1'],
      ['lay out', 'bench-1'],
      ['tack', 'glue-1'],
      ['raise', 'glue-1'],
      ['glue out', 'glue-1'],
      ['clean', 'bench-1'],
      ['coat', 'bay'],
      ['hang', 'hall'],
    ]);
  });

  it('defaultTemplateSteps > as it comes > every step is one that a template may hold', () => {
    for (const step of steps) {
      expect(templateStepSchema.safeParse(step).error?.issues ?? []).toEqual([]);
      expect(OPERATIONS).toContain(step.operation);
    }
  });

  it('defaultTemplateSteps > glueing > has the hot-glue hazard, so nobody unbriefed can take it', () => {
    const hot = steps.filter((step) => step.toolKinds.includes('hot-glue gun'));
    expect(hot.map(({ name }) => name)).toEqual(['tack', 'raise', 'glue out']);
    for (const step of hot) expect(step.hazards).toContain('hot-glue');
  });

  it('defaultTemplateSteps > the clocks of the coat > in the order in which they run out', () => {
    const clocks = steps.find((step) => step.operation === 'coat')?.clocks;
    expect(clocks?.touchDry).toBeLessThan(clocks?.handleFrom ?? 0);
    expect(clocks?.handleFrom).toBeLessThanOrEqual(clocks?.hangFrom ?? 0);
  });

  it('defaultTemplateSteps > only one bench, only another room, no station at all > the nearest that there is', () => {
    const at = (stations: { id: string; kind: string }[]) =>
      new Set(defaultTemplateSteps(stations).map(({ stationId }) => stationId));
    expect(at([{ id: 'bench-1', kind: 'bench' }])).toEqual(new Set(['bench-1']));
    expect(at([{ id: 'yard', kind: 'other' }])).toEqual(new Set(['yard']));
    expect(at([])).toEqual(new Set(['']));
  });
});
