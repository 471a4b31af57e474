/** Colour arithmetic for the contrast test, from its published sources and from nothing of the product. */
export type Rgb = readonly [number, number, number];

/** `#1e2430` or `#fff` as channels 0 to 255. */
export function rgbOf(hex: string): Rgb {
  const digits = /^#([0-9a-f]{6})$/i.exec(hex)?.[1];
  if (digits === undefined) throw new Error(`not a colour: ${hex}`);
  const channel = (i: number): number => Number.parseInt(digits.slice(i, i + 2), 16);
  return [channel(0), channel(2), channel(4)];
}

/** sRGB channel to linear light, IEC 61966-2-1. */
const linear = (channel: number): number => {
  const c = channel / 255;
  return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
};
const gamma = (light: number): number => {
  const c = Math.min(Math.max(light, 0), 1);
  return 255 * (c <= 0.0031308 ? c * 12.92 : 1.055 * c ** (1 / 2.4) - 0.055);
};

/** Contrast ratio of two colours, WCAG 2.2, "relative luminance" and "contrast ratio". */
export function contrast(a: string, b: string): number {
  const luminance = (hex: string): number => {
    const [r, g, bl] = rgbOf(hex).map(linear) as [number, number, number];
    return 0.2126 * r + 0.7152 * g + 0.0722 * bl;
  };
  const [x, y] = [luminance(a), luminance(b)];
  return (Math.max(x, y) + 0.05) / (Math.min(x, y) + 0.05);
}

type Matrix = readonly [Rgb, Rgb, Rgb];

/**
 * Colour sights, on linear light: Machado, Oliveira and Fernandes 2009, "A physiologically-based model for simulation of
 * color vision deficiency", severity 1.0; Viénot, Brettel and Mollon 1999, "Digital video colourmaps for checking the
 * legibility of displays by dichromats", for sRGB primaries.
 */
export const SIGHTS: Record<string, Matrix> = {
  normal: [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ],
  'protan (Machado)': [
    [0.152286, 1.052583, -0.204868],
    [0.114503, 0.786281, 0.099216],
    [-0.003882, -0.048116, 1.051998],
  ],
  'deutan (Machado)': [
    [0.367322, 0.860646, -0.227968],
    [0.280085, 0.672501, 0.047413],
    [-0.01182, 0.04294, 0.968881],
  ],
  'protan (Viénot)': [
    [0.11238, 0.88762, 0],
    [0.11238, 0.88762, 0],
    [0.00401, -0.00401, 1],
  ],
  'deutan (Viénot)': [
    [0.29275, 0.70725, 0],
    [0.29275, 0.70725, 0],
    [-0.02234, 0.02234, 1],
  ],
};

/** A colour as somebody with that sight sees it; the matrices work on linear light. */
export function seenAs(rgb: Rgb, matrix: Matrix): Rgb {
  const [r, g, b] = rgb.map(linear) as [number, number, number];
  return matrix.map(([x, y, z]) => gamma(x * r + y * g + z * b)) as unknown as Rgb;
}

/** CIE L*a*b* under D65 (CIE 15:2004), from sRGB. */
function lab(rgb: Rgb): Rgb {
  const [r, g, b] = rgb.map(linear) as [number, number, number];
  const x = (0.4124564 * r + 0.3575761 * g + 0.1804375 * b) / 0.95047;
  const y = 0.2126729 * r + 0.7151522 * g + 0.072175 * b;
  const z = (0.0193339 * r + 0.119192 * g + 0.9503041 * b) / 1.08883;
  const f = (t: number): number => (t > 216 / 24389 ? Math.cbrt(t) : ((24389 / 27) * t + 16) / 116);
  return [116 * f(y) - 16, 500 * (f(x) - f(y)), 200 * (f(y) - f(z))];
}

/** Colour difference CIE76: the distance in L*a*b*. */
export function difference(a: Rgb, b: Rgb): number {
  const [p, q] = [lab(a), lab(b)];
  return Math.hypot(p[0] - q[0], p[1] - q[1], p[2] - q[2]);
}
