/** A length unit of an installation. Data are always millimetres. */
export type LengthUnit = 'mm' | 'inch';

const MM_PER: Record<string, number> = {
  mm: 1,
  cm: 10,
  m: 1000,
  in: 25.4,
  inch: 25.4,
  '"': 25.4,
  "'": 304.8,
  ft: 304.8,
};

/**
 * Read a typed length: `38`, `38 mm`, `3.8 cm`, `3,8 cm`, `1.5 in`, `1 1/2"`, `3/8 in`.
 * @param text what was typed; a bare number is in `unit`
 * @param unit the installation's unit
 * @returns millimetres, or null when it is no length
 */
export function parseLength(text: string, unit: LengthUnit): number | null {
  const match =
    /^\s*(?:(\d+(?:[.,]\d+)?)(?:\s+(\d+)\s*\/\s*(\d+))?|(\d+)\s*\/\s*(\d+))\s*(mm|cm|m|inch|in|ft|"|')?\s*$/i.exec(
      text,
    );
  if (!match) return null;
  const [, whole, wholeTop, wholeBottom, top, bottom, suffix] = match;
  const fraction = (a?: string, b?: string) => (a && b ? Number(a) / Number(b) : 0);
  const value =
    whole !== undefined
      ? Number(whole.replace(',', '.')) + fraction(wholeTop, wholeBottom)
      : fraction(top, bottom);
  const factor = MM_PER[(suffix ?? (unit === 'inch' ? 'in' : 'mm')).toLowerCase()];
  if (factor === undefined || !Number.isFinite(value)) return null;
  return value * factor;
}

/**
 * Show a length in the installation's unit: whole millimetres with thin spaces, or inches to a sixteenth.
 * @param mm length in millimetres
 * @param unit the installation's unit
 */
export function formatLength(mm: number, unit: LengthUnit): string {
  if (unit === 'mm') {
    const digits = String(Math.round(mm)).replace(/\B(?=(\d{3})+$)/g, '\u2009');
    return `${digits} mm`;
  }
  const sixteenths = Math.round((mm / 25.4) * 16);
  const whole = Math.floor(sixteenths / 16);
  let top = sixteenths % 16;
  if (top === 0) return `${whole} in`;
  let bottom = 16;
  while (top % 2 === 0) {
    top /= 2;
    bottom /= 2;
  }
  return `${whole > 0 ? `${whole} ` : ''}${top}/${bottom} in`;
}
