import type { Joint, Strut } from '../../../shared/frames';
import type { Projected } from './camera';

/** How a strut is drawn. */
export interface StrutLook {
  /** Name of a colour of the stylesheets, without the dashes. */
  colour: string;
  /** Strokes and gaps, px; none for a solid line. */
  dash: readonly number[];
  /** Drawn as a trace of pencil behind the others, and not to be picked. */
  faint?: boolean;
}

/** A word at a place: the letter of a piece, the number of a joint. */
export interface Label {
  at: Joint;
  text: string;
  colour?: string;
  /** Drawn before others claim the room. */
  first?: boolean;
}

export interface Scene {
  joints: readonly Joint[];
  struts: readonly Strut[];
  look: (strut: number) => StrutLook;
  selected: ReadonlySet<number>;
  current: number;
}

/** Colours by name, as the theme has them now. */
export type Colours = (name: string) => string;

const WIDTH = 2;
const FAINT_ALPHA = 0.22;
/** Struts far away are drawn lighter, down to this. */
const FAR_ALPHA = 0.5;
const DEPTHS = 4;

/**
 * Draws struts, the far ones first: those of one look and depth in one stroke, so that thousands cost little.
 */
export function paintStruts(
  paper: CanvasRenderingContext2D,
  scene: Scene,
  points: Projected,
  radius: number,
  colours: Colours,
): void {
  const strokes = new Map<string, { look: StrutLook; depth: number; struts: number[] }>();
  scene.struts.forEach(([a, b], strut) => {
    const look = scene.look(strut);
    const middle = ((points[3 * a + 2] ?? 0) + (points[3 * b + 2] ?? 0)) / 2;
    const share = (middle / radius + 1) / 2;
    const depth = look.faint ? -1 : Math.max(0, Math.min(DEPTHS - 1, Math.floor(share * DEPTHS)));
    const key = `${depth}|${look.colour}|${look.dash.join(' ')}`;
    const known = strokes.get(key);
    if (known) known.struts.push(strut);
    else strokes.set(key, { look, depth, struts: [strut] });
  });
  const trace = (struts: Iterable<number>) => {
    paper.beginPath();
    for (const strut of struts) {
      const ends = scene.struts[strut];
      if (!ends) continue;
      const [a, b] = ends;
      paper.moveTo(points[3 * a] ?? 0, points[3 * a + 1] ?? 0);
      paper.lineTo(points[3 * b] ?? 0, points[3 * b + 1] ?? 0);
    }
    paper.stroke();
  };
  paper.lineCap = 'round';
  for (const { look, depth, struts } of [...strokes.values()].sort((p, q) => p.depth - q.depth)) {
    paper.strokeStyle = colours(look.colour);
    paper.lineWidth = look.faint ? 1 : WIDTH;
    paper.globalAlpha = look.faint ? FAINT_ALPHA : FAR_ALPHA + ((1 - FAR_ALPHA) * (depth + 1)) / DEPTHS;
    paper.setLineDash([...look.dash]);
    trace(struts);
  }
  paper.globalAlpha = 1;
  paper.setLineDash([]);
  if (scene.selected.size > 0) {
    paper.strokeStyle = colours('ink');
    paper.lineWidth = WIDTH + 3;
    trace(scene.selected);
  }
  if (scene.current >= 0) {
    paper.strokeStyle = colours('s-hand');
    paper.lineWidth = WIDTH + 2;
    trace([scene.current]);
  }
}

const FONT_PX = 15;

/** Writes labels, each only where no earlier one stands, with the ground behind them. */
export function paintLabels(
  paper: CanvasRenderingContext2D,
  labels: readonly { x: number; y: number; text: string; colour?: string | undefined; bold: boolean }[],
  colours: Colours,
): void {
  paper.textAlign = 'center';
  paper.textBaseline = 'middle';
  const taken: { left: number; right: number; top: number; foot: number }[] = [];
  for (const { x, y, text, colour, bold } of labels) {
    paper.font = `${bold ? 600 : 400} ${FONT_PX}px Lexend, sans-serif`;
    const half = paper.measureText(text).width / 2 + 3;
    const box = { left: x - half, right: x + half, top: y - FONT_PX / 2 - 2, foot: y + FONT_PX / 2 + 2 };
    const crowded = taken.some(
      (other) =>
        box.left < other.right && box.right > other.left && box.top < other.foot && box.foot > other.top,
    );
    if (crowded) continue;
    taken.push(box);
    paper.fillStyle = colours('ground');
    paper.globalAlpha = 0.85;
    paper.fillRect(box.left, box.top, box.right - box.left, box.foot - box.top);
    paper.globalAlpha = 1;
    paper.fillStyle = colours(colour ?? 'ink');
    paper.fillText(text, x, y);
  }
}
