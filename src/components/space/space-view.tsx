import {
  useCallback,
  useEffect,
  useId,
  useMemo,
  useRef,
  useState,
  type KeyboardEvent,
  type PointerEvent,
} from 'react';
import type { Joint, Strut } from '../../../shared/frames';
import { Action } from '../ui/action';
import { ChoiceRow } from '../ui/heads';
import { useWidth } from '../ui/use-width';
import { ballOf, fillScale, moved, project, START, VIEWS, type Camera, type Projected } from './camera';
import { paintLabels, paintStruts, type Label, type StrutLook } from './paint';
import { strutAt, strutsIn } from './picking';

export type SpaceViewProps = {
  joints: readonly Joint[];
  struts: readonly Strut[];
  /** What is drawn, for those who do not see it. */
  label: string;
  look: (strut: number) => StrutLook;
  /** Words at places: letters of pieces. */
  labels?: readonly Label[];
  numbers?: 'none' | 'joints' | 'struts';
  /** Chosen struts; without it struts cannot be chosen. */
  selected?: ReadonlySet<number>;
  onSelect?: (struts: ReadonlySet<number>) => void;
  /** A strut in words, read out when it is stepped onto. */
  describe?: (strut: number) => string;
};

const NONE: ReadonlySet<number> = new Set();
const STEP_DEGREES = 10;
const NEARER = 1.25;
/** A press that moved less than this is a press, not a turn, px. */
const STILL_PX = 5;

interface Drag {
  x: number;
  y: number;
  camera: Camera;
  box: boolean;
}

/**
 * The drawing in space, drawn as lines on paper without perspective, so that it needs no graphics card and thousands of struts turn
 * smoothly on an old laptop. Drag turns it; with Shift it draws a box that chooses; a press chooses one strut.
 */
export function SpaceView(props: SpaceViewProps) {
  const {
    joints,
    struts,
    label,
    look,
    labels,
    numbers = 'none',
    selected = NONE,
    onSelect,
    describe,
  } = props;
  const helpId = useId();
  const canvas = useRef<HTMLCanvasElement>(null);
  const [holder, width] = useWidth<HTMLDivElement>(720);
  const height = Math.max(280, Math.min(620, Math.round(width * 0.62)));
  const [camera, setCamera] = useState<Camera>(START);
  // It fills the paper in the view that was chosen and keeps its size while it is turned.
  const [chosen, setChosen] = useState<Camera>(START);
  const [current, setCurrent] = useState(-1);
  const [box, setBox] = useState<{ x1: number; y1: number; x2: number; y2: number } | null>(null);
  const drag = useRef<Drag | null>(null);
  const points = useRef<Projected>(new Float64Array(0));
  const ball = useMemo(() => ballOf(joints), [joints]);
  const scale = useMemo(
    () => fillScale(joints, ball, chosen, width, height),
    [joints, ball, chosen, width, height],
  );
  const theme = useThemeName();
  const mayPick = useCallback((strut: number) => !look(strut).faint, [look]);

  useEffect(() => {
    const sheet = canvas.current;
    const paper = sheet?.getContext('2d');
    if (!sheet || !paper || width === 0) return;
    const dense = window.devicePixelRatio || 1;
    sheet.width = Math.round(width * dense);
    sheet.height = Math.round(height * dense);
    paper.setTransform(dense, 0, 0, dense, 0, 0);
    paper.clearRect(0, 0, width, height);
    const colours = coloursOf(sheet);
    points.current = project(joints, ball, camera, scale, width, height, points.current);
    paintStruts(paper, { joints, struts, look, selected, current }, points.current, ball.radius, colours);
    const words = [
      ...place(labels ?? [], ball, camera, scale, width, height, true),
      ...place(numbered(numbers, joints, struts, look), ball, camera, scale, width, height, false),
    ];
    paintLabels(paper, words, colours);
    if (box) {
      paper.strokeStyle = colours('s-hand');
      paper.setLineDash([5, 4]);
      paper.lineWidth = 1.5;
      paper.strokeRect(box.x1, box.y1, box.x2 - box.x1, box.y2 - box.y1);
    }
  }, [
    joints,
    struts,
    look,
    selected,
    current,
    labels,
    numbers,
    camera,
    ball,
    scale,
    width,
    height,
    box,
    theme,
  ]);

  const choose = (found: readonly number[], add: boolean) => {
    if (!onSelect) return;
    const next = new Set(add ? selected : NONE);
    for (const strut of found) {
      if (add && found.length === 1 && selected.has(strut)) next.delete(strut);
      else next.add(strut);
    }
    onSelect(next);
  };
  const at = (event: PointerEvent): { x: number; y: number } => {
    const edge = event.currentTarget.getBoundingClientRect();
    return { x: event.clientX - edge.left, y: event.clientY - edge.top };
  };
  const onPointerDown = (event: PointerEvent<HTMLCanvasElement>) => {
    event.currentTarget.setPointerCapture(event.pointerId);
    drag.current = { ...at(event), camera, box: event.shiftKey && onSelect !== undefined };
  };
  const onPointerMove = (event: PointerEvent<HTMLCanvasElement>) => {
    const from = drag.current;
    if (!from) return;
    const { x, y } = at(event);
    if (from.box) setBox({ x1: from.x, y1: from.y, x2: x, y2: y });
    else setCamera(moved(from.camera, { turn: (x - from.x) * 0.4, tilt: (y - from.y) * 0.4 }));
  };
  const onPointerUp = (event: PointerEvent<HTMLCanvasElement>) => {
    const from = drag.current;
    drag.current = null;
    setBox(null);
    if (!from) return;
    const { x, y } = at(event);
    if (Math.hypot(x - from.x, y - from.y) > STILL_PX) {
      if (from.box)
        choose(strutsIn(points.current, struts, { x1: from.x, y1: from.y, x2: x, y2: y }, mayPick), true);
      return;
    }
    const strut = strutAt(points.current, struts, x, y, mayPick);
    setCurrent(strut);
    if (strut >= 0) choose([strut], event.shiftKey || event.ctrlKey || event.metaKey);
    else if (onSelect && selected.size > 0) onSelect(NONE);
  };

  const step = (by: 1 | -1) => {
    if (struts.length === 0) return;
    for (let tries = 0, next = current; tries < struts.length; tries += 1) {
      next = (next + by + struts.length) % struts.length;
      if (!mayPick(next)) continue;
      setCurrent(next);
      return;
    }
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const act = keyAction(event.key);
    if (!act) return;
    event.preventDefault();
    if (act.step) step(act.step);
    else if (act.choose) {
      if (current >= 0) choose([current], true);
    } else if (act.clear) {
      setCurrent(-1);
      onSelect?.(NONE);
    } else if (act.move) setCamera(moved(camera, act.move));
  };

  const view = VIEWS.find(({ camera: known }) => known.turn === camera.turn && known.tilt === camera.tilt);
  return (
    <div className="relative grid min-w-0 gap-3">
      <div className="flex flex-wrap items-center justify-between gap-x-8 gap-y-2">
        <ChoiceRow
          label="view"
          choices={VIEWS.map(({ key, label: words }) => ({ value: key, label: words }))}
          value={view?.key ?? ''}
          onChange={(key) => {
            const next = VIEWS.find((known) => known.key === key)?.camera ?? START;
            setChosen(next);
            setCamera(next);
          }}
        />
        <div className="flex flex-wrap gap-1">
          <Action look="words" label="Nearer" onClick={() => setCamera(moved(camera, { times: NEARER }))}>
            Nearer
          </Action>
          <Action
            look="words"
            label="Farther"
            onClick={() => setCamera(moved(camera, { times: 1 / NEARER }))}
          >
            Farther
          </Action>
        </div>
      </div>
      <div ref={holder}>
        <canvas
          ref={canvas}
          className="space-view"
          style={{ width: '100%', height }}
          tabIndex={0}
          role="application"
          aria-label={label}
          aria-describedby={helpId}
          onPointerDown={onPointerDown}
          onPointerMove={onPointerMove}
          onPointerUp={onPointerUp}
          onKeyDown={onKeyDown}
        />
      </div>
      <p className="sr-only" role="status">
        {current >= 0 ? (describe?.(current) ?? `strut ${current + 1}`) : ''}
      </p>
      <p id={helpId} className="text-small text-pencil">
        Drag or arrow keys turn it, + and - bring it nearer.
        {onSelect &&
          ' Press a strut to choose it, with Shift for more; drag with Shift for a box. N and P step from strut to strut, Enter chooses, Escape lets go.'}
      </p>
    </div>
  );
}

interface KeyAct {
  step?: 1 | -1;
  choose?: true;
  clear?: true;
  move?: Parameters<typeof moved>[1];
}

const KEYS: Readonly<Record<string, KeyAct>> = {
  ArrowLeft: { move: { turn: -STEP_DEGREES } },
  ArrowRight: { move: { turn: STEP_DEGREES } },
  ArrowUp: { move: { tilt: STEP_DEGREES } },
  ArrowDown: { move: { tilt: -STEP_DEGREES } },
  '+': { move: { times: NEARER } },
  '=': { move: { times: NEARER } },
  '-': { move: { times: 1 / NEARER } },
  n: { step: 1 },
  p: { step: -1 },
  Enter: { choose: true },
  ' ': { choose: true },
  Escape: { clear: true },
};
const keyAction = (key: string): KeyAct | undefined => KEYS[key];

/** Where labels come to stand on the paper, the nearest first. */
function place(
  labels: readonly Label[],
  ball: ReturnType<typeof ballOf>,
  camera: Camera,
  scale: number,
  width: number,
  height: number,
  bold: boolean,
) {
  const places = project(
    labels.map(({ at }) => at),
    ball,
    camera,
    scale,
    width,
    height,
  );
  return labels
    .map(({ text, colour }, index) => ({
      x: places[3 * index] ?? 0,
      y: places[3 * index + 1] ?? 0,
      depth: places[3 * index + 2] ?? 0,
      text,
      colour,
      bold,
    }))
    .sort((p, q) => q.depth - p.depth);
}

function numbered(
  numbers: 'none' | 'joints' | 'struts',
  joints: readonly Joint[],
  struts: readonly Strut[],
  look: (strut: number) => StrutLook,
): Label[] {
  if (numbers === 'joints') {
    const strong = new Set(struts.flatMap((ends, strut) => (look(strut).faint ? [] : ends)));
    return [...strong].map((joint) => ({
      at: joints[joint] ?? { x: 0, y: 0, z: 0 },
      text: String(joint + 1),
    }));
  }
  if (numbers === 'struts') {
    return struts.flatMap(([a, b], strut) => {
      const [from, to] = [joints[a], joints[b]];
      if (!from || !to || look(strut).faint) return [];
      const at = { x: (from.x + to.x) / 2, y: (from.y + to.y) / 2, z: (from.z + to.z) / 2 };
      return [{ at, text: String(strut + 1), colour: 'pencil' }];
    });
  }
  return [];
}

/** Colours as the stylesheets have them where the drawing stands. */
function coloursOf(element: HTMLElement): (name: string) => string {
  const style = getComputedStyle(element);
  const known = new Map<string, string>();
  return (name) => {
    let value = known.get(name);
    if (value === undefined) {
      value = style.getPropertyValue(`--${name}`).trim() || '#000';
      known.set(name, value);
    }
    return value;
  };
}

/** Changes whenever the theme does, so that the drawing takes the new colours. */
function useThemeName(): string {
  const [name, setName] = useState(() => document.documentElement.dataset.theme ?? '');
  useEffect(() => {
    const watch = new MutationObserver(() => setName(document.documentElement.dataset.theme ?? ''));
    watch.observe(document.documentElement, { attributes: true, attributeFilter: ['data-theme'] });
    return () => watch.disconnect();
  }, []);
  return name;
}
