import { z } from 'zod';
import { strutLengths } from '../frame';
import type { Frame } from '../frame';

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
export function measure(name: string, least: number, most: number, unit: string) {
  const range = `${name} must be from ${least} to ${most}${unit}`;
  return z
    .number({ error: (issue) => `${range}; ${typed(issue.input)}. Type a number.` })
    .min(least, { error: (issue) => `${range}; ${typed(issue.input)}.` })
    .max(most, { error: (issue) => `${range}; ${typed(issue.input)}.` });
}

/** A length in mm: 10 or more, unless another least is given, to 20,000. */
export const lengthMm = (name: string, least: number = SHAPE_LIMITS.leastMm) =>
  measure(name, least, SHAPE_LIMITS.mostMm, ' mm');

/** A whole number within limits. */
export const whole = (name: string, least: number, most: number) =>
  measure(name, least, most, '').refine(Number.isInteger, {
    error: (issue) => `${name} must be a whole number; ${typed(issue.input)}.`,
  });

/** How far a ring is turned, degrees. */
export const twistDegrees = (name: string) => measure(name, -180, 180, ' degrees');

/** Refuses a field of a shape with words. */
export type Refuse = (path: string, message: string) => void;

/**
 * Refuses a shape whose shortest strut cannot be cut.
 * @param frame as it would be built
 * @param path field to stand at
 * @param advice what to do, as a sentence
 */
export function refuseShortStruts(frame: Frame, refuse: Refuse, path: string, advice: string): void {
  const shortest = strutLengths(frame).reduce((a, b) => Math.min(a, b), Infinity);
  if (shortest < SHAPE_LIMITS.leastStrutMm)
    refuse(
      path,
      `The shortest strut would be ${shortest.toFixed(1)} mm; at least ${SHAPE_LIMITS.leastStrutMm} mm can be cut. ${advice}`,
    );
}

/** Refuses a shape of too many struts; whether it did. */
export function refuseManyStruts(struts: number, refuse: Refuse, path: string): boolean {
  if (struts <= SHAPE_LIMITS.mostStruts) return false;
  refuse(
    path,
    `It would have ${Math.round(struts).toLocaleString('en')} struts; at most ${SHAPE_LIMITS.mostStruts.toLocaleString('en')} can be one shape. Take fewer divisions, or set out several shapes.`,
  );
  return true;
}
