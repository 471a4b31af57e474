import { Figures } from '../../components/ui/figures';
import { useWidth } from '../../components/ui/use-width';

const HEIGHT = 34;
const LINE = 11;
/** Joint and limit need room at the ends. */
const EDGE = 6;

/** How many people are in, on a rule up to the posted limit; what is over it in madder. */
export function HeadCount({ count, limit }: { count: number; limit: number }) {
  const [ref, width] = useWidth<HTMLDivElement>(300);
  const most = Math.max(limit * 1.08, count, 1);
  const x = (people: number) => EDGE + (people / most) * (width - 2 * EDGE);
  const over = count > limit;
  const every = [5, 10, 20, 50, 100].find((step) => (limit / step) * 12 < width) ?? 200;
  return (
    <div ref={ref}>
      <p className="head-count">
        <Figures className="head-count-figure">{count}</Figures>
        <span>
          of <Figures>{limit}</Figures> people
        </span>
      </p>
      <svg
        width={width}
        height={HEIGHT}
        viewBox={`0 0 ${width} ${HEIGHT}`}
        role="img"
        aria-label={`${count} of ${limit} people are in`}
      >
        <g stroke="var(--graphite)">
          <path d={`M${x(0)} ${LINE}H${x(limit)}`} />
          {Array.from({ length: Math.floor(limit / every) + 1 }, (_, i) => (
            <path key={i} d={`M${x(i * every)} ${LINE}v${i % 5 === 0 ? 12 : 7}`} />
          ))}
        </g>
        <path d={`M${x(0)} ${LINE}H${x(Math.min(count, limit))}`} stroke="var(--ink)" strokeWidth="4" />
        {over && <path d={`M${x(limit)} ${LINE}H${x(count)}`} stroke="var(--s-held)" strokeWidth="4" />}
        <path d={`M${x(limit)} 1V26`} stroke="var(--ink)" strokeWidth="2" />
        <circle cx={x(0)} cy={LINE} r="4" fill="var(--ink)" />
        <circle cx={x(count)} cy={LINE} r="4" fill={over ? 'var(--s-held)' : 'var(--ink)'} />
      </svg>
    </div>
  );
}
