import { useMemo } from 'react';
import { frameFigures, type Frame } from '../../../shared/frames';
import { formatLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { Figures } from '../../components/ui/figures';
import { DimensionHead } from '../../components/ui/heads';
import { Sheet } from '../../components/ui/sheet';

const MOST_ROWS = 12;

/** Strut numbers as people say them: 1 to 4, 7, 9. */
function ranges(indexes: readonly number[]): string {
  const parts: string[] = [];
  let from = 0;
  for (let i = 0; i < indexes.length; i++) {
    const next = indexes[i + 1];
    if (next !== undefined && next === (indexes[i] ?? 0) + 1) continue;
    const [first, last] = [(indexes[from] ?? 0) + 1, (indexes[i] ?? 0) + 1];
    parts.push(
      first === last ? `${first}` : last === first + 1 ? `${first}, ${last}` : `${first} to ${last}`,
    );
    from = i + 1;
  }
  const shown = parts.slice(0, 8);
  return parts.length > 8 ? `${shown.join(', ')} and more` : shown.join(', ');
}

/** Counts, lengths to cut and angles of a frame. */
export function FrameFigures({ frame, unit }: { frame: Frame; unit: LengthUnit }) {
  const figures = useMemo(() => frameFigures(frame), [frame]);
  const exact = (mm: number): string => (unit === 'mm' ? `${mm.toFixed(1)} mm` : formatLength(mm, unit));
  const box = [figures.boxMm.x, figures.boxMm.y, figures.boxMm.z]
    .map((mm) => formatLength(mm, unit))
    .join(' x ');
  const rows: [string, string][] = [
    ['joints', String(figures.joints)],
    ['struts', String(figures.struts)],
    ['faces', String(figures.faces)],
    ['ends to glue', String(figures.glueEnds)],
    ['stock in all', formatLength(figures.totalStrutMm, unit)],
    ['mean strut', exact(figures.meanStrutMm)],
  ];
  const lengths = figures.lengthClasses.slice(0, MOST_ROWS);
  const angles = figures.dihedrals.slice(0, MOST_ROWS);
  return (
    <div className="grid items-start gap-x-10 gap-y-6 sm:grid-cols-2 wide:grid-cols-3">
      <section className="grid gap-2" aria-label="Counts">
        <DimensionHead as="h3">Figures</DimensionHead>
        <dl className="grid grid-cols-[1fr_auto] gap-x-4 gap-y-1">
          {rows.map(([word, figure]) => (
            <div key={word} className="contents">
              <dt className="text-small">{word}</dt>
              <dd className="text-right font-medium">
                <Figures>{figure}</Figures>
              </dd>
            </div>
          ))}
        </dl>
        <p className="text-small text-pencil">Fits into {box}, joint to joint.</p>
      </section>
      <section className="grid gap-2" aria-label="Lengths">
        <DimensionHead as="h3" right={`${figures.lengthClasses.length} to set up`}>
          Lengths
        </DimensionHead>
        <Sheet caption="Lengths to cut">
          <thead>
            <tr>
              <th scope="col">length</th>
              <th scope="col" className="amount">
                how many
              </th>
              <th scope="col">struts</th>
            </tr>
          </thead>
          <tbody>
            {lengths.map(({ lengthMm, count, struts }) => (
              <tr key={struts[0]}>
                <th scope="row">
                  <Figures>{exact(lengthMm)}</Figures>
                </th>
                <td className="amount" data-label="how many">
                  <Figures>{count}</Figures>
                </td>
                <td data-label="struts">{ranges(struts)}</td>
              </tr>
            ))}
          </tbody>
        </Sheet>
        {figures.lengthClasses.length > MOST_ROWS && (
          <p className="text-small">and {figures.lengthClasses.length - MOST_ROWS} more lengths</p>
        )}
      </section>
      {angles.length > 0 && (
        <section className="grid gap-2" aria-label="Angles">
          <DimensionHead as="h3">Angles between faces</DimensionHead>
          <dl className="grid grid-cols-[1fr_auto] gap-x-4 gap-y-1">
            {angles.map(({ degrees, count }) => (
              <div key={degrees} className="contents">
                <dt className="font-medium">
                  <Figures>{`${degrees.toFixed(1)}°`}</Figures>
                </dt>
                <dd className="text-small">along {count === 1 ? '1 strut' : `${count} struts`}</dd>
              </div>
            ))}
          </dl>
          {figures.dihedrals.length > MOST_ROWS && (
            <p className="text-small">and {figures.dihedrals.length - MOST_ROWS} more angles</p>
          )}
        </section>
      )}
    </div>
  );
}
