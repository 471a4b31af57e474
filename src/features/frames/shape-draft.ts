import { createFrameSchema } from '../../../shared/contracts/frames';
import type { FieldProblem } from '../../../shared/contracts/errors';
import { buildShape, shapeSchema, type Frame, type Shape } from '../../../shared/frames';
import { parseLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { checkInput, typedNumber } from '../../lib/check-input';
import { typedLength } from '../../lib/formats';

export type ShapeKind = Shape['kind'];

/** A measure of a shape, as it is asked for. */
export interface Measure {
  key: string;
  label: string;
  sort: 'length' | 'count';
}

const EDGE: Measure = { key: 'edgeMm', label: 'edge', sort: 'length' };
const SIDES: Measure = { key: 'sides', label: 'sides', sort: 'count' };
const BASE: Measure = { key: 'baseMm', label: 'base', sort: 'length' };
const HEIGHT: Measure = { key: 'heightMm', label: 'height', sort: 'length' };

/** The shapes in the order in which they are offered, with their measures. */
export const SHAPES: readonly { kind: ShapeKind; label: string; measures: readonly Measure[] }[] = [
  { kind: 'tetrahedron', label: 'tetrahedron, 4 triangles', measures: [EDGE] },
  { kind: 'cube', label: 'cube, 6 squares', measures: [EDGE] },
  { kind: 'octahedron', label: 'octahedron, 8 triangles', measures: [EDGE] },
  { kind: 'dodecahedron', label: 'dodecahedron, 12 pentagons', measures: [EDGE] },
  { kind: 'icosahedron', label: 'icosahedron, 20 triangles', measures: [EDGE] },
  { kind: 'prism', label: 'prism', measures: [SIDES, BASE, HEIGHT] },
  { kind: 'antiprism', label: 'antiprism', measures: [SIDES, BASE, HEIGHT] },
  { kind: 'pyramid', label: 'pyramid', measures: [SIDES, BASE, HEIGHT] },
  {
    kind: 'bipyramid',
    label: 'bipyramid, a lantern',
    measures: [
      SIDES,
      BASE,
      { key: 'upperMm', label: 'upper height', sort: 'length' },
      { key: 'lowerMm', label: 'lower height', sort: 'length' },
    ],
  },
  {
    kind: 'vault-bay',
    label: 'vault bay, a lattice',
    measures: [
      { key: 'lengthMm', label: 'length along the vault', sort: 'length' },
      { key: 'widthMm', label: 'width (chord)', sort: 'length' },
      { key: 'riseMm', label: 'rise', sort: 'length' },
      { key: 'divisionsAlong', label: 'divisions along', sort: 'count' },
      { key: 'divisionsAcross', label: 'divisions across', sort: 'count' },
    ],
  },
];

/** A shape while it is typed. What one kind asks for and another does not is kept, so that changing the kind loses nothing. */
export interface ShapeDraft {
  name: string;
  kind: ShapeKind;
  texts: Readonly<Record<string, string>>;
  baseBy: 'edge' | 'radius';
  uniform: boolean;
  diagonals: 'none' | 'one-way' | 'alternating' | 'staggered';
}

const START_MM: Readonly<Record<string, number>> = {
  edgeMm: 400,
  baseMm: 200,
  heightMm: 400,
  upperMm: 240,
  lowerMm: 320,
  lengthMm: 1000,
  widthMm: 2800,
  riseMm: 640,
};
const START_COUNT: Readonly<Record<string, number>> = { sides: 6, divisionsAlong: 2, divisionsAcross: 4 };

/** Round inches for a start: half inches, near enough to the millimetres above. */
const START_INCH = (mm: number): number => (Math.round((mm / 25.4) * 2) / 2) * 25.4;

/** A draft to begin with, or of a shape that is there. */
export function draftOf(unit: LengthUnit, name = '', shape?: Shape): ShapeDraft {
  const texts: Record<string, string> = {};
  for (const [key, mm] of Object.entries(START_MM))
    texts[key] = typedLength(unit === 'inch' ? START_INCH(mm) : mm, unit);
  for (const [key, count] of Object.entries(START_COUNT)) texts[key] = String(count);
  const known: Readonly<Record<string, unknown>> = shape ?? {};
  for (const [key, value] of Object.entries(known)) {
    if (typeof value === 'number') texts[key] = key.endsWith('Mm') ? typedLength(value, unit) : String(value);
  }
  return {
    name,
    kind: shape?.kind ?? 'octahedron',
    texts,
    baseBy: shape && 'baseBy' in shape ? shape.baseBy : 'radius',
    uniform: shape?.kind === 'antiprism' ? shape.uniform : true,
    diagonals: shape?.kind === 'vault-bay' ? shape.diagonals : 'staggered',
  };
}

/** The measures that a draft asks for now; struts of one length make an antiprism's height. */
export const measuresOf = ({ kind, uniform }: ShapeDraft): readonly Measure[] =>
  (SHAPES.find((shape) => shape.kind === kind)?.measures ?? []).filter(
    ({ key }) => !(kind === 'antiprism' && uniform && key === 'heightMm'),
  );

const noLength = (text: string): string =>
  text.trim() === ''
    ? 'Please fill this in.'
    : `"${text.trim()}" is no length. Type it like 400, 40 cm, 1.5 in or 1 1/2".`;

/** What was typed, as the contract names it, and the lengths that are none. */
function readDraft(
  draft: ShapeDraft,
  unit: LengthUnit,
): { shape: Record<string, unknown>; own: FieldProblem[] } {
  const shape: Record<string, unknown> = { kind: draft.kind };
  const own: FieldProblem[] = [];
  for (const { key, sort } of measuresOf(draft)) {
    const text = draft.texts[key] ?? '';
    if (sort === 'count') shape[key] = typedNumber(text);
    else {
      const mm = parseLength(text, unit);
      if (mm === null) own.push({ path: `shape.${key}`, code: 'length', message: noLength(text) });
      // Inches make long fractions of a millimetre; a hundredth is finer than any saw.
      else shape[key] = Number(mm.toFixed(2));
    }
  }
  const based = 'sides' in shape;
  if (based) shape.baseBy = draft.baseBy;
  if (draft.kind === 'antiprism') shape.uniform = draft.uniform;
  if (draft.kind === 'vault-bay') shape.diagonals = draft.diagonals;
  return { shape, own };
}

/** The body that makes the frame, or every problem beside its field. */
export function checkDraft(draft: ShapeDraft, unit: LengthUnit) {
  const { shape, own } = readDraft(draft, unit);
  return checkInput(createFrameSchema, { kind: 'shape', name: draft.name, shape }, own);
}

/** The frame that a draft would make; null while a measure is missing or wrong. */
export function frameOfDraft(draft: ShapeDraft, unit: LengthUnit): Frame | null {
  const { shape, own } = readDraft(draft, unit);
  if (own.length > 0) return null;
  const parsed = shapeSchema.safeParse(shape);
  return parsed.success ? buildShape(parsed.data) : null;
}
