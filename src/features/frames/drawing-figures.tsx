import { useMemo } from 'react';
import type { DrawingSettings } from '../../../shared/contracts/drawing';
import {
  densityOf,
  frameFigures,
  stickKg,
  stickSurface,
  strutLengths,
  type JoinedDrawing,
} from '../../../shared/frames';
import { formatLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { Note } from '../../components/ui/note';
import { counted } from '../../lib/formats';

/** Figures of the whole drawing, and what an organiser should know of how its frames lie on each other. */
export function DrawingFigures({
  joined,
  settings,
  unit,
}: {
  joined: JoinedDrawing;
  settings: DrawingSettings;
  unit: LengthUnit;
}) {
  const figures = useMemo(() => {
    const { frame } = joined;
    const lengths = strutLengths(frame);
    const total = lengths.reduce((sum, length) => sum + length, 0);
    const { strutDiameterMm } = settings;
    return {
      lengths: frameFigures(frame).lengthClasses.length,
      total,
      kg: stickKg(total, strutDiameterMm, densityOf(settings.species)),
      surface: stickSurface(total, strutDiameterMm),
    };
  }, [joined, settings]);
  const { frame, doubled, vanished, missing } = joined;
  const rows: [string, string][] = [
    ['joints', String(frame.joints.length)],
    ['struts', String(frame.struts.length)],
    ['different lengths', String(figures.lengths)],
    ['wood in all', formatLength(figures.total, unit)],
    ['mass of the wood', `${figures.kg.toFixed(1)} kg`],
    ['surface to paint', `${figures.surface.toFixed(2)} m²`],
    ['glued ends', String(2 * frame.struts.length)],
  ];
  return (
    <div className="grid gap-4">
      <dl className="grid grid-cols-[auto_1fr] gap-x-6 gap-y-1">
        {rows.map(([term, value]) => (
          <div key={term} className="contents">
            <dt className="text-pencil">{term}</dt>
            <dd>{value}</dd>
          </div>
        ))}
      </dl>
      {doubled.length > 0 && (
        <Note kind="ask" title={`${counted(doubled.length, 'strut')} lie on another one.`}>
          They are made once. Where two frames share an edge that is right; elsewhere move one of them.
        </Note>
      )}
      {vanished.length > 0 && (
        <Note kind="refused" title={`${counted(vanished.length, 'strut')} vanished.`}>
          They are shorter than the distance at which joints become one. Make that distance smaller.
        </Note>
      )}
      {missing.length > 0 && (
        <Note kind="refused" title={`${counted(missing.length, 'place')} without a frame.`}>
          The frame is not there any more. Take the place out.
        </Note>
      )}
    </div>
  );
}
