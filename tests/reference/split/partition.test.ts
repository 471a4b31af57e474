import { describe, expect, it } from 'vitest';
import { partition } from '../../../shared/split';
import { compareWithExact } from '../../bench/split/exact';
import { barrelVault, doubleLayerGrid, flatLattice, ribbedDome, trussTree } from '../../support/structures';

describe('partition against others', () => {
  // HiGHS, a mixed-integer solver, finds the exact minimum; `npm run bench:split -- --exact` compares all hundred.
  it('partition > seeded random frames of up to 40 struts > the exact minimum of a mixed-integer program', async () => {
    const outcome = await compareWithExact(10);
    expect(outcome).toMatchObject({ cases: 10, worse: 0, unsolved: 0 });
    const solved = outcome.equal + outcome.oneMore;
    expect(solved).toBeGreaterThan(6);
    expect(outcome.equal / solved).toBeGreaterThanOrEqual(0.95);
  }, 120_000);

  it('partition > lattices, vaults, domes and trees of 199 to 752 struts in 12 pieces > on average at most three quarters of coordinate bisection', () => {
    const structures = [
      flatLattice(10, 9),
      doubleLayerGrid(8, 8),
      barrelVault(12, 14),
      ribbedDome(16, 6),
      ribbedDome(24, 10),
      trussTree(5, 3),
    ];
    const ratios = structures.map(({ joints, struts }) => {
      const found = partition({ joints, struts, weights: struts.map(() => 1), pieces: 12, seed: 1 });
      expect(found).toMatchObject({ balanced: true, disconnected: 0 });
      expect(found.imbalancePct).toBeLessThanOrEqual(10);
      expect(found.fieldJoints).toBeLessThan(found.baseline.randomGrowth);
      return found.fieldJoints / found.baseline.coordinateBisection;
    });
    expect(ratios.reduce((sum, ratio) => sum + ratio, 0) / ratios.length).toBeLessThanOrEqual(0.75);
  }, 60_000);
});
