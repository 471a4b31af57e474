import type { Frame, Joint } from './frame';
import { frameOfFaces } from './stacked-rings';

/** Measures of a vault in mm; staggered rows need an even number of divisions across. */
type Vault = {
  /** Of the shape it is built for; not read. */
  kind?: string;
  lengthMm: number;
  widthMm: number;
  riseMm: number;
  divisionsAlong: number;
  divisionsAcross: number;
  diagonals: 'none' | 'one-way' | 'alternating' | 'staggered';
};

/** Half the angle of an arc below which it is straight: on the widest bay a rise of 0.005 mm. */
const STRAIGHT = 1e-6;

/** Places on the arc of a chord and a rise, evenly spaced by angle, from the left foot to the right one. */
export function arc(widthMm: number, riseMm: number, divisions: number): { x: number; z: number }[] {
  const half = 2 * Math.atan2(2 * riseMm, widthMm);
  return Array.from({ length: divisions + 1 }, (_, at) => {
    const share = (2 * at) / divisions - 1;
    const foot = at === 0 || at === divisions;
    if (foot || half < STRAIGHT) return { x: (share * widthMm) / 2, z: 0 };
    // r (cos a - cos half) as a product: the radius of a flat arc is so large that the difference would lose all digits.
    const angle = share * half;
    const [left, right] = [Math.sin((half + angle) / 2), Math.sin((half - angle) / 2)];
    return {
      x: (widthMm / 2) * (Math.sin(angle) / Math.sin(half)),
      z: widthMm * (left / Math.sin(half)) * right,
    };
  });
}

function squareBay(bay: Vault): Frame {
  const { divisionsAlong: along, divisionsAcross: across, diagonals } = bay;
  const joints: Joint[] = arc(bay.widthMm, bay.riseMm, across).flatMap(({ x, z }) =>
    Array.from({ length: along + 1 }, (_, j) => ({ x, y: (j * bay.lengthMm) / along, z })),
  );
  const at = (i: number, j: number) => i * (along + 1) + j;
  const faces: number[][] = [];
  for (let i = 0; i < across; i++)
    for (let j = 0; j < along; j++) {
      const [a, b, c, d] = [at(i, j), at(i + 1, j), at(i + 1, j + 1), at(i, j + 1)];
      if (diagonals === 'none') faces.push([a, b, c, d]);
      else if (diagonals === 'one-way' || (i + j) % 2 === 0) faces.push([a, b, c], [a, c, d]);
      else faces.push([a, b, d], [b, c, d]);
    }
  return frameOfFaces(joints, faces);
}

function staggeredBay(bay: Vault): Frame {
  const { divisionsAlong: along, divisionsAcross: across } = bay;
  const rows = arc(bay.widthMm, bay.riseMm, across);
  const starts: number[] = [];
  const joints: Joint[] = [];
  rows.forEach(({ x, z }, i) => {
    starts.push(joints.length);
    const moved = i % 2 === 1;
    for (let j = 0; j <= along - (moved ? 1 : 0); j++)
      joints.push({ x, y: ((j + (moved ? 0.5 : 0)) * bay.lengthMm) / along, z });
  });
  const faces: number[][] = [];
  for (let i = 0; i < across; i += 2) {
    const [wide, narrow, next] = [starts[i]!, starts[i + 1]!, starts[i + 2]!];
    faces.push([wide, next, narrow]);
    for (let j = 0; j < along; j++) {
      faces.push([wide + j, narrow + j, wide + j + 1], [next + j, next + j + 1, narrow + j]);
      if (j + 1 < along)
        faces.push([narrow + j, narrow + j + 1, wide + j + 1], [narrow + j, next + j + 1, narrow + j + 1]);
    }
    faces.push([wide + along, narrow + along - 1, next + along]);
  }
  return frameOfFaces(joints, faces);
}

/**
 * A barrel vault, or one bay of it, as a lattice: arcs over the width, straight lines along the vault, and diagonals.
 * @param bay measures in mm as `shapeSchema` allows them; staggered rows need an even number of divisions across
 * @returns joints numbered row by row from the left foot (x = -width/2) to the right one, each row from y = 0 to the length; feet at
 *   z = 0; faces anticlockwise from above
 */
export const buildVaultBay = (bay: Vault): Frame =>
  bay.diagonals === 'staggered' ? staggeredBay(bay) : squareBay(bay);
