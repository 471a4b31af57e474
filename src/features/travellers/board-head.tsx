import { Action } from '../../components/ui/action';
import { Field, SelectField } from '../../components/ui/field';
import { GLYPH_STATES } from '../../components/ui/strut-geometry';
import { StateWord } from '../../components/ui/strut-glyph';
import { SelectionStrut } from '../../components/ui/heads';
import { counted } from '../../lib/formats';
import type { StationRecord } from '../../../shared/contracts/live';
import type { ShownState } from '../../../shared/travellers/step';
import type { BoardRow } from './board-rows';
import { countInState, type BoardFilter } from './filters';

interface FilterProps {
  filter: BoardFilter;
  onChange: (change: Partial<BoardFilter>) => void;
}

/** What needs a lead's eye, counted; each count shows only those. */
const COUNTED: readonly ShownState[] = ['to check', 'rework', 'held'];

/** The counters at the head of the page. */
export function Counters({ rows, filter, onChange }: FilterProps & { rows: readonly BoardRow[] }) {
  return (
    <div className="board-counters" role="group" aria-label="Show only">
      {COUNTED.map((state) => (
        <StateChoice
          key={state}
          state={state}
          words={`${countInState(rows, state)} ${state}`}
          chosen={filter.state === state}
          onChoose={(chosen) => onChange({ state: chosen })}
        />
      ))}
    </div>
  );
}

/** The marks and their words; each also shows only the travellers in that state. */
export function Legend({
  filter,
  onChange,
  shown,
  all,
  reset,
}: FilterProps & { shown: number; all: number; reset: boolean }) {
  return (
    <div className="board-legend">
      <div className="board-legend-states" role="group" aria-label="Marks; choose one to see only those">
        {GLYPH_STATES.map((state) => (
          <StateChoice
            key={state}
            state={state}
            words={state}
            chosen={filter.state === state}
            onChoose={(chosen) => onChange({ state: chosen })}
          />
        ))}
      </div>
      <div className="board-legend-end">
        {reset && <ShowAll filter={filter} onChange={onChange} />}
        <p className="board-legend-count" role="status">
          {shown === all ? counted(all, 'traveller') : `${shown} of ${counted(all, 'traveller')}`}
        </p>
      </div>
    </div>
  );
}

/** The way back from every filter; there only while one is set. */
function ShowAll({ filter, onChange }: FilterProps) {
  if (filter.stationId === null && filter.state === null && filter.piece === '') return null;
  return (
    <Action look="words" onClick={() => onChange({ stationId: null, state: null, piece: '' })}>
      Show all
    </Action>
  );
}

interface StateChoiceProps {
  state: ShownState;
  words: string;
  chosen: boolean;
  onChoose: (state: ShownState | null) => void;
}

function StateChoice({ state, words, chosen, onChoose }: StateChoiceProps) {
  return (
    <button
      type="button"
      className="state-choice"
      aria-pressed={chosen}
      onClick={() => onChoose(chosen ? null : state)}
    >
      <StateWord state={state}>{words}</StateWord>
      {chosen && <SelectionStrut />}
    </button>
  );
}

/** The field for a code; on a narrow page the stations as well. */
export function FilterLine({
  filter,
  onChange,
  stations,
  reset,
}: FilterProps & { stations: readonly StationRecord[] | null; reset: boolean }) {
  return (
    <div className="board-filters">
      <Field
        label="code or name"
        type="search"
        value={filter.piece}
        autoComplete="off"
        spellCheck={false}
        onChange={(event) => onChange({ piece: event.target.value })}
      />
      {stations && (
        <SelectField
          label="station"
          value={filter.stationId ?? ''}
          onChange={(event) => onChange({ stationId: event.target.value || null })}
        >
          <option value="">all stations</option>
          {stations.map((station) => (
            <option key={station.id} value={station.id}>
              {station.name}
            </option>
          ))}
        </SelectField>
      )}
      {reset && <ShowAll filter={filter} onChange={onChange} />}
    </div>
  );
}
