import { z } from 'zod';
import type { Frame, Joint, Strut } from '../frame';
import { frameOfFaces } from '../stacked-rings';
import { arc, buildVaultBay } from '../vault-bay';
import { lengthMm, refuseManyStruts, refuseShortStruts, SHAPE_LIMITS, whole } from './measures';
import type { Refuse } from './measures';

const divisions = {
  divisionsAlong: whole('The divisions along', 1, SHAPE_LIMITS.mostDivisions),
  divisionsAcross: whole('The divisions across', 1, SHAPE_LIMITS.mostDivisions),
};

/** A barrel vault as a lattice over its whole length; the arc may be more than half a circle. */
export const barrelVaultSchema = z.object({
  kind: z.literal('barrel-vault'),
  lengthMm: lengthMm('The length along the vault'),
  widthMm: lengthMm('The width between the feet'),
  riseMm: lengthMm('The rise'),
  ...divisions,
  /** square: open fields · braced: a diagonal in each · diagonal: two crossing families and the border · triangular: staggered rows. */
  pattern: z.enum(['square', 'braced', 'diagonal', 'triangular'], {
    error: 'Choose the pattern: square, braced, diagonal or triangular.',
  }),
});

/** A lattice flat on the bench. */
export const flatLatticeSchema = z.object({
  kind: z.literal('flat-lattice'),
  lengthMm: lengthMm('The length'),
  widthMm: lengthMm('The width'),
  ...divisions,
  pattern: z.enum(['square', 'diagonal', 'triangular'], {
    error: 'Choose the pattern: square, diagonal or triangular.',
  }),
});

/** Square on offset square: an upper grid, a lower one under the middles of its fields, and four struts from each lower joint up. */
export const doubleLayerSchema = z.object({
  kind: z.literal('double-layer'),
  lengthMm: lengthMm('The length'),
  widthMm: lengthMm('The width'),
  depthMm: lengthMm('The depth between the layers'),
  ...divisions,
});

type BarrelVault = z.infer<typeof barrelVaultSchema>;
type FlatLattice = z.infer<typeof flatLatticeSchema>;
type DoubleLayer = z.infer<typeof doubleLayerSchema>;
type Diagonals = 'none' | 'one-way' | 'alternating' | 'staggered';

/** How many struts a vault has, before it is built. */
export function vaultStruts(along: number, across: number, diagonals: Diagonals): number {
  if (diagonals === 'staggered') {
    const [wide, narrow] = [across / 2 + 1, across / 2];
    return wide * along + narrow * (along - 1) + narrow * along * 4 + 2 * narrow;
  }
  const square = (across + 1) * along + (along + 1) * across;
  return diagonals === 'none' ? square : square + along * across;
}

const DIAGONALS: Readonly<Record<Exclude<BarrelVault['pattern'], 'diagonal'>, Diagonals>> = {
  square: 'none',
  braced: 'alternating',
  triangular: 'staggered',
};

function strutsOf(shape: BarrelVault | FlatLattice | DoubleLayer): number {
  const { divisionsAlong: along, divisionsAcross: across } = shape;
  if (shape.kind === 'double-layer')
    return (
      vaultStruts(along, across, 'none') + vaultStruts(along - 1, across - 1, 'none') + 4 * along * across
    );
  return shape.pattern === 'diagonal'
    ? 4 * along * across + 2 * (along + across)
    : vaultStruts(along, across, DIAGONALS[shape.pattern]);
}

/** Refuses a lattice of too high a rise, too many struts or too short ones, each at its field. */
export function checkLattice(shape: BarrelVault | FlatLattice | DoubleLayer, refuse: Refuse): void {
  if (shape.kind === 'barrel-vault' && shape.riseMm > shape.widthMm)
    refuse(
      'riseMm',
      `A rise of ${shape.riseMm} mm is more than the width of ${shape.widthMm} mm between the feet; at most ${shape.widthMm} mm. Make it lower or wider.`,
    );
  const odd = 'pattern' in shape && shape.pattern === 'triangular' && shape.divisionsAcross % 2 !== 0;
  if (odd)
    refuse(
      'divisionsAcross',
      `Staggered rows of triangles need an even number of divisions across; you gave ${shape.divisionsAcross}. Take ${shape.divisionsAcross + 1}.`,
    );
  if (refuseManyStruts(strutsOf(shape), refuse, 'divisionsAlong') || odd) return;
  refuseShortStruts(buildLattice(shape), refuse, 'divisionsAlong', 'Take fewer divisions.');
}

function buildLattice(shape: BarrelVault | FlatLattice | DoubleLayer): Frame {
  if (shape.kind === 'double-layer') return buildDoubleLayer(shape);
  return shape.kind === 'flat-lattice' ? buildFlatLattice(shape) : buildBarrelVault(shape);
}

/**
 * Two families of struts that cross the fields of a grid corner to corner, and a border that holds their ends.
 * The fields' middles lie on the arc too, half a division on.
 */
function diagonalVault({ lengthMm: length, widthMm, riseMm, ...parts }: Omit<BarrelVault, 'kind'>): Frame {
  const { divisionsAlong: along, divisionsAcross: across } = parts;
  const places = arc(widthMm, riseMm, 2 * across);
  const joints: Joint[] = [];
  const number = new Map<number, number>();
  // Half divisions: corners at even steps both ways, middles at odd ones.
  const key = (i: number, j: number) => i * (2 * along + 1) + j;
  places.forEach(({ x, z: height }, i) => {
    for (let j = i % 2; j <= 2 * along; j += 2) {
      number.set(key(i, j), joints.length);
      joints.push({ x, y: (j * length) / (2 * along), z: height });
    }
  });
  const at = (i: number, j: number) => number.get(key(i, j));
  const faces: number[][] = [];
  // Every field of the diagonals is centred where the steps are even one way and odd the other; at the border half of it is left.
  for (let i = 0; i <= 2 * across; i++)
    for (let j = 1 - (i % 2); j <= 2 * along; j += 2) {
      const ring = [at(i, j - 1), at(i + 1, j), at(i, j + 1), at(i - 1, j)];
      if (j === 0) ring[0] = undefined;
      if (j === 2 * along) ring[2] = undefined;
      faces.push(ring.filter((joint) => joint !== undefined));
    }
  return frameOfFaces(joints, faces);
}

/**
 * A barrel vault.
 * @param shape measures in mm, as `shapeSchema` lets them through
 * @returns joints row by row from the left foot to the right one, each row from y = 0 on; feet at z = 0 unless the arc is more than half
 *   a circle, then its feet stand there still and its sides bulge out above them
 */
export function buildBarrelVault(shape: BarrelVault): Frame {
  return shape.pattern === 'diagonal'
    ? diagonalVault(shape)
    : buildVaultBay({ ...shape, diagonals: DIAGONALS[shape.pattern] });
}

/** A flat lattice in the plane z = 0, its width along x, its length along y; joints row by row from the left. */
export const buildFlatLattice = (shape: FlatLattice): Frame =>
  buildBarrelVault({ ...shape, kind: 'barrel-vault', riseMm: 0 });

/**
 * A double-layer lattice, square on offset square.
 * @param shape measures in mm, as `shapeSchema` lets them through
 * @returns the lower layer's joints first, at z = 0, then the upper one's; no faces, since most struts would bound more than two
 * Source: space grids of the trade (after Makowski, 1981, from memory).
 */
export function buildDoubleLayer(shape: DoubleLayer): Frame {
  const { lengthMm: length, widthMm: width, depthMm, divisionsAlong: along, divisionsAcross: across } = shape;
  const joints: Joint[] = [];
  const struts: Strut[] = [];
  const grid = (columns: number, rows: number, offset: number, height: number) => {
    const start = joints.length;
    for (let i = 0; i < columns; i++)
      for (let j = 0; j < rows; j++)
        joints.push({
          x: ((i + offset) / across - 0.5) * width,
          y: ((j + offset) * length) / along,
          z: height,
        });
    const at = (i: number, j: number) => start + i * rows + j;
    for (let i = 0; i < columns; i++)
      for (let j = 0; j < rows; j++) {
        if (i + 1 < columns) struts.push([at(i, j), at(i + 1, j)]);
        if (j + 1 < rows) struts.push([at(i, j), at(i, j + 1)]);
      }
    return at;
  };
  const lower = grid(across, along, 0.5, 0);
  const upper = grid(across + 1, along + 1, 0, depthMm);
  for (let i = 0; i < across; i++)
    for (let j = 0; j < along; j++)
      for (const [a, b] of [
        [0, 0],
        [1, 0],
        [1, 1],
        [0, 1],
      ] as const)
        struts.push([lower(i, j), upper(i + a, j + b)]);
  return { joints, struts, faces: [] };
}
