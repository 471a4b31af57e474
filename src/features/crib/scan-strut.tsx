import { useWidth } from '../../components/ui/use-width';
import { strutParts } from '../../components/ui/strut-geometry';

export type ScanState = 'none' | 'person' | 'both' | 'refused' | 'done';

/** The two scans as one strut: its first half is the person, its second the tool. */
export function ScanStrut({ state }: { state: ScanState }) {
  const [ref, width] = useWidth<HTMLDivElement>(740);
  const [left, right] = [8, width - 8];
  const middle = width / 2;
  const first = state !== 'none';
  const second = state === 'both' || state === 'done';
  const colour = state === 'done' ? 'var(--s-passed)' : 'var(--ink)';
  return (
    <div ref={ref} aria-hidden="true">
      <svg width={width} height="24" viewBox={`0 0 ${width} 24`}>
        <path d={`M${left} 12H${middle}`} stroke={colour} strokeWidth={first ? 4 : 1.5} />
        {state === 'refused' ? (
          strutParts('held', middle, right, 12, 1).map((part) => (
            <path key={part.d} d={part.d} stroke="var(--s-held)" strokeWidth={part.width} />
          ))
        ) : (
          <path d={`M${middle} 12H${right}`} stroke={colour} strokeWidth={second ? 4 : 1.5} />
        )}
        <Joint x={left} filled={first} colour={colour} />
        <Joint x={middle} filled={first} colour={colour} />
        <Joint x={right} filled={second} colour={state === 'refused' ? 'var(--s-held)' : colour} />
      </svg>
    </div>
  );
}

const Joint = ({ x, filled, colour }: { x: number; filled: boolean; colour: string }) => (
  <circle
    cx={x}
    cy="12"
    r={filled ? 5.5 : 4.8}
    fill={filled ? colour : 'var(--ground)'}
    stroke={filled ? undefined : colour}
    strokeWidth="1.5"
  />
);
