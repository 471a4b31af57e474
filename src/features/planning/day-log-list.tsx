import { useInfiniteQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import type { DayLogView } from '../../../shared/contracts/progress';
import { Action } from '../../components/ui/action';
import { SelectField } from '../../components/ui/field';
import { Figures } from '../../components/ui/figures';
import { DimensionHead } from '../../components/ui/heads';
import { EmptyNote } from '../../components/ui/note';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { Sheet } from '../../components/ui/sheet';
import { StateGlyph } from '../../components/ui/strut-glyph';
import { get } from '../../lib/api';
import { formatDay, formatSecond } from '../../lib/formats';
import { useFrames } from '../../lib/frames';
import { useLive } from '../../lib/live';
import type { LiveMaps } from '../../lib/live-state';
import { actorName, forName, subjectWords, type LogNames } from './day-log-subject';
import { ACTION_GROUPS, actionWords, flagWords } from './day-log-words';

const PAGE = 100;
/** Entries whose two times lie closer than this were recorded when they happened. */
const AT_ONCE_MS = 2000;

interface Page {
  rows: DayLogView[];
  /** The installation's revision when this page was asked for. */
  revision: number;
}

function useDayLog(installationId: string, action: string, piece: string) {
  const revision = useLive(installationId, (state) => state.cursor) ?? 0;
  const log = useInfiniteQuery({
    queryKey: ['day-log', installationId, action, piece],
    queryFn: async ({ pageParam }): Promise<Page> => {
      const query = new URLSearchParams({ limit: String(PAGE) });
      if (pageParam !== null) query.set('before', String(pageParam));
      if (action) query.set('action', action);
      if (piece) query.set('subject', piece);
      const rows = await get<DayLogView[]>(`/installations/${installationId}/day-log?${query.toString()}`);
      return { rows, revision };
    },
    initialPageParam: null as number | null,
    getNextPageParam: ({ rows }) => (rows.length === PAGE ? (rows.at(-1)?.seq ?? null) : null),
    refetchOnMount: 'always',
  });
  const newest = log.data?.pages[0]?.revision ?? revision;
  return { log, newer: revision - newest };
}

/** Entries by the local day on which they were recorded, newest first. */
function byDay(rows: readonly DayLogView[], zone: string): [string, DayLogView[]][] {
  const days = new Map<string, DayLogView[]>();
  for (const row of rows) {
    const day = formatDay(row.recordedAt, zone);
    const list = days.get(day);
    if (list) list.push(row);
    else days.set(day, [row]);
  }
  return [...days];
}

/** Every change of the installation, newest first. */
export function DayLogList({
  installationId,
  zone,
  records,
}: {
  installationId: string;
  zone: string;
  records: LiveMaps;
}) {
  const [action, setAction] = useState('');
  const [piece, setPiece] = useState('');
  const { log, newer } = useDayLog(installationId, action, piece);
  const frames = useFrames(installationId);
  const names: LogNames = { records, frames, zone };
  const rows = useMemo(() => log.data?.pages.flatMap((page) => page.rows) ?? [], [log.data]);
  const days = useMemo(() => byDay(rows, zone), [rows, zone]);
  return (
    <div className="grid gap-6">
      <Filters records={records} {...{ action, setAction, piece, setPiece }} />
      <Refusal error={log.error} />
      {newer > 0 && (
        <div>
          <Action busy={log.isRefetching} onClick={() => void log.refetch()}>
            {newer === 1 ? 'Something was recorded since: show it' : `${newer} changes since: show them`}
          </Action>
        </div>
      )}
      {log.isPending && <Pending />}
      {log.data && rows.length === 0 && (
        <EmptyNote title="No entry of that kind.">Choose other entries or another piece above.</EmptyNote>
      )}
      {days.map(([day, entries]) => (
        <section key={day} className="grid gap-2" aria-label={day}>
          <DimensionHead>{day}</DimensionHead>
          <Sheet caption={`Entries of ${day}`}>
            <thead>
              <tr>
                <th scope="col">time</th>
                <th scope="col">who</th>
                <th scope="col">did what</th>
                <th scope="col">for</th>
                <th scope="col">marks</th>
              </tr>
            </thead>
            <tbody>
              {entries.map((entry) => (
                <Entry key={entry.seq} entry={entry} names={names} />
              ))}
            </tbody>
          </Sheet>
        </section>
      ))}
      {log.hasNextPage && (
        <div>
          <Action busy={log.isFetchingNextPage} onClick={() => void log.fetchNextPage()}>
            Older entries
          </Action>
        </div>
      )}
    </div>
  );
}

function Entry({ entry, names }: { entry: DayLogView; names: LogNames }) {
  const forWhom = forName(entry, names);
  const about = subjectWords(entry, names);
  const late = entry.recordedAt - entry.happenedAt > AT_ONCE_MS;
  return (
    <tr>
      <td className="log-time">
        <Figures>{formatSecond(entry.happenedAt, names.zone)}</Figures>
        {late && (
          <span className="block text-pencil">
            recorded <Figures>{formatSecond(entry.recordedAt, names.zone)}</Figures>
          </span>
        )}
      </td>
      <th scope="row">{actorName(entry.actor, names)}</th>
      <td>
        <span className="font-medium">{actionWords(entry.action)}</span>
        {about && ` ${about}`}
      </td>
      <td data-label={forWhom === null ? undefined : 'for'}>{forWhom}</td>
      <td>
        {entry.flags.map((flag) => (
          <span key={flag} className="flex items-center gap-2 text-held">
            <StateGlyph state="held" /> {flagWords(flag)}
          </span>
        ))}
      </td>
    </tr>
  );
}

function Filters({
  records,
  action,
  setAction,
  piece,
  setPiece,
}: {
  records: LiveMaps;
  action: string;
  setAction: (action: string) => void;
  piece: string;
  setPiece: (piece: string) => void;
}) {
  const pieces = [...records.subAssemblies.values()].sort((a, b) => a.code.localeCompare(b.code));
  return (
    <div className="grid items-start gap-x-8 gap-y-3 sm:grid-cols-2 desk:grid-cols-[18rem_18rem]">
      <SelectField label="entries" value={action} onChange={(event) => setAction(event.target.value)}>
        <option value="">all entries</option>
        {ACTION_GROUPS.map(({ area, actions }) => (
          <optgroup key={area} label={area}>
            {actions.map((one) => (
              <option key={one} value={one}>
                {area} {actionWords(one)}
              </option>
            ))}
          </optgroup>
        ))}
      </SelectField>
      <SelectField label="about the piece" value={piece} onChange={(event) => setPiece(event.target.value)}>
        <option value="">any</option>
        {pieces.map(({ id, code, name, removed }) => (
          <option key={id} value={id}>
            {`${code} ${name}${removed ? ', taken out' : ''}`}
          </option>
        ))}
      </SelectField>
    </div>
  );
}
