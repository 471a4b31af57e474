import type { ReactNode } from 'react';
import { minutesBetween, minutesOf, timeOfDay } from '../../lib/formats';

export type DayWindow = {
  /** First and last local time of day on the line, `HH:MM`. */
  opens: string;
  closes: string;
};

/** The place of a time on the line, in per cent of its width. */
function placeOf({ opens, closes }: DayWindow): (time: string) => number {
  const whole = Math.max(minutesBetween(opens, closes), 1);
  return (time) => {
    // A night's line goes on past midnight.
    return (Math.min(minutesBetween(opens, time), whole) / whole) * 100;
  };
}

export type ToolOutLineProps = DayWindow & {
  out: string;
  backBy: string;
  now: string;
  /** What it says, where the times on the line are not the whole of it. */
  words?: string;
};

/** A tool that is out: thick till now, thin to its back-by; the late part thick in madder. */
export function ToolOutLine({ out, backBy, now, words, ...window }: ToolOutLineProps) {
  const at = placeOf(window);
  const pct = (time: string): string => `${at(time)}%`;
  const late = at(now) > at(backBy);
  const said = late
    ? `out since ${out}, should be back by ${backBy}, late`
    : `out since ${out}, back by ${backBy}`;
  return (
    <svg className="tool-out" width="100%" height="16" role="img" aria-label={words ?? said}>
      <line className="tool-out-now" x1={pct(now)} x2={pct(now)} y1="-14" y2="30" stroke="var(--pencil)" />
      {late ? (
        <>
          <line x1={pct(out)} x2={pct(backBy)} y1="8" y2="8" stroke="var(--ink)" strokeWidth="1.5" />
          <line x1={pct(backBy)} x2={pct(now)} y1="8" y2="8" stroke="var(--s-held)" strokeWidth="4" />
          <line x1={pct(backBy)} x2={pct(backBy)} y1="1" y2="15" stroke="var(--s-held)" strokeWidth="2" />
          <circle cx={pct(out)} cy="8" r="3.7" fill="var(--ink)" />
        </>
      ) : (
        <>
          <line x1={pct(now)} x2={pct(backBy)} y1="8" y2="8" stroke="var(--s-hand)" strokeWidth="1.25" />
          <line x1={pct(out)} x2={pct(now)} y1="8" y2="8" stroke="var(--s-hand)" strokeWidth="4" />
          <circle cx={pct(out)} cy="8" r="3.7" fill="var(--s-hand)" />
          <circle
            cx={pct(backBy)}
            cy="8"
            r="3.1"
            fill="var(--joint-ground, var(--ground))"
            stroke="var(--s-hand)"
            strokeWidth="1.5"
          />
        </>
      )}
    </svg>
  );
}

/** Words at the ends of the rule stay over it. */
const anchorAt = (place: number): 'start' | 'middle' | 'end' =>
  place < 8 ? 'start' : place > 92 ? 'end' : 'middle';

/** The rule over a column of tool lines: a tick each half hour, a word each second hour. */
export function TimeScale(window: DayWindow) {
  const at = placeOf(window);
  const first = Math.ceil(minutesOf(window.opens) / 30) * 30;
  const count = Math.floor(minutesBetween(window.opens, window.closes) / 30) + 1;
  const ticks = Array.from({ length: count }, (_, i) => first + i * 30);
  return (
    <svg className="time-scale" width="100%" height="32" aria-hidden="true">
      {ticks.map((minute) => {
        const x = `${at(timeOfDay(minute))}%`;
        return (
          <line
            key={minute}
            x1={x}
            x2={x}
            y1={minute % 60 === 0 ? 22 : 27}
            y2="32"
            stroke={minute % 60 === 0 ? 'var(--pencil)' : 'var(--graphite)'}
          />
        );
      })}
      {ticks
        .filter((minute) => minute % 120 === 0 && at(timeOfDay(minute)) <= 100)
        .map((minute) => (
          <text
            key={minute}
            x={`${at(timeOfDay(minute))}%`}
            y="16"
            textAnchor={anchorAt(at(timeOfDay(minute)))}
            fill="var(--pencil)"
          >
            {timeOfDay(minute)}
          </text>
        ))}
    </svg>
  );
}

export type OutOfUseTagProps = {
  /** Number and name of the tool: `G-07 hot-glue gun`. */
  tool: string;
  reason: string;
  /** Who tagged it and when, and who may clear it. */
  detail: string;
  /** The word of the tag. */
  word?: string;
  actions?: ReactNode;
};

/** A paper tag on a string: this tool is not to be used. */
export function OutOfUseTag({ tool, reason, detail, word = 'out of use', actions }: OutOfUseTagProps) {
  return (
    <div className="tag">
      <svg className="tag-string" width="46" height="34" viewBox="0 0 46 34" aria-hidden="true">
        <path
          d="M0 1C6 1 4 24 20 26 32 27 34 18 44 21"
          stroke="var(--s-held)"
          strokeWidth="1.5"
          fill="none"
        />
      </svg>
      <svg className="tag-corner" width="13" height="18" viewBox="0 0 13 18" aria-hidden="true">
        <path d="M0.5 18V17L12.5 0.5H13" stroke="var(--pencil)" fill="none" />
      </svg>
      <svg
        className="tag-corner tag-corner-foot"
        width="13"
        height="18"
        viewBox="0 0 13 18"
        aria-hidden="true"
      >
        <path d="M0.5 0V1L12.5 17.5H13" stroke="var(--pencil)" fill="none" />
      </svg>
      <span className="tag-hole" aria-hidden="true" />
      <div className="tag-head">
        <strong className="tag-tool">{tool}</strong>
        <strong className="tag-word">{word}</strong>
      </div>
      <p>{reason}</p>
      <p className="text-pencil">{detail}</p>
      {actions}
    </div>
  );
}
