import type { Shape } from './shape-schema';
import { ARCHIMEDEAN_SOLIDS } from './shapes/archimedean-points';

/** When a field is asked for: only while another one has one of these values. */
type When = { key: string; is: readonly (string | boolean)[] };

/** A field of a shape's form. `start` is what it begins with: mm, a count, degrees, a choice, yes or no. */
export type ShapeField = { key: string; label: string; when?: When } & (
  | { sort: 'length' | 'count' | 'angle'; start: number }
  | { sort: 'choice'; start: string; options: readonly { value: string; label: string }[] }
  | { sort: 'yes'; start: boolean }
);

/** What a kind of shape is called, and its fields in the order in which they are asked for. */
export type ShapeForm = { label: string; fields: readonly ShapeField[] };

const length = (key: string, label: string, start: number): ShapeField => ({
  key,
  label,
  sort: 'length',
  start,
});
const count = (key: string, label: string, start: number): ShapeField => ({
  key,
  label,
  sort: 'count',
  start,
});
const twist = (key: string, label: string): ShapeField => ({ key, label, sort: 'angle', start: 0 });
const choice = (
  key: string,
  label: string,
  words: Readonly<Record<string, string>>,
  start: string,
): ShapeField => ({
  key,
  label,
  sort: 'choice',
  start,
  options: Object.entries(words).map(([value, text]) => ({ value, label: text })),
});
const only = (field: ShapeField, key: string, ...is: (string | boolean)[]): ShapeField => ({
  ...field,
  when: { key, is },
});

const EDGE = length('edgeMm', 'edge', 400);
const HEIGHT = length('heightMm', 'height', 400);
const UNIFORM: ShapeField = {
  key: 'uniform',
  label: 'All struts of one length; the height follows',
  sort: 'yes',
  start: true,
};
const BASE: readonly ShapeField[] = [
  count('sides', 'sides', 6),
  choice(
    'baseBy',
    'the base is given by',
    { edge: 'the length of a side', radius: 'its radius to the corners' },
    'radius',
  ),
  length('baseMm', 'base', 200),
];
const DIVISIONS: readonly ShapeField[] = [
  count('divisionsAlong', 'divisions along', 4),
  count('divisionsAcross', 'divisions across', 4),
];
const PATTERNS = {
  square: 'squares, the fields stay open',
  braced: 'squares with a diagonal in each',
  diagonal: 'two families of diagonals',
  triangular: 'staggered rows of triangles',
};

/** The form of every shape, in the order in which shapes are offered. Labels are words for people; keys are those of `shapeSchema`. */
export const SHAPE_FORMS: Readonly<Record<Shape['kind'], ShapeForm>> = {
  tetrahedron: { label: 'tetrahedron, 4 triangles', fields: [EDGE] },
  cube: { label: 'cube, 6 squares', fields: [EDGE] },
  octahedron: { label: 'octahedron, 8 triangles', fields: [EDGE] },
  dodecahedron: { label: 'dodecahedron, 12 pentagons', fields: [EDGE] },
  icosahedron: { label: 'icosahedron, 20 triangles', fields: [EDGE] },
  archimedean: {
    label: 'Archimedean solid',
    fields: [choice('solid', 'solid', ARCHIMEDEAN_SOLIDS, 'cuboctahedron'), EDGE],
  },
  prism: { label: 'prism', fields: [...BASE, HEIGHT] },
  antiprism: { label: 'antiprism', fields: [...BASE, UNIFORM, only(HEIGHT, 'uniform', false)] },
  pyramid: { label: 'pyramid', fields: [...BASE, HEIGHT] },
  bipyramid: {
    label: 'bipyramid, a lantern',
    fields: [...BASE, length('upperMm', 'upper height', 240), length('lowerMm', 'lower height', 320)],
  },
  cupola: {
    label: 'cupola, a ring over one of twice its sides',
    fields: [count('sides', 'sides above', 4), EDGE, UNIFORM, only(HEIGHT, 'uniform', false)],
  },
  gem: {
    label: 'cut gem',
    fields: [
      count('tableSides', 'sides of the table', 6),
      length('tableWidthMm', 'width of the table', 240),
      twist('tableTwist', 'turn of the table'),
      length('crownMm', 'table above girdle', 120),
      count('girdleSides', 'sides of the girdle', 6),
      length('girdleWidthMm', 'width of the girdle', 400),
      twist('girdleTwist', 'turn of the girdle'),
      length('depthMm', 'girdle above foot', 320),
      choice('foot', 'below', { point: 'a point', table: 'a second table' }, 'point'),
      only(count('footSides', 'sides of the second table', 6), 'foot', 'table'),
      only(length('footWidthMm', 'width of the second table', 160), 'foot', 'table'),
      only(twist('footTwist', 'turn of the second table'), 'foot', 'table'),
    ],
  },
  geodesic: {
    label: 'geodesic sphere or dome',
    fields: [
      length('radiusMm', 'radius', 1000),
      count('frequency', 'frequency, parts of each edge', 2),
      choice('part', 'part', { sphere: 'the whole sphere', dome: 'a dome' }, 'dome'),
      only(count('rows', 'rows of triangles from the top', 3), 'part', 'dome'),
      only(
        { key: 'levelFoot', label: 'Foot joints moved to one height', sort: 'yes', start: true },
        'part',
        'dome',
      ),
    ],
  },
  'vault-bay': {
    label: 'vault bay, a lattice',
    fields: [
      length('lengthMm', 'length along the vault', 1000),
      length('widthMm', 'width (chord)', 2800),
      length('riseMm', 'rise', 640),
      count('divisionsAlong', 'divisions along', 2),
      count('divisionsAcross', 'divisions across', 4),
      choice(
        'diagonals',
        'diagonals',
        {
          staggered: 'staggered rows of triangles',
          alternating: 'alternating in each field',
          'one-way': 'all one way',
          none: 'none, the fields stay open',
        },
        'staggered',
      ),
    ],
  },
  'barrel-vault': {
    label: 'barrel vault',
    fields: [
      length('lengthMm', 'length along the vault', 3000),
      length('widthMm', 'width between the feet', 2400),
      length('riseMm', 'rise', 1000),
      ...DIVISIONS,
      choice('pattern', 'pattern', PATTERNS, 'diagonal'),
    ],
  },
  'flat-lattice': {
    label: 'flat lattice',
    fields: [
      length('lengthMm', 'length', 2000),
      length('widthMm', 'width', 2000),
      ...DIVISIONS,
      choice(
        'pattern',
        'pattern',
        { square: PATTERNS.square, diagonal: PATTERNS.diagonal, triangular: PATTERNS.triangular },
        'triangular',
      ),
    ],
  },
  'double-layer': {
    label: 'double-layer lattice, square on offset square',
    fields: [
      length('lengthMm', 'length', 2000),
      length('widthMm', 'width', 2000),
      length('depthMm', 'depth between the layers', 350),
      ...DIVISIONS,
    ],
  },
};

/** Whether a field is asked for, given what the others have. */
export const fieldApplies = ({ when }: ShapeField, values: Readonly<Record<string, unknown>>): boolean =>
  when === undefined || when.is.some((value) => value === values[when.key]);
