import { z } from 'zod';
import { archimedeanSchema } from './shapes/archimedean';
import { checkCupola, cupolaSchema } from './shapes/cupola';
import { checkGem, gemSchema } from './shapes/gem';
import { checkGeodesic, geodesicSchema } from './shapes/geodesic';
import {
  barrelVaultSchema,
  checkLattice,
  doubleLayerSchema,
  flatLatticeSchema,
  vaultStruts,
} from './shapes/lattice';
import { lengthMm, SHAPE_LIMITS, whole } from './shapes/measures';
import type { Refuse } from './shapes/measures';
import { radiusOfEdge } from './stacked-rings';

const platonic = <const K extends string>(kind: K) =>
  z.object({ kind: z.literal(kind), edgeMm: lengthMm('The edge') });

/** A regular base: its sides, and either the length of a side or the radius to its corners. */
const base = {
  sides: whole('The number of sides', SHAPE_LIMITS.leastSides, SHAPE_LIMITS.mostSides),
  baseBy: z.enum(['edge', 'radius'], { error: 'Say whether the base is given by its edge or its radius.' }),
  baseMm: lengthMm('The measure of the base'),
};

const prism = z.object({ kind: z.literal('prism'), ...base, heightMm: lengthMm('The height') });
const antiprism = z.object({
  kind: z.literal('antiprism'),
  ...base,
  /** Every strut as long as the base's edge; the height follows and `heightMm` is not read. */
  uniform: z.boolean({ error: 'Say whether all struts are to be of one length.' }),
  heightMm: lengthMm('The height').optional(),
});
const pyramid = z.object({ kind: z.literal('pyramid'), ...base, heightMm: lengthMm('The height') });
const bipyramid = z.object({
  kind: z.literal('bipyramid'),
  ...base,
  upperMm: lengthMm('The upper height'),
  lowerMm: lengthMm('The lower height'),
});

/** One bay of a barrel vault: an arc of struts across, repeated along the axis. */
const vaultBay = z.object({
  kind: z.literal('vault-bay'),
  lengthMm: lengthMm('The length along the vault'),
  widthMm: lengthMm('The width (chord)'),
  riseMm: lengthMm('The rise', 0),
  divisionsAlong: whole('The divisions along', 1, SHAPE_LIMITS.mostDivisions),
  divisionsAcross: whole('The divisions across', 1, SHAPE_LIMITS.mostDivisions),
  /** none: fields stay open · one-way, alternating: a diagonal in each field · staggered: every second arc row moved by half a field. */
  diagonals: z.enum(['none', 'one-way', 'alternating', 'staggered'], {
    error: 'Choose the diagonals: none, one way, alternating or staggered.',
  }),
});

const kinds = z.discriminatedUnion(
  'kind',
  [
    platonic('tetrahedron'),
    platonic('cube'),
    platonic('octahedron'),
    platonic('dodecahedron'),
    platonic('icosahedron'),
    prism,
    antiprism,
    pyramid,
    bipyramid,
    vaultBay,
    cupolaSchema,
    archimedeanSchema,
    gemSchema,
    geodesicSchema,
    barrelVaultSchema,
    flatLatticeSchema,
    doubleLayerSchema,
  ],
  {
    error:
      'Choose a shape: tetrahedron, cube, octahedron, dodecahedron, icosahedron, prism, antiprism, pyramid, bipyramid, cupola, Archimedean solid, cut gem, geodesic sphere or dome, vault bay, barrel vault, flat lattice or double-layer lattice.',
  },
);

export type Shape = z.infer<typeof kinds>;
type VaultBay = Extract<Shape, { kind: 'vault-bay' }>;
type Based = Extract<Shape, { baseBy: string }>;

/** Radius to the corners of a shape's base, mm. */
export const baseRadius = (shape: Based): number =>
  shape.baseBy === 'radius' ? shape.baseMm : radiusOfEdge(shape.baseMm, shape.sides);

function checkBase(shape: Based, refuse: Refuse): void {
  const { leastStrutMm, mostMm } = SHAPE_LIMITS;
  const radius = baseRadius(shape);
  const edge = 2 * radius * Math.sin(Math.PI / shape.sides);
  if (edge < leastStrutMm)
    refuse(
      'baseMm',
      `With ${shape.sides} sides the base's struts would be ${edge.toFixed(1)} mm; at least ${leastStrutMm} mm can be cut. Make the base larger or give it fewer sides.`,
    );
  if (radius > mostMm)
    refuse(
      'baseMm',
      `With ${shape.sides} sides the base would reach ${Math.round(radius)} mm from its centre; at most ${mostMm} mm. Make the edge shorter or give it fewer sides.`,
    );
  if (shape.kind === 'antiprism' && !shape.uniform && shape.heightMm === undefined)
    refuse('heightMm', 'Give the height, or choose all struts of one length.');
}

function checkVaultBay(bay: VaultBay, refuse: Refuse): void {
  if (bay.riseMm > bay.widthMm / 2)
    refuse(
      'riseMm',
      `A rise of ${bay.riseMm} mm is more than half the width of ${bay.widthMm} mm: the arc would bulge past its feet. At most ${bay.widthMm / 2} mm.`,
    );
  if (bay.diagonals === 'staggered' && bay.divisionsAcross % 2 !== 0)
    refuse(
      'divisionsAcross',
      `Staggered rows need an even number of divisions across; you gave ${bay.divisionsAcross}. Take ${bay.divisionsAcross + 1}.`,
    );
  const struts = vaultStruts(bay.divisionsAlong, bay.divisionsAcross, bay.diagonals);
  if (struts > SHAPE_LIMITS.mostStruts)
    refuse(
      'divisionsAcross',
      `The bay would have ${Math.round(struts)} struts; at most ${SHAPE_LIMITS.mostStruts.toLocaleString('en')} can be one frame. Take fewer divisions or several bays.`,
    );
  const shortest = Math.min(bay.lengthMm / bay.divisionsAlong, bay.widthMm / bay.divisionsAcross);
  if (shortest < SHAPE_LIMITS.leastStrutMm)
    refuse(
      bay.lengthMm / bay.divisionsAlong < SHAPE_LIMITS.leastStrutMm ? 'divisionsAlong' : 'divisionsAcross',
      `The fields would be ${shortest.toFixed(1)} mm wide; at least ${SHAPE_LIMITS.leastStrutMm} mm can be cut. Take fewer divisions.`,
    );
}

/**
 * The measures of a shape as they are typed and stored, told apart by `kind`. Lengths in mm from 10 to 20,000 (a rise from 0 to
 * half the width, of a barrel vault to the width), sides 3 to 120, divisions 1 to 60, turns -180 to 180 degrees, at most 5,000 struts. Every refusal stands at its field and says the limits and the number given.
 */
export const shapeSchema = kinds.superRefine((shape, context) => {
  const refuse = (path: string, message: string) =>
    context.addIssue({ code: 'custom', path: [path], message });
  if ('baseBy' in shape) checkBase(shape, refuse);
  if (shape.kind === 'vault-bay') checkVaultBay(shape, refuse);
  else if (shape.kind === 'cupola') checkCupola(shape, refuse);
  else if (shape.kind === 'gem') checkGem(shape, refuse);
  else if (shape.kind === 'geodesic') checkGeodesic(shape, refuse);
  else if (shape.kind === 'barrel-vault' || shape.kind === 'flat-lattice' || shape.kind === 'double-layer')
    checkLattice(shape, refuse);
});
