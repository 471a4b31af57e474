import { useId } from 'react';
import { minutesBetween, minutesOf, timeOfDay } from '../../lib/formats';
import { LabelRow, textWidth } from './time-axis';
import { useWidth } from './use-width';

export type DayRulerProps = {
  /** Local times of day, `HH:MM`. */
  doors: string;
  start: string;
  clearUp?: string;
  end: string;
  breaks: readonly { from: string; to: string; label: string }[];
  now?: string;
  forecast?: { from: string; at: string; to: string };
  /** desk is 70 high with words, phone 44 without; left out, it follows the width. */
  size?: 'desk' | 'phone';
};

const LOOKS = {
  desk: { height: 70, line: 28, font: 13.33, hours: 55, ticks: [14, 8, 4], now: [15, 45], nowText: 59 },
  phone: { height: 44, line: 14, font: 16, hours: 41, ticks: [11, 6, 0], now: [4, 26], nowText: 41 },
} as const;

/** The build day as a ruler: doors, breaks hatched, now as a plumb line, the forecast as a bracket. */
export function DayRuler(props: DayRulerProps) {
  const [ref, width] = useWidth<HTMLDivElement>(props.size === 'phone' ? 350 : 1200);
  const size = props.size ?? (width < 640 ? 'phone' : 'desk');
  return (
    <div ref={ref} className="day-ruler" style={{ height: LOOKS[size].height }}>
      <RulerDrawing {...props} size={size} width={width} />
    </div>
  );
}

function rulerWords({ doors, start, end, breaks, now, clearUp, forecast }: DayRulerProps): string {
  return [
    `The day: doors ${doors}, start ${start}`,
    ...breaks.map(({ label, from, to }) => `${label} ${from} to ${to}`),
    ...(clearUp ? [`clear-up ${clearUp}`] : []),
    `end ${end}`,
    ...(now ? [`now ${now}`] : []),
    ...(forecast ? [`finish about ${forecast.at}, between ${forecast.from} and ${forecast.to}`] : []),
  ].join(', ');
}

type DrawingProps = DayRulerProps & { size: 'desk' | 'phone'; width: number };

function RulerDrawing(props: DrawingProps) {
  const { doors, end, breaks, now, forecast, size, width } = props;
  const hatch = useId();
  const look = LOOKS[size];
  const y = look.line;
  const span = Math.max(minutesBetween(doors, end), 1);
  const first = minutesOf(doors);
  const inner = Math.max(width - 10, 10);
  // Half a joint of room at either end.
  const xOf = (minutes: number): number => 5 + (Math.min(Math.max(minutes, 0), span) / span) * inner;
  const at = (time: string): number => {
    const after = minutesBetween(doors, time);
    // A time shortly before the doors is no time late at night.
    return xOf(after > span && after > 18 * 60 ? 0 : after);
  };
  const perMinute = inner / span;
  const ticks: { x: number; length: number }[] = [];
  for (let minute = Math.ceil(first / 5) * 5; minute <= first + span; minute += 5) {
    const length = minute % 60 === 0 ? look.ticks[0] : minute % 15 === 0 ? look.ticks[1] : look.ticks[2];
    const fits = minute % 60 === 0 || perMinute * (minute % 15 === 0 ? 15 : 5) >= 3.5;
    if (length > 0 && fits) ticks.push({ x: xOf(minute - first), length });
  }
  const nowX = now === undefined ? null : at(now);
  return (
    <svg
      className="ruler"
      data-size={size}
      width={width}
      height={look.height}
      viewBox={`0 0 ${width} ${look.height}`}
      role="img"
      aria-label={rulerWords(props)}
    >
      <defs>
        <pattern id={hatch} width="4" height="8" patternUnits="userSpaceOnUse" patternTransform="skewX(-30)">
          <path d="M1 0V8" stroke="var(--pencil)" strokeWidth="1" />
        </pattern>
      </defs>
      {breaks.map(({ from, to, label }) => (
        <rect
          key={`${from} ${label}`}
          x={at(from)}
          y={y - 8}
          width={Math.max(at(to) - at(from), 2)}
          height={8}
          fill={`url(#${hatch})`}
          stroke="var(--pencil)"
          strokeWidth="0.75"
        />
      ))}
      {ticks.map(({ x, length }) => (
        <line
          key={x}
          x1={x}
          x2={x}
          y1={y}
          y2={y + length}
          stroke={length === look.ticks[2] ? 'var(--graphite)' : 'var(--pencil)'}
          strokeWidth="1"
        />
      ))}
      <line x1={5} x2={5 + inner} y1={y} y2={y} stroke="var(--pencil)" strokeWidth="1" />
      {size === 'desk' && <Flags {...props} at={at} y={y} />}
      <Hours {...props} xOf={xOf} nowX={nowX} first={first} span={span} />
      {forecast && <Forecast forecast={forecast} size={size} at={at} width={width} />}
      {nowX !== null && (
        <g stroke="var(--ink)">
          <line x1={5} x2={nowX} y1={y} y2={y} strokeWidth="4" />
          <line x1={nowX} x2={nowX} y1={look.now[0]} y2={look.now[1]} strokeWidth="2" />
          <circle cx={nowX} cy={y} r="4.5" fill="var(--ink)" stroke="none" />
        </g>
      )}
    </svg>
  );
}

/** The words over the line: doors, start, clear-up and end at small flags, breaks over their hatching. */
function Flags(props: DrawingProps & { at: (time: string) => number; y: number }) {
  const { at, y } = props;
  const row = new LabelRow(4);
  const flags = [
    { word: 'doors', x: at(props.doors), side: 1 },
    { word: 'end', x: at(props.end), side: -1 },
    { word: 'start', x: at(props.start), side: 1 },
    ...(props.clearUp ? [{ word: 'clear-up', x: at(props.clearUp), side: 1 }] : []),
  ];
  return (
    <g fill="var(--pencil)" stroke="var(--pencil)">
      {flags.map(({ word, x, side }) => {
        const w = textWidth(word, 13.33);
        const fits = row.take(side > 0 ? x : x - w - 5, side > 0 ? x + w + 5 : x);
        return (
          <g key={word}>
            <line x1={x} x2={x} y1={fits ? 12 : y - 8} y2={y} strokeWidth="1" />
            {fits && (
              <text x={x + side * 5} y={22} textAnchor={side > 0 ? 'start' : 'end'} stroke="none">
                {word}
              </text>
            )}
          </g>
        );
      })}
      {props.breaks.map(({ from, to, label }) => {
        const x = (at(from) + at(to)) / 2;
        const half = textWidth(label, 13.33) / 2;
        return row.take(x - half, x + half) ? (
          <text key={`${from} ${label}`} x={x} y={16} textAnchor="middle" stroke="none">
            {label}
          </text>
        ) : null;
      })}
    </g>
  );
}

type HoursProps = DrawingProps & {
  xOf: (minutes: number) => number;
  nowX: number | null;
  first: number;
  span: number;
};

/** The words under the line: now first, then doors, then as many hours as have room. */
function Hours({ now, nowX, size, width, xOf, first, span }: HoursProps) {
  const look = LOOKS[size];
  const row = new LabelRow(size === 'desk' ? 8 : 14);
  const place = (x: number, text: string, font: number) => {
    const half = textWidth(text, font) / 2;
    const middle = Math.min(Math.max(x, half), width - half);
    return { middle, free: row.take(middle - half, middle + half) };
  };
  const nowWords = size === 'desk' ? `now ${now}` : `${now}`;
  const nowPlace = nowX === null ? null : place(nowX, nowWords, 17);
  const hours = [first];
  for (let minute = Math.ceil((first + 1) / 60) * 60; minute <= first + span; minute += 60)
    hours.push(minute);
  return (
    <g fill="var(--pencil)" textAnchor="middle">
      {hours.map((minute) => {
        const { middle, free } = place(xOf(minute - first), '00:00', look.font);
        const atDoors = minute === first;
        return free ? (
          <text
            key={minute}
            x={atDoors ? 5 : middle}
            textAnchor={atDoors ? 'start' : undefined}
            y={look.hours}
          >
            {timeOfDay(minute)}
          </text>
        ) : null;
      })}
      {nowPlace && (
        <text className="ruler-now" x={nowPlace.middle} y={look.nowText} fill="var(--ink)">
          {nowWords}
        </text>
      )}
    </g>
  );
}

type ForecastProps = Pick<DrawingProps, 'size' | 'width'> & {
  forecast: NonNullable<DayRulerProps['forecast']>;
  at: (time: string) => number;
};

/** When it will be finished, as a bracket: from the earliest to the latest, a joint at the likely time. */
function Forecast({ forecast, size, width, at }: ForecastProps) {
  const [from, middle, to] = [at(forecast.from), at(forecast.at), at(forecast.to)];
  const desk = size === 'desk';
  const y = desk ? 64 : 6;
  const words = `finish ${forecast.at}, between ${forecast.from} and ${forecast.to}`;
  const w = textWidth(words, 14);
  const left = from - 10 - w > 0;
  return (
    <g stroke="var(--s-passed)">
      <path d={`M${from} ${y}H${to}M${from} ${y - 5}v10M${to} ${y - 5}v10`} strokeWidth="1.5" fill="none" />
      <circle cx={middle} cy={y} r={desk ? 4.5 : 4} fill="var(--s-passed)" stroke="none" />
      {desk && (left || to + 10 + w < width) && (
        <text
          className="ruler-forecast"
          x={left ? from - 8 : to + 8}
          y={y + 4.5}
          textAnchor={left ? 'end' : 'start'}
          fill="var(--s-passed)"
          stroke="none"
        >
          {words}
        </text>
      )}
    </g>
  );
}
