import { z } from 'zod';

/** What a measure of a shape may be: mm, and the least strut that can still be held, cut and glued. */
export const SHAPE_LIMITS = {
  leastMm: 10,
  mostMm: 20_000,
  leastStrutMm: 5,
  leastSides: 3,
  mostSides: 120,
  mostDivisions: 60,
  /** A shape is drawn anew with every measure that is typed; larger structures are set out of several. */
  mostStruts: 5000,
} as const;

const typed = (input: unknown): string => (typeof input === 'number' ? `you gave ${input}` : 'it is missing');

/** A number within limits whose every refusal names the field, the limits and what was given. */
function measure(name: string, least: number, most: number, unit: string) {
  const range = `${name} must be from ${least} to ${most}${unit}`;
  return z
    .number({ error: (issue) => `${range}; ${typed(issue.input)}. Type a number.` })
    .min(least, { error: (issue) => `${range}; ${typed(issue.input)}.` })
    .max(most, { error: (issue) => `${range}; ${typed(issue.input)}.` });
}

const lengthMm = (name: string, least: number = SHAPE_LIMITS.leastMm) =>
  measure(name, least, SHAPE_LIMITS.mostMm, ' mm');

const whole = (name: string, least: number, most: number) =>
  measure(name, least, most, '').refine(Number.isInteger, {
    error: (issue) => `${name} must be a whole number; ${typed(issue.input)}.`,
  });

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
  ],
  {
    error:
      'Choose a shape: tetrahedron, cube, octahedron, dodecahedron, icosahedron, prism, antiprism, pyramid, bipyramid or vault bay.',
  },
);

export type Shape = z.infer<typeof kinds>;
type VaultBay = Extract<Shape, { kind: 'vault-bay' }>;
type Based = Extract<Shape, { sides: number }>;

/** Radius to the corners of a regular polygon from its edge, both in mm. */
export const radiusOfEdge = (edgeMm: number, sides: number): number =>
  edgeMm / (2 * Math.sin(Math.PI / sides));

/** Radius to the corners of a shape's base, mm. */
export const baseRadius = (shape: Based): number =>
  shape.baseBy === 'radius' ? shape.baseMm : radiusOfEdge(shape.baseMm, shape.sides);

/** How many struts a bay has, before it is built. */
function vaultStruts({ divisionsAlong: along, divisionsAcross: across, diagonals }: VaultBay): number {
  if (diagonals === 'staggered') {
    const wide = across / 2 + 1;
    const narrow = across / 2;
    return wide * along + narrow * (along - 1) + narrow * along * 4 + 2 * narrow;
  }
  const square = (across + 1) * along + (along + 1) * across;
  return diagonals === 'none' ? square : square + along * across;
}

function checkBase(shape: Based, refuse: (path: string, message: string) => void): void {
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

function checkVaultBay(bay: VaultBay, refuse: (path: string, message: string) => void): void {
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
  const struts = vaultStruts(bay);
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
 * half the width), sides 3 to 120, divisions 1 to 60. Every refusal stands at its field and says the limits and the number given.
 */
export const shapeSchema = kinds.superRefine((shape, context) => {
  const refuse = (path: string, message: string) =>
    context.addIssue({ code: 'custom', path: [path], message });
  if ('sides' in shape) checkBase(shape, refuse);
  if (shape.kind === 'vault-bay') checkVaultBay(shape, refuse);
});
