export type GaugeProps = {
  /** What is measured: `share done`. */
  label: string;
  /** 0 to 1. */
  share: number;
  /** Old news: drawn without its colour's strength. */
  stale?: boolean;
};

/** An upright rule with a strut grown to the share; as high as its place, in the projector's unit `--p`. */
export function Gauge({ label, share, stale = false }: GaugeProps) {
  const held = Math.min(Math.max(share, 0), 1);
  const level = `${(1 - held) * 100}%`;
  const ticks = Array.from({ length: 51 }, (_, i) => i);
  return (
    <svg
      className="gauge"
      role="meter"
      aria-label={label}
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuenow={Math.round(held * 100)}
      aria-valuetext={`${Math.round(held * 100)} %`}
      data-stale={stale ? '' : undefined}
    >
      <line x1="27%" x2="27%" y1="0" y2="100%" className="gauge-rule" />
      {ticks.map((i) => (
        <line
          key={i}
          x1="27%"
          x2={i % 5 === 0 ? '127%' : '64%'}
          y1={`${i * 2}%`}
          y2={`${i * 2}%`}
          className={i % 5 === 0 ? 'gauge-tick' : 'gauge-rule'}
        />
      ))}
      <line x1="27%" x2="27%" y1={level} y2="100%" className="gauge-strut" />
      <circle cx="27%" cy={level} className="gauge-joint" />
    </svg>
  );
}

export type PlumbLineProps = {
  /** From the wanted piece straight down to its code; units of the drawing it is part of. */
  x: number;
  from: number;
  to: number;
  code: string;
  /** Height of the code's letters. */
  fontSize: number;
  /** Where the code stands, when it had to be pushed aside. */
  codeX?: number;
};

/** A plumb line inside an SVG drawing. */
export function PlumbLine({ x, from, to, code, fontSize, codeX = x }: PlumbLineProps) {
  return (
    <g className="plumb">
      <path d={`M${x} ${from}V${to}`} strokeWidth={fontSize / 24} />
      <circle cx={x} cy={from} r={fontSize / 7} />
      <text x={codeX} y={to + fontSize * 0.95} fontSize={fontSize} textAnchor="middle">
        {code}
      </text>
    </g>
  );
}
