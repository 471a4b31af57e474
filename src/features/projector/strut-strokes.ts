import type { ShownState } from '../../../shared/travellers/step';

interface Place {
  x: number;
  y: number;
}

/** Part of a drawn strut: a line of some width, in its state's colour. */
export interface Stroke {
  d: string;
  /** In units. */
  width: number;
  dots?: true;
}

const f = (n: number) => Math.round(n * 10) / 10;
const at = ({ x, y }: Place) => `${f(x)} ${f(y)}`;

/** Places along a strut and beside it: a share of its length, and units to the left. */
function along(a: Place, b: Place) {
  const length = Math.hypot(b.x - a.x, b.y - a.y) || 1;
  const [ux, uy] = [(b.x - a.x) / length, (b.y - a.y) / length];
  const place = (px: number, aside = 0): Place => ({
    x: a.x + ux * px - uy * aside,
    y: a.y + uy * px + ux * aside,
  });
  return { length, place };
}

const line = (...places: Place[]) => `M${places.map(at).join('L')}`;

function wave(a: Place, b: Place, unit: number): string {
  const { length, place } = along(a, b);
  const halves = Math.max(2, Math.round(length / (9 * unit)));
  const half = length / halves;
  let d = `M${at(a)}`;
  for (let i = 0; i < halves; i++) {
    const side = i % 2 === 0 ? 1 : -1;
    d += `Q${at(place((i + 0.5) * half, side * 8 * unit))} ${at(place((i + 1) * half))}`;
  }
  return d;
}

/** A Z in the middle; a strut too short for it is one whole zigzag. */
function zigzag(a: Place, b: Place, unit: number): string {
  const { length, place } = along(a, b);
  const k = Math.min(6 * unit, length / 4);
  const h = Math.min(7 * unit, length / 4);
  const m = length / 2;
  return line(a, place(m - k), place(m - k * 0.6, -h), place(m + k * 0.6, h), place(m + k), b);
}

/**
 * A strut in the line pattern of its state; colour never stands alone.
 * @param state of its piece; `waiting` also for a strut that is not yet lit
 * @param a from
 * @param b to, px
 * @param unit px; 1 on a wall of 1080 lines
 */
export function strutStrokes(state: ShownState, a: Place, b: Place, unit: number): Stroke[] {
  const { length, place } = along(a, b);
  switch (state) {
    case 'waiting':
      return [{ d: line(a, b), width: 2, dots: true }];
    case 'ready':
      return [{ d: line(a, b), width: 2 }];
    case 'in hand':
      return [
        { d: line(a, place(length / 2)), width: 5.5 },
        { d: line(place(length / 2), b), width: 2 },
      ];
    case 'drying':
      return [{ d: wave(a, b, unit), width: 2.4 }];
    case 'to check':
      return [{ d: line(a, place(length - Math.min(12 * unit, length * 0.3))), width: 5.5 }];
    case 'passed':
      return [{ d: line(a, b), width: 5.5 }];
    case 'rework':
      return [{ d: zigzag(a, b, unit), width: 2.6 }];
    case 'held': {
      const bar = (offset: number) =>
        line(place(length / 2 + offset, -7 * unit), place(length / 2 + offset, 7 * unit));
      const apart = Math.min(4.5 * unit, length / 6);
      return [
        { d: line(a, b), width: 3.4 },
        { d: bar(-apart) + bar(apart), width: 2.6 },
      ];
    }
  }
}
