import type { FrameView } from '../../../shared/contracts/frames';
import type { StepRecord, SubAssemblyRecord } from '../../../shared/contracts/live';
import { assemblyOrder } from '../../../shared/frames/assembly-order';
import { chooseCamera, project } from '../../../shared/frames/projection';
import type { ShownState } from '../../../shared/travellers/step';
import { litStruts } from './lit-struts';
import { sheetLayout, type Cell } from './sheet-layout';
import { strutStrokes } from './strut-strokes';

/** A frame seen flat: its struts in order of assembly, in a box one high and `aspect` wide. */
interface Flat {
  aspect: number;
  struts: readonly { x1: number; y1: number; x2: number; y2: number }[];
}

const known = new WeakMap<FrameView, Flat>();

/** Worked out once per frame, however many pieces are made from it and however often they change. */
function flatOf(frame: FrameView): Flat {
  const before = known.get(frame);
  if (before) return before;
  const { geometry } = frame;
  const camera = chooseCamera(geometry, 'auto');
  const points = geometry.joints.map((joint) => project(joint, camera));
  const xs = points.map(({ x }) => x);
  const ys = points.map(({ y }) => y);
  const [left, right] = [Math.min(...xs), Math.max(...xs)];
  const [low, high] = [Math.min(...ys), Math.max(...ys)];
  const size = Math.max(high - low, (right - left) / 4, 1e-6);
  const flat: Flat = {
    aspect: (right - left) / size,
    struts: assemblyOrder(geometry).flatMap((index) => {
      const [a, b] = geometry.struts[index] ?? [];
      const from = a === undefined ? undefined : points[a];
      const to = b === undefined ? undefined : points[b];
      if (!from || !to) return [];
      // Lower pieces stand in the middle of their height.
      const y = (value: number) => 0.5 - (value - (low + high) / 2) / size;
      const x = (value: number) => (value - left) / size;
      return [{ x1: x(from.x), y1: y(from.y), x2: x(to.x), y2: y(to.y) }];
    }),
  };
  known.set(frame, flat);
  return flat;
}

/** Every line of one state and width on the sheet, as one path. */
export interface WallPath {
  key: string;
  state: ShownState;
  d: string;
  width: number;
  dots: boolean;
}

export interface WallPiece {
  piece: SubAssemblyRecord;
  steps: readonly StepRecord[];
}

/** The whole installation, flat. */
export interface WallDrawing {
  paths: readonly WallPath[];
  cells: ReadonlyMap<string, Cell>;
}

/** States painted later lie on top: what needs eyes lies over what is done. */
const ORDER: readonly ShownState[] = [
  'waiting',
  'passed',
  'ready',
  'in hand',
  'drying',
  'to check',
  'rework',
  'held',
];

/**
 * All pieces on one sheet, each strut lit in order of assembly as the minutes of its piece pass.
 * @param pieces in the order shown; those without a frame are left out
 * @param frames by id
 * @param width of the sheet, px
 * @param height of the sheet, px
 */
export function wallDrawing(
  pieces: readonly WallPiece[],
  frames: ReadonlyMap<string, FrameView>,
  width: number,
  height: number,
): WallDrawing {
  const drawn = pieces.flatMap(({ piece, steps }) => {
    const frame = frames.get(piece.frameId);
    return frame ? [{ piece, steps, flat: flatOf(frame) }] : [];
  });
  const places = sheetLayout(
    drawn.map(({ flat }) => flat.aspect),
    width,
    height,
  );
  const paths = new Map<string, WallPath>();
  const cells = new Map<string, Cell>();
  drawn.forEach(({ piece, steps, flat }, i) => {
    const cell = places[i];
    if (!cell) return;
    cells.set(piece.id, cell);
    // The cell may be narrower than the piece is for its height: then the piece gets smaller, not cut off.
    const scale = Math.min(cell.height, cell.width / Math.max(flat.aspect, 1e-6));
    const [x0, y0] = [cell.x + (cell.width - flat.aspect * scale) / 2, cell.y + (cell.height - scale) / 2];
    const unit = unitFor(Math.sqrt(cell.width * cell.height));
    const lit = litStruts(steps, flat.struts.length);
    flat.struts.forEach((strut, k) => {
      const state = k < lit.struts ? lit.state : 'waiting';
      const a = { x: x0 + strut.x1 * scale, y: y0 + strut.y1 * scale };
      const b = { x: x0 + strut.x2 * scale, y: y0 + strut.y2 * scale };
      for (const stroke of strutStrokes(state, a, b, unit)) {
        const width = stroke.width * unit;
        const key = `${state} ${width.toFixed(2)}`;
        const path = paths.get(key);
        if (path) path.d += stroke.d;
        else paths.set(key, { key, state, d: stroke.d, width, dots: stroke.dots === true });
      }
    });
  });
  const ordered = [...paths.values()].sort((a, b) => ORDER.indexOf(a.state) - ORDER.indexOf(b.state));
  return { paths: ordered, cells };
}

/** Lines get thinner with the pieces, down to what can still be told apart. */
const unitFor = (size: number) => Math.min(1.15, Math.max(0.45, size / 150));
