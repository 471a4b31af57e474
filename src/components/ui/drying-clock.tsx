import { minutesBetween } from '../../lib/formats';
import { wavePath } from './strut-geometry';
import { LabelRow, textWidth } from './time-axis';
import { useWidth } from './use-width';

export type DryingClockProps = {
  /** Local times of day, `HH:MM`. */
  since: string;
  now: string;
  until: string;
  /** Before the last time: `dry at`, `handle from`. */
  endWords?: string;
};

const FONT = 16;
const LINE = 18;

/** A clock of a coat: a wave grown along a rule of minutes, dotted to its end. */
export function DryingClock({ since, now, until, endWords = 'dry at' }: DryingClockProps) {
  const [ref, width] = useWidth<HTMLDivElement>(350);
  const whole = Math.max(minutesBetween(since, until), 1);
  const gone = Math.min(minutesBetween(since, now), whole);
  const inner = width - 12;
  const x = (minutes: number): number => 6 + (minutes / whole) * inner;
  const nowX = x(gone);
  const done = gone >= whole;
  const every = [1, 5, 15, 60, 240].find((step) => (inner / whole) * step >= 4) ?? 240;
  const ticks = Array.from({ length: Math.floor(whole / every) + 1 }, (_, i) => i * every);
  const row = new LabelRow(10);
  const last = `${endWords} ${until}`;
  row.take(0, textWidth(since, FONT));
  row.take(width - textWidth(last, FONT), width);
  const half = textWidth(now, FONT) / 2;
  const showNow = row.take(nowX - half, nowX + half);
  return (
    <div ref={ref} className="drying-clock">
      <svg
        width={width}
        height={64}
        viewBox={`0 0 ${width} 64`}
        role="img"
        aria-label={`Drying since ${since}, ${last}, now ${now}`}
      >
        <g stroke="var(--s-drying)" fill="none">
          {nowX - 8 > 12 && <path d={wavePath(6, nowX, LINE, 18, 12)} strokeWidth="2.8" />}
          {!done && (
            <path
              d={`M${nowX + 6} ${LINE}H${x(whole) - 7}`}
              strokeWidth="2"
              strokeDasharray="0.01 6"
              strokeLinecap="round"
            />
          )}
          <circle
            cx={x(whole)}
            cy={LINE}
            r="4.5"
            strokeWidth="1.8"
            fill={done ? 'var(--s-drying)' : 'var(--joint-ground, var(--ground))'}
          />
          <path d={`M${nowX} 4V42`} strokeWidth="2" />
        </g>
        <g stroke="var(--pencil)" strokeWidth="1">
          <path d={`M6 32H${x(whole)}`} />
          {ticks.map((minute, i) => (
            <path key={minute} d={`M${x(minute)} 32v${i % 5 === 0 ? 8 : 5}`} />
          ))}
        </g>
        <g fill="var(--pencil)" fontSize={FONT}>
          <text x={0} y={59}>
            {since}
          </text>
          <text x={width} y={59} textAnchor="end">
            {last}
          </text>
          {showNow && (
            <text x={nowX} y={59} textAnchor="middle" fill="var(--s-drying)" fontWeight="600">
              {now}
            </text>
          )}
        </g>
      </svg>
    </div>
  );
}
