import type { ReactNode } from 'react';
import type { ShownState } from '../../../shared/travellers/step';
import { glyphParts, STATE_COLOUR } from './strut-geometry';
import type { StrutPart } from './strut-geometry';

/** Hollow joints are filled with the ground they lie on; a tinted row sets `--joint-ground`. */
const JOINT_GROUND = 'var(--joint-ground, var(--ground))';

/** One part of a mark, in a colour. */
export function Part({ part, colour }: { part: StrutPart; colour: string }) {
  if (part.kind === 'path')
    return (
      <path
        d={part.d}
        stroke={colour}
        strokeWidth={part.width}
        strokeLinecap={part.round ? 'round' : undefined}
        fill="none"
      />
    );
  const fill = part.fill === 'state' ? colour : part.fill === 'ground' ? JOINT_GROUND : 'none';
  return (
    <circle
      cx={part.cx}
      cy={part.cy}
      r={part.r}
      fill={fill}
      stroke={part.width === undefined ? undefined : colour}
      strokeWidth={part.width}
    />
  );
}

export type StateGlyphProps = {
  state: ShownState;
  /** 16 on a desk and a phone, 32 large, 40 on the projector. */
  height?: number;
  /** For drying: the share of its time that has passed, 0 to 1. */
  share?: number;
  colour?: string;
  className?: string;
};

/** The mark of a step's state. It never stands alone: write the word beside it, or use StateWord. */
export function StateGlyph({ state, height = 16, share, colour, className }: StateGlyphProps) {
  const width = height * 2.5;
  const paint = colour ?? STATE_COLOUR[state];
  return (
    <svg
      className={`glyph ${className ?? ''}`}
      data-glyph={state}
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      aria-hidden="true"
    >
      {glyphParts(state, height, share).map((part, i) => (
        <Part key={i} part={part} colour={paint} />
      ))}
    </svg>
  );
}

export type StateWordProps = {
  state: ShownState;
  /** Other words than the state's name, such as `3 to check`. */
  children?: ReactNode;
  height?: number;
  share?: number;
  glyph?: boolean;
};

/** The mark and the word of a state in its colour. */
export function StateWord({ state, children, height, share, glyph = true }: StateWordProps) {
  return (
    <span className="state-word" data-state={state}>
      {glyph && <StateGlyph state={state} height={height} share={share} />}
      <span className="state-word-text">{children ?? state}</span>
    </span>
  );
}

/** Not a step's state: the link to the server is broken, a strut whose middle is missing. */
export function BrokenStrut({ height = 16, colour = 'currentColor' }: { height?: number; colour?: string }) {
  return (
    <svg
      className="glyph"
      data-glyph="broken"
      width={height * 2.5}
      height={height}
      viewBox="0 0 40 16"
      aria-hidden="true"
    >
      <path d="M5 9H13.5M15.5 5l-4 8M26.5 9H33M28.5 5l-4 8" stroke={colour} strokeWidth="2" fill="none" />
      <circle cx="5" cy="9" r="3.7" fill={colour} />
      <circle cx="33" cy="9" r="3.7" fill={colour} />
    </svg>
  );
}

/** A strut offered: somebody is asked something. */
export function AskStrut({ height = 24 }: { height?: number }) {
  return (
    <svg
      className="glyph"
      data-glyph="ask"
      width={(height * 40) / 24}
      height={height}
      viewBox="0 0 40 24"
      aria-hidden="true"
    >
      <path d="M8 19 27 8" stroke="currentColor" strokeWidth="3" fill="none" />
      <circle cx="8" cy="19" r="5" fill="currentColor" />
      <circle
        cx="30"
        cy="6.5"
        r="5.2"
        fill="var(--joint-ground, var(--ground))"
        stroke="currentColor"
        strokeWidth="1.8"
      />
    </svg>
  );
}
