import { memo, useMemo } from 'react';
import type { FrameView } from '../../../shared/contracts/frames';
import { PlumbLine } from '../../components/ui/gauge';
import { STATE_COLOUR } from '../../components/ui/strut-geometry';
import type { Wanted } from './hands-wanted';
import type { Cell } from './sheet-layout';
import { pushedApart } from './pushed-apart';
import { wallDrawing, type WallPath, type WallPiece } from './wall-drawing';

const WIDTH = 1220;
const HEIGHT = 810;
const CODE_PX = 48;
/** Below the pieces stand the codes that the plumb lines lead to. */
const SHEET = HEIGHT - CODE_PX - 22;

export interface WallPictureProps {
  pieces: readonly WallPiece[];
  frames: ReadonlyMap<string, FrameView>;
  wanted: readonly Wanted[];
}

/** The installation as a flat sheet, lit strut by strut, with a plumb line from each wanted piece. */
export function WallPicture({ pieces, frames, wanted }: WallPictureProps) {
  const { paths, cells } = useMemo(() => wallDrawing(pieces, frames, WIDTH, SHEET), [pieces, frames]);
  const plumbs = plumbLines(wanted, cells);
  const codeWidth = (code: string) => code.length * CODE_PX * 0.625 + 20;
  const placed = pushedApart(
    plumbs.map(({ x, code }) => ({ at: x, size: codeWidth(code) })),
    WIDTH,
  );
  const passed = pieces.filter(({ steps }) => steps.every((step) => step.state === 'passed')).length;
  return (
    <svg
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      width="100%"
      height="100%"
      role="img"
      aria-label={`${passed} of ${pieces.length} pieces have passed`}
    >
      <g className="wall-struts">
        {paths.map((path) => (
          <Lines key={path.key} path={path} d={path.d} />
        ))}
      </g>
      {plumbs.map(({ key, code, x, y }, i) => (
        <PlumbLine
          key={key}
          x={x}
          from={y}
          to={SHEET + 12}
          code={code}
          fontSize={CODE_PX}
          codeX={placed[i] ?? x}
        />
      ))}
    </svg>
  );
}

interface Plumb {
  key: string;
  code: string;
  x: number;
  y: number;
}

/** Where in its piece a plumb line may begin, the middle first. */
const SHARES = [0.5, 0.3, 0.7, 0.15, 0.85];

/** A plumb line for each wanted piece, none on top of another. */
function plumbLines(wanted: readonly Wanted[], cells: ReadonlyMap<string, Cell>): Plumb[] {
  const plumbs: Plumb[] = [];
  for (const { pieceId, code, step } of wanted) {
    const cell = cells.get(pieceId);
    if (!cell) continue;
    const places = SHARES.map((share) => cell.x + cell.width * share);
    const x =
      places.find((place) => plumbs.every((other) => Math.abs(other.x - place) > 24)) ?? places[0] ?? 0;
    plumbs.push({ key: step.id, code, x, y: cell.y + cell.height / 2 });
  }
  return plumbs;
}

/** One path for all lines of a state: a change of one piece touches two of them. */
const Lines = memo(
  function Lines({ path }: { path: WallPath; d: string }) {
    return (
      <path
        d={path.d}
        fill="none"
        stroke={STATE_COLOUR[path.state]}
        strokeWidth={path.width}
        strokeLinecap={path.dots ? 'round' : 'butt'}
        strokeLinejoin="miter"
        strokeDasharray={path.dots ? `0.01 ${path.width * 3.4}` : undefined}
      />
    );
  },
  (before, after) => before.d === after.d,
);
