import { flatDrawing, wireframeThumbnail } from '../../../shared/frames/flat-drawing';
import { buildShape } from '../../../shared/frames/shapes';
import { DimensionHead } from '../../components/ui/heads';
import { DayRuler } from '../../components/ui/day-ruler';
import { DryingClock } from '../../components/ui/drying-clock';
import { Figures } from '../../components/ui/figures';
import { MarkedStick } from '../../components/ui/marked-stick';
import type { StickStep } from '../../components/ui/marked-stick';
import { DrawnFrame, UnrolledDrawing, WireSketch } from '../../components/ui/unrolled-drawing';
import { AskStrut, BrokenStrut, StateGlyph, StateWord } from '../../components/ui/strut-glyph';
import { GLYPH_STATES } from '../../components/ui/strut-geometry';
import { BeeMark } from '../../components/ui/bee-mark';

const NAMES = ['cut', 'lay out', 'tack', 'raise', 'glue out', 'clean', 'coat', 'hang'];
const SHORT = {
  '.': 'waiting',
  '-': 'ready',
  h: 'in hand',
  d: 'drying',
  c: 'to check',
  p: 'passed',
  r: 'rework',
  x: 'held',
} as const;
const stick = (states: string): StickStep[] =>
  Array.from(states, (mark, i) => ({ name: NAMES[i] ?? '', state: SHORT[mark as keyof typeof SHORT] }));

const STICKS = [
  ['V-02', 'pppppppp'],
  ['V-04', 'ppppppc.'],
  ['V-05', 'ppppppd.'],
  ['V-08', 'ppppp-..'],
  ['V-10', 'pppr....'],
  ['V-12', 'ppx.....'],
  ['V-13', 'ph......'],
  ['V-14', '-.......'],
] as const;

const shape = buildShape({
  kind: 'vault-bay',
  lengthMm: 1000,
  widthMm: 2841,
  riseMm: 0,
  divisionsAlong: 2,
  divisionsAcross: 4,
  diagonals: 'staggered',
});

/** Marks, sticks, rulers and drawings. */
export function KitMarks({ theme }: { theme: string }) {
  return (
    <>
      <DimensionHead right="unit u = height / 16, strut on y = 9 u">{`Strut glyphs, ${theme}`}</DimensionHead>
      <div className="grid gap-4">
        <p className="flex flex-wrap items-center gap-6">
          <BeeMark /> <BeeMark height={38} /> <BrokenStrut /> <BrokenStrut height={40} /> <AskStrut />
        </p>
        {[16, 32, 40].map((height) => (
          <p key={height} className="flex flex-wrap items-center gap-6">
            {GLYPH_STATES.map((state) => (
              <StateGlyph key={state} state={state} height={height} />
            ))}
          </p>
        ))}
        <p className="flex flex-wrap gap-6">
          {GLYPH_STATES.map((state) => (
            <StateWord key={state} state={state} />
          ))}
        </p>
        <p className="on-tint flex flex-wrap gap-6 p-2">
          {GLYPH_STATES.map((state) => (
            <StateWord key={state} state={state} />
          ))}
        </p>
      </div>
      <ul>
        {STICKS.map(([code, states]) => (
          <li key={code} className="flex flex-wrap items-center border-b border-rule">
            <strong className="w-14">{code}</strong>
            <span className="hidden desk:inline">
              <MarkedStick code={code} steps={stick(states)} />
            </span>
            <span className="desk:hidden">
              <MarkedStick code={code} steps={stick(states)} pitch={24} />
            </span>
          </li>
        ))}
      </ul>
      <DimensionHead right="desk, then phone">Day ruler</DimensionHead>
      <DayRuler
        doors="09:00"
        start="09:30"
        clearUp="17:30"
        end="18:30"
        breaks={[
          { from: '11:00', to: '11:15', label: 'break' },
          { from: '12:30', to: '13:15', label: 'lunch' },
          { from: '15:00', to: '15:15', label: 'break' },
        ]}
        now="14:07"
        forecast={{ from: '16:50', at: '17:20', to: '17:55' }}
      />
      <div style={{ maxWidth: 350 }} className="grid gap-6">
        <DayRuler
          size="phone"
          doors="09:00"
          start="09:30"
          end="18:30"
          breaks={[{ from: '12:30', to: '13:15', label: 'lunch' }]}
          now="14:07"
          forecast={{ from: '16:50', at: '17:20', to: '17:55' }}
        />
        <DryingClock since="13:35" now="14:07" until="14:35" />
        <DryingClock since="13:35" now="14:40" until="14:35" />
        <p className="text-t3">
          <Figures>11:11</Figures> <Figures>11:41</Figures>
          <br />
          <Figures>20:04</Figures> <Figures>20:44</Figures>
        </p>
      </div>
      <DimensionHead>Drawings</DimensionHead>
      <div className="grid gap-6 desk:grid-cols-2">
        <UnrolledDrawing frame={shape} unit="mm" label="V-09, South bay 2" glued={new Set([1, 2, 3, 7, 8])} />
        <DrawnFrame
          drawing={flatDrawing(shape, { width: 272, height: 240, labelPx: 16 })}
          unit="inch"
          label="V-09 in inches"
          numbers="both"
        />
        <WireSketch path={wireframeThumbnail(shape, 60, 34)} width={60} height={34} />
      </div>
    </>
  );
}
