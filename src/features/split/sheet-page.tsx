import { useMemo } from 'react';
import type { PieceSheet } from '../../../shared/contracts/split';
import { formatLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { moveText, strutNames } from '../../../shared/split/pieces/move-text';
import { Action } from '../../components/ui/action';
import { DimensionHead } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { UnrolledDrawing } from '../../components/ui/unrolled-drawing';
import { listed } from '../../lib/formats';
import { PieceMark } from './piece-mark';
import { useSheet } from './queries';

/** One piece on paper: its drawing, its struts, the moves that make it, and where it meets others. */
export function SheetPage({
  installationId,
  subAssemblyId,
  unit,
}: {
  installationId: string;
  subAssemblyId: string;
  unit: LengthUnit;
}) {
  const sheet = useSheet(installationId, subAssemblyId);
  if (sheet.error) return <Refusal error={sheet.error} />;
  if (!sheet.data) return <Pending />;
  return <Sheet sheet={sheet.data} unit={unit} />;
}

const MOST_NAMED = 4;
const alikeWords = (codes: readonly string[]): string =>
  codes.length <= MOST_NAMED
    ? listed(codes)
    : `${codes.slice(0, MOST_NAMED - 1).join(', ')} and ${codes.length - MOST_NAMED + 1} more`;

function Sheet({ sheet, unit }: { sheet: PieceSheet; unit: LengthUnit }) {
  const names = useMemo(() => strutNames(sheet.frame), [sheet.frame]);
  return (
    <div className="piece-sheet grid gap-8">
      <div className="flex flex-wrap items-baseline justify-between gap-x-8 gap-y-2">
        <p>
          {sheet.mark && <PieceMark mark={sheet.mark} />}
          {`${sheet.mark ? ' in the drawing. T' : 'T'}raveller revision ${sheet.travellerRevision}`}
          {sheet.hand && `, ${sheet.hand} hand`}
          {sheet.massKg !== null && `, ${sheet.massKg.toFixed(1)} kg of wood`}
          {sheet.alike.length > 0 && `, the same drawing as ${alikeWords(sheet.alike)}`}
        </p>
        <span className="no-print">
          <Action onClick={() => window.print()}>Print this sheet</Action>
        </span>
      </div>
      <UnrolledDrawing
        frame={sheet.frame}
        unit={unit}
        numbers={sheet.frame.struts.length <= 60 ? 'both' : 'joints'}
        label={`${sheet.code}, ${sheet.name}`}
      />
      <section className="grid gap-3" aria-labelledby="struts">
        <DimensionHead id="struts" right={String(sheet.frame.struts.length)}>
          Struts
        </DimensionHead>
        <ul className="sheet-struts">
          {sheet.frame.struts.map(([a, b], strut) => (
            <li key={strut}>
              <strong>{strut + 1}</strong>
              {` ${names.labels[strut] ?? ''} ${formatLength(names.lengthsMm[strut] ?? 0, unit)}, joints ${a + 1} to ${b + 1}`}
            </li>
          ))}
        </ul>
      </section>
      <section className="grid gap-3" aria-labelledby="moves">
        <DimensionHead id="moves" right={String(sheet.moves.length)}>
          Moves
        </DimensionHead>
        {sheet.moves.length === 0 ? (
          <Note kind="ask" title="No moves are listed for this piece.">
            It was made from a frame, not from a split.
          </Note>
        ) : (
          <ol className="sheet-moves">
            {sheet.moves.map((move) => (
              <li key={move.number}>{moveText(move, names, unit)}</li>
            ))}
          </ol>
        )}
      </section>
      {sheet.meetings.length > 0 && (
        <section className="grid gap-3" aria-labelledby="meets">
          <DimensionHead id="meets" right={String(sheet.meetings.length)}>
            Where it meets others
          </DimensionHead>
          <p>Write this on tape at the joint, before the piece leaves the bench.</p>
          <ul className="sheet-struts">
            {sheet.meetings.map((meeting) => (
              <li key={meeting.joint}>
                <strong>{`joint ${meeting.joint + 1}`}</strong>
                {` ${meeting.tape}`}
              </li>
            ))}
          </ul>
        </section>
      )}
      <p className="text-small text-pencil">
        Hot glue burns. Work by the hot-glue briefing; local codes and competent people come first.
      </p>
    </div>
  );
}
