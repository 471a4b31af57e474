import { createFrameSchema } from '../../../shared/contracts/frames';
import type { FieldProblem } from '../../../shared/contracts/errors';
import {
  buildShape,
  fieldApplies,
  SHAPE_FORMS,
  shapeSchema,
  type Frame,
  type Shape,
  type ShapeField,
} from '../../../shared/frames';
import { parseLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { checkInput, typedNumber } from '../../lib/check-input';
import { typedLength } from '../../lib/formats';

export type ShapeKind = Shape['kind'];

/** The shapes in the order in which they are offered. */
export const SHAPES = Object.entries(SHAPE_FORMS).map(([kind, { label }]) => ({
  kind: kind as ShapeKind,
  label,
}));

/** A shape while it is typed. What one kind asks for and another does not is kept, so that changing the kind loses nothing. */
export interface ShapeDraft {
  name: string;
  kind: ShapeKind;
  values: Readonly<Record<string, string | boolean>>;
}

/** Round inches for a start: half inches, near enough to the millimetres. */
const startInch = (mm: number): number => (Math.round((mm / 25.4) * 2) / 2) * 25.4;

function startOf(field: ShapeField, unit: LengthUnit): string | boolean {
  if (field.sort !== 'length') return typeof field.start === 'boolean' ? field.start : String(field.start);
  return typedLength(unit === 'inch' ? startInch(field.start) : field.start, unit);
}

/** A draft to begin with, or of a shape that is there. */
export function draftOf(unit: LengthUnit, name = '', shape?: Shape): ShapeDraft {
  const values: Record<string, string | boolean> = {};
  for (const { fields } of Object.values(SHAPE_FORMS))
    for (const field of fields) values[field.key] ??= startOf(field, unit);
  const known: Readonly<Record<string, string | number | boolean | undefined>> = shape ?? {};
  for (const [key, value] of Object.entries(known)) {
    if (typeof value === 'number')
      values[key] = key.endsWith('Mm') ? typedLength(value, unit) : String(value);
    else if (value !== undefined) values[key] = value;
  }
  return { name, kind: shape?.kind ?? 'octahedron', values };
}

/** What a field has now; a choice that this kind does not offer is the one it begins with. */
export function valueOf({ values }: ShapeDraft, field: ShapeField): string | boolean {
  const value = values[field.key] ?? '';
  if (field.sort !== 'choice') return value;
  return field.options.some((option) => option.value === value) ? value : field.start;
}

/** The fields that a draft asks for now. */
export function fieldsOf(draft: ShapeDraft): readonly ShapeField[] {
  const { fields } = SHAPE_FORMS[draft.kind];
  const now = Object.fromEntries(fields.map((field) => [field.key, valueOf(draft, field)]));
  return fields.filter((field) => fieldApplies(field, now));
}

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
  for (const field of fieldsOf(draft)) {
    const value = valueOf(draft, field);
    if (typeof value === 'boolean' || field.sort === 'choice') shape[field.key] = value;
    else if (field.sort !== 'length') shape[field.key] = typedNumber(value);
    else {
      const mm = parseLength(value, unit);
      if (mm === null) own.push({ path: `shape.${field.key}`, code: 'length', message: noLength(value) });
      // Inches make long fractions of a millimetre; a hundredth is finer than any saw.
      else shape[field.key] = Number(mm.toFixed(2));
    }
  }
  return { shape, own };
}

/** The body that makes the frame, or every problem beside its field. */
export function checkDraft(draft: ShapeDraft, unit: LengthUnit, revision?: number) {
  const { shape, own } = readDraft(draft, unit);
  const input = { kind: 'shape', name: draft.name, shape, ...(revision === undefined ? {} : { revision }) };
  return checkInput(createFrameSchema, input, own);
}

/** The frame that a draft would make; null while a measure is missing or wrong. */
export function frameOfDraft(draft: ShapeDraft, unit: LengthUnit): Frame | null {
  const { shape, own } = readDraft(draft, unit);
  if (own.length > 0) return null;
  const parsed = shapeSchema.safeParse(shape);
  return parsed.success ? buildShape(parsed.data) : null;
}
