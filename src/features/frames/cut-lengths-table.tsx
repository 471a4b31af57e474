import { useMemo } from 'react';
import type { DrawingSettings } from '../../../shared/contracts/drawing';
import { cutLengths, lengthClasses, type Frame } from '../../../shared/frames';
import { formatLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { DimensionHead } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';
import { counted } from '../../lib/formats';

const MOST_ROWS = 30;
const MOST_WARNINGS = 6;

/** Every length to cut, both ways, with what to look at before the saw starts. */
export function CutLengthsTable({
  frame,
  settings,
  unit,
}: {
  frame: Frame;
  settings: DrawingSettings;
  unit: LengthUnit;
}) {
  const { classes, warnings } = useMemo(() => {
    const cut = cutLengths(frame, settings.strutDiameterMm);
    const used = cut.struts.map((strut) => (settings.cutAs === 'centre' ? strut.centreMm : strut.setBackMm));
    return {
      classes: lengthClasses(used, settings.cutWithinMm).map(({ name, lengthMm, struts }) => ({
        name,
        lengthMm,
        count: struts.length,
        other: meanOf(
          struts.map((strut) => {
            const one = cut.struts[strut];
            return (settings.cutAs === 'centre' ? one?.setBackMm : one?.centreMm) ?? 0;
          }),
        ),
      })),
      warnings: cut.warnings,
    };
  }, [frame, settings]);
  const exact = (mm: number): string => (unit === 'mm' ? `${mm.toFixed(1)} mm` : formatLength(mm, unit));
  const back = settings.cutAs === 'set back';
  return (
    <section className="grid gap-3" aria-labelledby="cut-lengths">
      <DimensionHead id="cut-lengths" right={`${counted(classes.length, 'length')} to set up`}>
        Lengths to cut
      </DimensionHead>
      <p className="max-w-words">
        {back
          ? 'Cut set back, so that the struts clear each other at the joints.'
          : 'Cut from centre to centre of the joints.'}{' '}
        The other way is shown beside it. Make a test piece first.
      </p>
      <div className="relative overflow-x-auto" role="region" aria-label="Lengths to cut" tabIndex={0}>
        <table className="split-pieces">
          <thead>
            <tr>
              <th scope="col">length</th>
              <th scope="col">{back ? 'set back (used)' : 'centre to centre (used)'}</th>
              <th scope="col">{back ? 'centre to centre' : 'set back, on average'}</th>
              <th scope="col">struts</th>
            </tr>
          </thead>
          <tbody>
            {classes.slice(0, MOST_ROWS).map((row) => (
              <tr key={row.name}>
                <th scope="row">{row.name}</th>
                <td>{exact(row.lengthMm)}</td>
                <td>{exact(row.other)}</td>
                <td>{row.count}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {classes.length > MOST_ROWS && <p>and {classes.length - MOST_ROWS} more lengths</p>}
      {warnings.length > 0 && (
        <Note
          kind="ask"
          announce={false}
          title={`${counted(warnings.length, 'thing')} to look at before the saw starts.`}
        >
          <ul className="grid gap-1">
            {warnings.slice(0, MOST_WARNINGS).map(({ message }) => (
              <li key={message}>{message}</li>
            ))}
          </ul>
          {warnings.length > MOST_WARNINGS && <p>{`and ${warnings.length - MOST_WARNINGS} more.`}</p>}
        </Note>
      )}
    </section>
  );
}

const meanOf = (values: readonly number[]): number =>
  values.reduce((sum, value) => sum + value, 0) / Math.max(1, values.length);
