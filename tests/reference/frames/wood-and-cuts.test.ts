import { describe, expect, it } from 'vitest';
import { buildShape, cutLengths, densityOf, setBack } from '../../../shared/frames';

describe('setBack', () => {
  // Square-cut ends of round stock: (d/2) / tan(t/2), the trade's own table.
  for (const [degrees, share] of [
    [60, 0.866],
    [90, 0.5],
    [108, 0.363],
  ] as const)
    it(`setBack > ${degrees} degrees of the trade's table > ${share} of the diameter`, () => {
      expect(setBack(8, degrees) / 8).toBeCloseTo(share, 3);
    });

  // 60, 90 and 108 degrees are the face angles of triangle, square and pentagon (Euclid, Elements IV and XIII).
  for (const [kind, share] of [
    ['icosahedron', 0.866],
    ['cube', 0.5],
    ['dodecahedron', 0.363],
  ] as const)
    it(`cutLengths > ${kind} of 200 mm from 8 mm stock > every strut ${(200 - 16 * share).toFixed(1)} mm`, () => {
      const { struts } = cutLengths(buildShape({ kind, edgeMm: 200 }), 8);
      for (const { setBackMm } of struts) expect(setBackMm).toBeCloseTo(200 - 2 * share * 8, 1);
    });
});

describe('densityOf', () => {
  it('densityOf > yellow birch of the Wood Handbook (specific gravity 0.62 at 12 %, from memory) > about 690 kg/m3, not 620', () => {
    expect(densityOf('birch-yellow')).toBeCloseTo(0.62 * 1.12 * 1000, 9);
    expect(Math.abs(densityOf('birch-yellow') - 690)).toBeLessThan(10);
  });
});
