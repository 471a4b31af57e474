import { useCallback, useDeferredValue, useMemo } from 'react';
import type { CSSProperties } from 'react';
import { EmptyNote } from '../../components/ui/note';
import { PageHead } from '../../components/ui/heads';
import { useWidth } from '../../components/ui/use-width';
import { formatTime } from '../../lib/formats';
import { useFrames } from '../../lib/frames';
import { useLiveMap } from '../../lib/live';
import { useServerNow } from '../../lib/server-clock';
import { BoardChain } from './board-chain';
import { boardGroups, isAligned, type Group } from './board-columns';
import { Counters, FilterLine, Legend } from './board-head';
import { BoardRowView } from './board-row';
import { boardRows, type BoardRow } from './board-rows';
import { boardLayout, pitchFor, STICK_PAD } from './board-width';
import { matches, queryOf, useBoardFilter, type BoardFilter } from './filters';
import { useLiveNotes, type LiveNote } from './live-notes';
import { nowWords } from './now-words';
import { sketchOf } from './sketches';
import { TravellerPanel } from './traveller-panel';

/** The live board: every traveller as a marked stick. */
export function TravellersBoard({ installationId }: { installationId: string }) {
  const pieces = useLiveMap(installationId, 'subAssemblies');
  const steps = useLiveMap(installationId, 'steps');
  const stations = useLiveMap(installationId, 'stations');
  const [filter, change] = useBoardFilter();
  const [ref, width] = useWidth<HTMLDivElement>(1200);
  const rows = useMemo(() => boardRows(pieces, steps), [pieces, steps]);
  const groups = useMemo(() => boardGroups(rows), [rows]);
  // Typing stays quick while hundreds of rows follow.
  const narrowed = useDeferredValue(filter.piece);
  const shown = useMemo(
    () =>
      new Set(
        rows.filter((row) =>
          matches({ stationId: filter.stationId, state: filter.state, piece: narrowed, open: null }, row),
        ),
      ),
    [rows, filter.stationId, filter.state, narrowed],
  );
  const mostSteps = groups.reduce((most, group) => Math.max(most, group.columns.length), 1);
  const layout = boardLayout(width, mostSteps);
  // On a desk the way back stands at the foot: in the head it would push the sheet down.
  const wide = layout.kind === 'wide';
  const passed = rows.reduce((sum, row) => sum + row.steps.filter(isPassed).length, 0);
  const all = rows.reduce((sum, row) => sum + row.steps.length, 0);
  const opened = rows.find((row) => row.piece.code === filter.open);
  const liveStations = [...stations.values()]
    .filter((station) => !station.removed)
    .sort((a, b) => a.position - b.position);
  return (
    <>
      <PageHead
        title="Travellers"
        summary={`${rows.length} travellers, ${passed} of ${all} steps passed.`}
        aside={
          <>
            <FilterLine
              filter={filter}
              onChange={change}
              stations={layout.kind === 'narrow' ? liveStations : null}
              reset={!wide}
            />
            <Counters rows={rows} filter={filter} onChange={change} />
          </>
        }
      />
      <div ref={ref} className="board" data-layout={layout.kind} inert={layout.kind === 'narrow' && !!opened}>
        {rows.length === 0 ? (
          <EmptyNote title="No travellers yet.">
            An organiser makes sub-assemblies from frames; each brings its traveller.
          </EmptyNote>
        ) : (
          <Table
            {...{ installationId, groups, shown, filter, change, width, mostSteps }}
            total={rows.length}
          />
        )}
        {rows.length > 0 && shown.size === 0 && (
          <EmptyNote title="None of the travellers is like that now.">
            Take a filter off and the others are there again.
          </EmptyNote>
        )}
        <Legend filter={filter} onChange={change} shown={shown.size} all={rows.length} reset={wide} />
      </div>
      {opened && (
        <TravellerPanel
          key={opened.piece.id}
          installationId={installationId}
          row={opened}
          onClose={() => change({ open: null })}
        />
      )}
    </>
  );
}

const isPassed = (step: { state: string }) => step.state === 'passed';

interface TableProps {
  installationId: string;
  groups: readonly Group[];
  shown: ReadonlySet<BoardRow>;
  filter: BoardFilter;
  change: (change: Partial<BoardFilter>) => void;
  width: number;
  mostSteps: number;
  total: number;
}

function Table(props: TableProps) {
  const { installationId, groups, shown, filter, change, width, mostSteps, total } = props;
  const people = useLiveMap(installationId, 'people');
  const stations = useLiveMap(installationId, 'stations');
  const steps = useLiveMap(installationId, 'steps');
  const [installation] = useLiveMap(installationId, 'installation').values();
  const frames = useFrames(installationId);
  const now = useServerNow(15_000);
  const zone = installation?.timeZone ?? 'UTC';
  const nameOf = useCallback((id: string) => people.get(id)?.name ?? 'somebody', [people]);
  const notes = useLiveNotes(steps, nameOf);
  const layout = boardLayout(width, mostSteps);
  const context = { nameOf, time: (at: number) => formatTime(at, zone) };
  const visible = groups.filter((group) => group.rows.some((row) => shown.has(row)));
  return (
    <div
      role="table"
      aria-label="Travellers"
      className="board-table"
      style={{ '--chain': `${layout.chain + STICK_PAD}px` } as CSSProperties}
    >
      {(visible.length > 0 ? visible : groups.slice(0, 1)).map((group) => {
        const pitch = pitchFor(layout.chain, group.columns.length);
        return (
          <div role="rowgroup" className="board-group" key={group.letters.join()}>
            {layout.kind !== 'narrow' && (
              <BoardChain
                group={group}
                pitch={pitch}
                stationName={(id) => stations.get(id)?.name ?? ''}
                chosen={filter.stationId}
                onChoose={(stationId) => change({ stationId })}
                all={total}
              />
            )}
            {group.rows
              .filter((row) => shown.has(row))
              .map((row, i, list) => {
                const own = !isAligned(group, row);
                const rowPitch = own || layout.kind === 'narrow' ? ownPitch(layout.chain, row) : pitch;
                const note = notes.get(row.piece.id) ?? null;
                return (
                  <BoardRowView
                    key={row.piece.id}
                    row={row}
                    sketch={sketchOf(frames.get(row.piece.frameId))}
                    pitch={rowPitch}
                    own={own}
                    {...nowWords(row, context)}
                    dried={driedShare(row, now)}
                    {...noteProps(note)}
                    open={filter.open === row.piece.code}
                    to={`?${queryOf({ ...filter, open: row.piece.code }).toString()}`}
                    first={startsLetters(list, i)}
                  />
                );
              })}
          </div>
        );
      })}
    </div>
  );
}

const ownPitch = (chain: number, row: BoardRow) => pitchFor(chain, row.steps.length);

const noteProps = (note: LiveNote | null) => ({
  note: note?.text ?? null,
  noteState: note?.state ?? null,
});

/** Share of the drying time that has passed, in twentieths. */
function driedShare(row: BoardRow, now: number): number {
  const step = row.current;
  if (step?.state !== 'drying' || step.dryUntil === null || step.finishedAt === null) return 0;
  const whole = step.dryUntil - step.finishedAt;
  return whole > 0 ? Math.round(Math.min(1, Math.max(0, (now - step.finishedAt) / whole)) * 20) : 20;
}

const lettersOf = (row: BoardRow | undefined) => row?.piece.code.split('-', 1)[0];
const startsLetters = (rows: readonly BoardRow[], i: number) =>
  i > 0 && lettersOf(rows[i]) !== lettersOf(rows[i - 1]);
