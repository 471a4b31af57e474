import { memo, useMemo } from 'react';
import { Link } from 'react-router-dom';
import type { ShownState } from '../../../shared/travellers/step';
import { shownState } from '../../../shared/travellers/step';
import { MarkedStick } from '../../components/ui/marked-stick';
import { StateWord } from '../../components/ui/strut-glyph';
import { counted } from '../../lib/formats';
import type { BoardRow } from './board-rows';

export interface BoardRowViewProps {
  row: BoardRow;
  /** `d` of the piece's sketch, 50 x 30. */
  sketch: string;
  /** Length of a step, px. */
  pitch: number;
  /** Its steps are not those of the columns above it. */
  own: boolean;
  head: string;
  detail: string;
  crew: string;
  /** Share of the drying time that has passed, in twentieths, so that a row is not drawn anew each second. */
  dried: number;
  note: string | null;
  noteState: ShownState | null;
  open: boolean;
  /** Query of the address that opens it. */
  to: string;
  /** First of new letters: a stronger line above. */
  first: boolean;
}

/** One traveller. Drawn anew only when something of it changed: its props are plain values and a stable row. */
export const BoardRowView = memo(function BoardRowView(props: BoardRowViewProps) {
  const { row, sketch, pitch, own, head, detail, crew, dried, note, open, to, first } = props;
  const { piece, steps, state } = row;
  const lengths = useMemo(
    () =>
      steps.map((step) => ({
        name: step.name,
        state: shownState(step),
        ...(step.state === 'drying' ? { share: dried / 20 } : {}),
      })),
    [steps, dried],
  );
  const names = steps.map((step) => step.name).join(', ');
  return (
    <div
      role="row"
      id={`traveller-${piece.code}`}
      className={`board-row ${note !== null || open ? 'on-tint' : ''}`}
      data-open={open ? '' : undefined}
      data-note={note === null ? undefined : ''}
      data-first={first ? '' : undefined}
      data-state={props.noteState ?? undefined}
    >
      <div role="rowheader" className="board-code">
        <Link to={to} className="board-link" aria-current={open ? 'true' : undefined} preventScrollReset>
          {piece.code}
        </Link>
      </div>
      <div role="cell" className="board-piece">
        <svg className="board-sketch" width="50" height="30" viewBox="0 0 50 30" aria-hidden="true">
          <path d={sketch} />
        </svg>
        <span className="board-name">
          {piece.name}
          {own && <span className="board-own">{counted(steps.length, 'step')} of its own</span>}
        </span>
      </div>
      <div role="cell" className="board-chain" title={own ? names : undefined}>
        <MarkedStick code={piece.code} steps={lengths} pitch={pitch} pad={8} />
      </div>
      <div role="cell" className="board-now">
        <span className="board-words" title={detail ? `${head}, ${detail}` : undefined}>
          <StateWord state={state} glyph={false}>
            <strong>{head}</strong>
          </StateWord>
          {detail && `, ${detail}`}
        </span>
        {note !== null && <span className="board-note">{note}</span>}
      </div>
      <div role="cell" className="board-crew">
        {crew}
      </div>
    </div>
  );
});
