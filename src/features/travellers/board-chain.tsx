import { SelectionStrut } from '../../components/ui/heads';
import { Figures } from '../../components/ui/figures';
import { textWidth } from '../../components/ui/time-axis';
import { countInSpan, stationsBeside, type Group } from './board-columns';

export interface BoardChainProps {
  group: Group;
  pitch: number;
  /** Names of the live stations. */
  stationName(id: string): string;
  chosen: string | null;
  onChoose: (stationId: string | null) => void;
  /** Travellers on the whole board. */
  all: number;
}

/** A word under the line fits beside its neighbours when its longest part does. */
const fits = (name: string, pitch: number): boolean =>
  name.split(' ').every((word) => textWidth(word, 13.33) <= pitch + 4);

/** The head of a group: dimension lines that name stations and steps; a station is also the way to see only its work. */
export function BoardChain({ group, pitch, stationName, chosen, onChoose, all }: BoardChainProps) {
  const upright = group.columns.some((column) => !fits(column.name, pitch));
  const beside = stationsBeside(group);
  return (
    <div role="row" className="board-head">
      <span role="columnheader" className="board-head-word">
        code
      </span>
      <span role="columnheader" className="board-head-word board-head-piece">
        <span>piece</span>
        <button
          type="button"
          className="chain-all"
          aria-pressed={chosen === null}
          onClick={() => onChoose(null)}
        >
          all stations <Figures>{all}</Figures>
          {chosen === null && <SelectionStrut />}
        </button>
      </span>
      <div role="columnheader" className="chain" aria-label="steps and stations">
        <div className="chain-stations">
          {group.spans.map((span) => (
            <div
              key={span.from}
              className="chain-span"
              data-upright={
                span.stationIds.every((id) => fits(stationName(id), (span.to - span.from) * pitch))
                  ? undefined
                  : ''
              }
              data-chosen={span.stationIds.some((id) => id === chosen) ? '' : undefined}
              style={{ width: (span.to - span.from) * pitch }}
            >
              {span.stationIds.map((id) => (
                <StationChoice
                  key={id}
                  name={stationName(id)}
                  count={countInSpan(group, span, id)}
                  chosen={id === chosen}
                  onChoose={() => onChoose(id === chosen ? null : id)}
                />
              ))}
            </div>
          ))}
          {beside.length > 0 && (
            <div className="chain-beside">
              {beside.map((id) => (
                <StationChoice
                  key={id}
                  name={stationName(id)}
                  chosen={id === chosen}
                  onChoose={() => onChoose(id === chosen ? null : id)}
                />
              ))}
            </div>
          )}
        </div>
        <div className="chain-steps" data-upright={upright ? '' : undefined}>
          {group.columns.map((column, i) => (
            <span key={i} className="chain-step" style={{ width: pitch }}>
              <span>{column.name}</span>
            </span>
          ))}
        </div>
      </div>
      <span role="columnheader" className="board-head-word">
        now
      </span>
      <span role="columnheader" className="board-head-word board-head-crew">
        crew
      </span>
    </div>
  );
}

interface StationChoiceProps {
  name: string;
  count?: number;
  chosen: boolean;
  onChoose: () => void;
}

function StationChoice({ name, count, chosen, onChoose }: StationChoiceProps) {
  return (
    <button type="button" className="chain-station" aria-pressed={chosen} onClick={onChoose}>
      {name}
      {count !== undefined && (
        <>
          {' '}
          <Figures>{count}</Figures>
        </>
      )}
    </button>
  );
}
