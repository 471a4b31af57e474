import { STEP_STATES } from '../../../shared/travellers/step';
import type { ShownState } from '../../../shared/travellers/step';

/** What a part of a mark is painted with: its state's colour, the ground it lies on, or nothing. */
type Paint = 'state' | 'ground' | 'none';

export type StrutPath = { kind: 'path'; d: string; width: number; round?: true };
export type StrutCircle = { kind: 'circle'; cx: number; cy: number; r: number; fill: Paint; width?: number };
/** One part of a mark; widths and places in px. */
export type StrutPart = StrutPath | StrutCircle;
/** A part with the state whose colour it carries. */
export type ColouredPart = StrutPart & { state: ShownState };

type JointKind = 'small' | 'hollow' | 'filled';

const ENDS: Record<ShownState, readonly [JointKind, JointKind]> = {
  waiting: ['small', 'small'],
  ready: ['hollow', 'hollow'],
  'in hand': ['filled', 'hollow'],
  drying: ['filled', 'filled'],
  'to check': ['filled', 'filled'],
  passed: ['filled', 'filled'],
  rework: ['filled', 'hollow'],
  held: ['hollow', 'hollow'],
};

export const GLYPH_STATES: readonly ShownState[] = STEP_STATES;

/** The custom property that holds a state's colour. */
export const STATE_COLOUR: Record<ShownState, string> = {
  waiting: 'var(--s-waiting)',
  ready: 'var(--s-ready)',
  'in hand': 'var(--s-hand)',
  drying: 'var(--s-drying)',
  'to check': 'var(--s-check)',
  passed: 'var(--s-passed)',
  rework: 'var(--s-rework)',
  held: 'var(--s-held)',
};

const f = (n: number): number => Number(n.toFixed(2));

/** The wave of a drying coat from `x0` to `x1` along `y`, as many whole waves of about `length` as fit. */
export function wavePath(x0: number, x1: number, y: number, length: number, height: number): string {
  const waves = Math.max(2, Math.round((x1 - x0) / length));
  const w = (x1 - x0) / waves;
  let d = `M${f(x0)} ${f(y)}`;
  for (let i = 0; i < waves; i++) {
    const x = x0 + i * w;
    d +=
      `C${f(x + w * 0.18)} ${f(y - height)} ${f(x + w * 0.32)} ${f(y - height)} ${f(x + w * 0.5)} ${f(y)}` +
      `S${f(x + w * 0.82)} ${f(y + height)} ${f(x + w)} ${f(y)}`;
  }
  return d;
}

/**
 * The strut of a state, without its joints.
 * @param xa centre of the left joint, px
 * @param xb centre of the right joint, px
 * @param y the line it lies on, px
 * @param u the unit, px: a sixteenth of a glyph's height
 * @param share for drying: the share of the time that has passed, 0 to 1
 */
export function strutParts(
  state: ShownState,
  xa: number,
  xb: number,
  y: number,
  u: number,
  share = 0.5,
): StrutPath[] {
  const a = xa + 5.2 * u;
  const b = xb - 5.2 * u;
  const m = (xa + xb) / 2;
  const line = (x1: number, x2: number, width: number): StrutPath => ({
    kind: 'path',
    d: `M${f(x1)} ${f(y)}H${f(x2)}`,
    width: f(width * u),
  });
  switch (state) {
    case 'waiting': {
      const n = Math.max(3, Math.round((b - a) / (5 * u)));
      let d = '';
      for (let i = 0; i <= n; i++) d += `M${f(a + ((b - a) * i) / n)} ${f(y)}h.01`;
      return [{ kind: 'path', d, width: f(1.7 * u), round: true }];
    }
    case 'ready':
      return [line(xa + 3.2 * u, xb - 3.2 * u, 1.5)];
    case 'in hand':
      return [line(xa, m, 4), line(m, xb - 3.2 * u, 1.25)];
    case 'drying': {
      const tick = xa + 4 * u + (xb - xa - 8 * u) * Math.min(1, Math.max(0, share));
      return [
        {
          kind: 'path',
          d: wavePath(xa + 2.5 * u, xb - 2.5 * u, y, 9 * u, 3.9 * u),
          width: f(2.3 * u),
        },
        { kind: 'path', d: `M${f(tick)} ${f(y - 9 * u)}v${f(4.4 * u)}`, width: f(1.8 * u) },
      ];
    }
    case 'to check':
      return [line(xa, b - 2.6 * u, 4)];
    case 'passed':
      return [line(xa, xb, 4)];
    case 'rework': {
      const h = 4.8 * u;
      const k = 5.2 * u;
      const d =
        `M${f(xa)} ${f(y)}H${f(m - k - u)}L${f(m - k + 0.8 * u)} ${f(y - h)}H${f(m + k)}` +
        `L${f(m - k)} ${f(y + h)}H${f(m + k - 0.8 * u)}L${f(m + k + u)} ${f(y)}H${f(xb - 3.2 * u)}`;
      return [{ kind: 'path', d, width: f(2.1 * u) }];
    }
    case 'held':
      return [
        line(xa + 3.2 * u, xb - 3.2 * u, 3.4),
        ...[-1, 1].map((side): StrutPath => ({
          kind: 'path',
          d: `M${f(m + side * 3.6 * u)} ${f(y - 6 * u)}V${f(y + 6 * u)}`,
          width: f(2.1 * u),
        })),
      ];
  }
}

function jointPart(kind: JointKind, x: number, y: number, u: number): StrutCircle {
  const at = { kind: 'circle', cx: f(x), cy: f(y) } as const;
  if (kind === 'filled') return { ...at, r: f(3.7 * u), fill: 'state' };
  if (kind === 'hollow') return { ...at, r: f(3.1 * u), fill: 'ground', width: f(1.5 * u) };
  return { ...at, r: f(2 * u), fill: 'ground', width: f(1.2 * u) };
}

/** The open ring of a step that waits to be checked. */
const ringPart = (x: number, y: number, u: number): StrutCircle => ({
  kind: 'circle',
  cx: f(x),
  cy: f(y),
  r: f(6.1 * u),
  fill: 'none',
  width: f(1.5 * u),
});

/** The mark of one state: 40 u wide, 16 u high. */
export function glyphParts(state: ShownState, height: number, share?: number): StrutPart[] {
  const u = height / 16;
  const [y, xa, xb] = [9 * u, 5 * u, 33 * u];
  const [left, right] = ENDS[state];
  const parts: StrutPart[] = [
    ...strutParts(state, xa, xb, y, u, share),
    jointPart(left, xa, y, u),
    jointPart(right, xb, y, u),
  ];
  if (state === 'to check') parts.push(ringPart(xb, y, u));
  return parts;
}

export type StickLength = { state: ShownState; share?: number };
export type StickOptions = { pitch: number; height: number; unit: number; pad: number };

/** A length that waits or has passed carries no joints: a finished piece is one unbroken stick. */
const worked = (state: ShownState | undefined): boolean =>
  state !== undefined && state !== 'passed' && state !== 'waiting';

/** Which joint stands between two lengths: it belongs to the work that reached it. */
function jointBetween(
  before: ShownState | undefined,
  after: ShownState | undefined,
): { kind: JointKind; state: ShownState } {
  const end = before && ENDS[before][1];
  const begin = after && ENDS[after][0];
  if (before && end === 'filled') return { kind: 'filled', state: before };
  if (after && begin === 'filled') return { kind: 'filled', state: after };
  if (after && begin === 'hollow') return { kind: 'hollow', state: after };
  if (before && end === 'hollow') return { kind: 'hollow', state: before };
  return { kind: 'small', state: 'waiting' };
}

/** A traveller as one marked stick: its steps end to end, from left to right. */
export function stickParts(
  lengths: readonly StickLength[],
  { pitch, height, unit: u, pad }: StickOptions,
): { width: number; parts: ColouredPart[] } {
  const y = Math.round(height * 0.58);
  const x = (i: number): number => pad + i * pitch;
  const parts: ColouredPart[] = lengths.flatMap(({ state, share }, i) =>
    strutParts(state, x(i), x(i + 1), y, u, share).map((part) => ({ ...part, state })),
  );
  for (let k = 0; k <= lengths.length; k++) {
    const before = lengths[k - 1]?.state;
    const after = lengths[k]?.state;
    if (!worked(before) && !worked(after)) {
      const done = before === 'passed' || (k === 0 && after === 'passed');
      parts.push({
        kind: 'path',
        d: `M${f(x(k))} ${f(y - 5 * u)}v${f(10 * u)}`,
        width: f(1.4 * u),
        state: done ? 'passed' : 'waiting',
      });
      continue;
    }
    const { kind, state } = jointBetween(before, after);
    parts.push({ ...jointPart(kind, x(k), y, u), state });
    if (before === 'to check') parts.push({ ...ringPart(x(k), y, u), state: before });
  }
  return { width: pad * 2 + lengths.length * pitch, parts };
}

/**
 * The same drawing in fewer parts: lines of one state and width become one path, so that a board of hundreds of sticks
 * stays light. Joints lie on top, in their order.
 */
export function joinedParts(parts: readonly ColouredPart[]): ColouredPart[] {
  const paths = new Map<string, ColouredPart & StrutPath>();
  const circles: ColouredPart[] = [];
  for (const part of parts) {
    if (part.kind === 'circle') {
      circles.push(part);
      continue;
    }
    const key = `${part.state} ${part.width} ${part.round ?? ''}`;
    const known = paths.get(key);
    paths.set(key, known ? { ...known, d: known.d + part.d } : part);
  }
  return [...paths.values(), ...circles];
}

/** The words of a marked stick: how many passed, what is worked on, how many wait. */
export function stickLabel(code: string, steps: readonly { name: string; state: ShownState }[]): string {
  const count = (state: ShownState): number => steps.filter((step) => step.state === state).length;
  const told = steps.filter((step) => worked(step.state)).map(({ name, state }) => `${name} ${state}`);
  const waiting = count('waiting');
  return [
    `${code}: ${count('passed')} of ${steps.length} steps passed`,
    ...told,
    ...(waiting > 0 ? [`${waiting} waiting`] : []),
  ].join(', ');
}
