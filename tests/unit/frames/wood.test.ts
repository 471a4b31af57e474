import { describe, expect, it } from 'vitest';
import {
  buildShape,
  densityOf,
  SPECIES,
  stickKg,
  stickSurface,
  woodFigures,
  type Frame,
} from '../../../shared/frames';

describe('densityOf', () => {
  it('densityOf > a key that is not in the table > counts as the first, so that a drawing always has a mass', () => {
    expect(densityOf('unobtainium')).toBe(densityOf(SPECIES[0]!.key));
  });

  it('SPECIES > every entry > a key of its own, a source, and a density wood can have', () => {
    expect(new Set(SPECIES.map(({ key }) => key)).size).toBe(SPECIES.length);
    for (const { key, source } of SPECIES) {
      expect(source).not.toBe('');
      expect(densityOf(key)).toBeGreaterThan(300);
      expect(densityOf(key)).toBeLessThan(1000);
    }
  });
});

describe('woodFigures', () => {
  const ell: Frame = {
    joints: [
      { x: 0, y: 0, z: 0 },
      { x: 1000, y: 0, z: 0 },
      { x: 0, y: 3000, z: 0 },
    ],
    struts: [
      [0, 1],
      [0, 2],
    ],
    faces: [],
  };

  it('stickKg > 1 m of 8 mm at 694.4 kg/m3 > 34.9 g, and 0.0251 square metres to paint', () => {
    expect(stickKg(1000, 8, 694.4)).toBeCloseTo(0.0349, 4);
    expect(stickSurface(1000, 8)).toBeCloseTo(0.02513, 5);
  });

  it('woodFigures > sticks of 1 m and 3 m at a right angle > mass, and balanced at (125, 1125, 0)', () => {
    const { kg, strutKg, centreOfMass, surfaceM2 } = woodFigures(ell, 10, 500);
    expect(kg).toBeCloseTo(Math.PI * 0.005 ** 2 * 4 * 500, 12);
    expect(strutKg[1]! / strutKg[0]!).toBeCloseTo(3, 12);
    // (1 * 500 + 3 * 0) / 4 and (1 * 0 + 3 * 1500) / 4
    expect(centreOfMass).toEqual({
      x: expect.closeTo(125, 9) as number,
      y: expect.closeTo(1125, 9) as number,
      z: 0,
    });
    expect(surfaceM2).toBeCloseTo(Math.PI * 0.01 * 4, 12);
  });

  it('woodFigures > box > half a diameter outside the joints on every side', () => {
    const { box } = woodFigures(ell, 10, 500);
    expect(box.least).toEqual({ x: -5, y: -5, z: -5 });
    expect(box.sizeMm).toEqual({ x: 1010, y: 3010, z: 10 });
  });

  it('woodFigures > a closed even shape > balances at its middle', () => {
    const { centreOfMass } = woodFigures(buildShape({ kind: 'icosahedron', edgeMm: 300 }), 8, 700);
    expect(centreOfMass.x).toBeCloseTo(0, 9);
    expect(centreOfMass.y).toBeCloseTo(0, 9);
    expect(centreOfMass.z).toBeCloseTo(150 * Math.sqrt((5 + Math.sqrt(5)) / 2), 6);
  });

  it('woodFigures > no struts, and a strut to a joint that is not there > no mass, every number finite', () => {
    for (const struts of [[], [[0, 9]]] as [number, number][][]) {
      const figures = woodFigures({ ...ell, struts }, 10, 500);
      expect(figures.kg).toBe(0);
      expect(figures.surfaceM2).toBe(0);
      expect(Object.values(figures.centreOfMass).every(Number.isFinite)).toBe(true);
    }
  });
});
