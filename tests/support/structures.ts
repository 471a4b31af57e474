import type { Frame, Joint, Strut } from '../../shared/frames';
import { seededRandom } from '../../shared/kernel/random';

/** Collects struts between named points, each once. */
class Builder {
  readonly joints: Joint[] = [];
  readonly struts: Strut[] = [];
  private readonly at = new Map<string, number>();
  private readonly known = new Set<string>();

  joint(x: number, y: number, z: number): number {
    const key = [x, y, z].map((value) => Math.round(value * 10)).join(',');
    const found = this.at.get(key);
    if (found !== undefined) return found;
    this.joints.push({ x, y, z });
    this.at.set(key, this.joints.length - 1);
    return this.joints.length - 1;
  }

  strut(a: number, b: number): void {
    const key = a < b ? `${a}-${b}` : `${b}-${a}`;
    if (a === b || this.known.has(key)) return;
    this.known.add(key);
    this.struts.push([a, b]);
  }

  frame(): Frame {
    return { joints: this.joints, struts: this.struts, faces: [] };
  }
}

const STEP_MM = 500;

/** A flat square lattice of nx by ny bays, with a diagonal in every bay when asked. */
export function flatLattice(nx: number, ny: number, braced = false): Frame {
  const made = new Builder();
  const at = (x: number, y: number) => made.joint(x * STEP_MM, y * STEP_MM, 0);
  for (let y = 0; y <= ny; y += 1) {
    for (let x = 0; x <= nx; x += 1) {
      if (x < nx) made.strut(at(x, y), at(x + 1, y));
      if (y < ny) made.strut(at(x, y), at(x, y + 1));
      if (braced && x < nx && y < ny) made.strut(at(x, y), at(x + 1, y + 1));
    }
  }
  return made.frame();
}

/** A double-layer grid, square on offset square: top nx by ny bays, bottom one less each way. */
export function doubleLayerGrid(nx: number, ny: number): Frame {
  const made = new Builder();
  const top = (x: number, y: number) => made.joint(x * STEP_MM, y * STEP_MM, 0);
  const low = (x: number, y: number) => made.joint((x + 0.5) * STEP_MM, (y + 0.5) * STEP_MM, -STEP_MM * 0.7);
  for (let y = 0; y <= ny; y += 1) {
    for (let x = 0; x <= nx; x += 1) {
      if (x < nx) made.strut(top(x, y), top(x + 1, y));
      if (y < ny) made.strut(top(x, y), top(x, y + 1));
    }
  }
  for (let y = 0; y < ny; y += 1) {
    for (let x = 0; x < nx; x += 1) {
      if (x < nx - 1) made.strut(low(x, y), low(x + 1, y));
      if (y < ny - 1) made.strut(low(x, y), low(x, y + 1));
      for (const [dx, dy] of [
        [0, 0],
        [1, 0],
        [0, 1],
        [1, 1],
      ] as const) {
        made.strut(low(x, y), top(x + dx, y + dy));
      }
    }
  }
  return made.frame();
}

/** A barrel vault of triangles: `along` bays long, `around` bays over half a circle. */
export function barrelVault(along: number, around: number): Frame {
  const made = new Builder();
  const radius = (around * STEP_MM) / Math.PI;
  const at = (x: number, k: number) => {
    const angle = (k / around) * Math.PI;
    return made.joint(x * STEP_MM, radius * Math.cos(angle), radius * Math.sin(angle));
  };
  for (let x = 0; x <= along; x += 1) {
    for (let k = 0; k <= around; k += 1) {
      if (x < along) made.strut(at(x, k), at(x + 1, k));
      if (k < around) made.strut(at(x, k), at(x, k + 1));
      if (x < along && k < around) made.strut(at(x + ((x + k) % 2), k), at(x + 1 - ((x + k) % 2), k + 1));
    }
  }
  return made.frame();
}

/** Rings of a dome with diagonals: `sides` panels around, `rings` rings from the foot to the crown. */
export function ribbedDome(sides: number, rings: number): Frame {
  const made = new Builder();
  const radius = 3000;
  const at = (ring: number, k: number) => {
    const tilt = (ring / rings) * (Math.PI / 2);
    const turn = (2 * Math.PI * (k % sides)) / sides;
    const flat = radius * Math.cos(tilt);
    return ring === rings
      ? made.joint(0, 0, radius)
      : made.joint(flat * Math.cos(turn), flat * Math.sin(turn), radius * Math.sin(tilt));
  };
  for (let ring = 0; ring < rings; ring += 1) {
    for (let k = 0; k < sides; k += 1) {
      made.strut(at(ring, k), at(ring, k + 1));
      made.strut(at(ring, k), at(ring + 1, k));
      if (ring < rings - 1) made.strut(at(ring, k), at(ring + 1, k + 1));
    }
  }
  return made.frame();
}

/** A tree of triangular trusses: a trunk of `bays`, which forks `levels` times into two. */
export function trussTree(bays: number, levels: number): Frame {
  const made = new Builder();
  const grow = (
    from: readonly number[],
    x: number,
    y: number,
    z: number,
    dx: number,
    dy: number,
    level: number,
  ): void => {
    let last = from;
    for (let bay = 1; bay <= bays; bay += 1) {
      const [cx, cy, cz] = [x + dx * bay * STEP_MM, y + dy * bay * STEP_MM, z + bay * STEP_MM];
      const next = [0, 1, 2].map((k) => {
        const angle = (2 * Math.PI * k) / 3;
        return made.joint(cx + 200 * Math.cos(angle), cy + 200 * Math.sin(angle), cz);
      });
      for (let k = 0; k < 3; k += 1) {
        made.strut(next[k] as number, next[(k + 1) % 3] as number);
        made.strut(last[k] as number, next[k] as number);
        made.strut(last[k] as number, next[(k + 1) % 3] as number);
      }
      last = next;
    }
    if (level === 0) return;
    const [ex, ey, ez] = [x + dx * bays * STEP_MM, y + dy * bays * STEP_MM, z + bays * STEP_MM];
    const spread = 1.2 / (levels - level + 1);
    const across = (levels - level) % 2 === 0;
    grow(last, ex, ey, ez, across ? spread : dx, across ? dy : spread, level - 1);
    grow(last, ex, ey, ez, across ? -spread : dx, across ? dy : -spread, level - 1);
  };
  const foot = [0, 1, 2].map((k) => {
    const angle = (2 * Math.PI * k) / 3;
    return made.joint(200 * Math.cos(angle), 200 * Math.sin(angle), 0);
  });
  for (let k = 0; k < 3; k += 1) made.strut(foot[k] as number, foot[(k + 1) % 3] as number);
  grow(foot, 0, 0, 0, 0, 0, levels);
  return made.frame();
}

/** A connected frame of random points and struts. */
export function randomFrame(joints: number, struts: number, seed: number): Frame {
  const random = seededRandom(seed);
  const made = new Builder();
  for (let k = 0; k < joints; k += 1) made.joint(random() * 3000, random() * 3000, random() * 2000);
  // A tree first, each point hung on the nearest of a few known ones, so that it is one piece and not all long struts.
  for (let k = 1; k < joints; k += 1) made.strut(k, nearestOf(made.joints, k, k, random));
  for (let tries = 0; made.struts.length < struts && tries < struts * 50; tries += 1) {
    const a = Math.floor(random() * joints);
    made.strut(a, nearestOf(made.joints, a, joints, random));
  }
  return made.frame();
}

function nearestOf(points: readonly Joint[], from: number, among: number, random: () => number): number {
  let best = -1;
  let least = Infinity;
  for (let tries = 0; tries < 3; tries += 1) {
    const other = Math.floor(random() * among);
    if (other === from) continue;
    const [p, q] = [points[from] as Joint, points[other] as Joint];
    const away = Math.hypot(p.x - q.x, p.y - q.y, p.z - q.z);
    if (away < least) [best, least] = [other, away];
  }
  return best < 0 ? (from === 0 ? 1 : 0) : best;
}
