import type { DayLogView } from '../../../shared/contracts/progress';
import { AGE_BAND_LABELS } from '../../../shared/safety';
import { counted, formatCalendarDay, formatTime, listed } from '../../lib/formats';
import type { LiveMaps } from '../../lib/live-state';

/** What the ids of an entry are joined with. */
export interface LogNames {
  records: LiveMaps;
  frames: ReadonlyMap<string, { name: string }>;
  zone: string;
}

const GONE = 'somebody who is gone';

/** Who did it: a person of the installation, an administrator without a place in it, or the server itself. */
export function actorName(actor: string, { records }: LogNames): string {
  const [kind, id = ''] = actor.split(':');
  if (kind === 'person') return records.people.get(id)?.name ?? GONE;
  if (kind === 'account') return 'an administrator';
  if (kind === 'display') return 'a projector';
  return 'Strutbee';
}

/** For whom it was done, where that is not who did it. */
export function forName(entry: DayLogView, { records }: LogNames): string | null {
  if (entry.forPersonId === null || entry.actor === `person:${entry.forPersonId}`) return null;
  return records.people.get(entry.forPersonId)?.name ?? GONE;
}

type Say = (value: unknown, names: LogNames, entry: DayLogView) => string | null;

const text = (value: unknown): string => (typeof value === 'string' ? value : '');
const texts = (value: unknown): string[] =>
  Array.isArray(value) ? value.filter((one) => typeof one === 'string') : [];

const BANDS: Readonly<Record<string, string>> = AGE_BAND_LABELS;
const bandWords = (band: unknown): string => BANDS[text(band)] ?? text(band);

function pieceCodes(ids: readonly string[], { records }: LogNames): string {
  const codes = ids.flatMap((id) => records.subAssemblies.get(id)?.code ?? []);
  const [first, last] = [codes[0], codes.at(-1)];
  if (first === undefined) return counted(ids.length, 'piece');
  return codes.length > 2 ? `${first} to ${last ?? first}` : listed(codes);
}

/** Words for each id or figure an entry may carry, in the order in which they are read. */
const SAY: Readonly<Record<string, Say>> = {
  stepId: (id, { records }) => {
    const step = records.steps.get(text(id));
    return step
      ? `${records.subAssemblies.get(step.subAssemblyId)?.code ?? ''} ${step.name}`.trim()
      : 'a step';
  },
  subAssemblyId: (id, { records }, entry) => {
    if ('stepId' in entry.subject) return null;
    const piece = records.subAssemblies.get(text(id));
    return piece ? `${piece.code} ${piece.name}` : 'a piece';
  },
  ids: (ids, names) => pieceCodes(texts(ids), names),
  toolId: (id, { records }) => {
    const tool = records.tools.get(text(id));
    return tool ? `${tool.number} ${tool.name}` : 'a tool';
  },
  personId: (id, { records }, entry) =>
    id === entry.forPersonId || entry.actor === `person:${text(id)}`
      ? null
      : `to ${records.people.get(text(id))?.name ?? GONE}`,
  to: (id, { records }) => {
    const person = records.people.get(text(id));
    return person ? `to ${person.name}` : null;
  },
  stationId: (id, { records }) => records.stations.get(text(id))?.name ?? 'a station',
  buildDayId: (id, { records }) => {
    const day = records.buildDays.get(text(id));
    return day ? formatCalendarDay(day.date) : null;
  },
  frameId: (id, { frames }) => frames.get(text(id))?.name ?? null,
  copies: (copies) => (typeof copies === 'number' && copies > 1 ? `${copies} times` : null),
  pieces: (pieces) => (typeof pieces === 'number' ? counted(pieces, 'piece') : null),
  added: (added) => (typeof added === 'number' ? `${counted(added, 'piece')} made` : null),
  redrawn: (redrawn) =>
    typeof redrawn === 'number' && redrawn > 0 ? `${counted(redrawn, 'piece')} redrawn` : null,
  fieldJoints: (joints) => (typeof joints === 'number' ? counted(joints, 'field joint') : null),
  struts: (struts) => (typeof struts === 'number' ? counted(struts, 'strut') : null),
  briefingId: (id, { records }) => records.briefings.get(text(id))?.title ?? null,
  version: (version) => (typeof version === 'number' ? `version ${version}` : null),
  scope: (scope) => (scope === 'area' ? null : text(scope).replace('-', ' ')),
  duty: (duty) => text(duty),
  duties: (duties) => listed(texts(duties)),
  fields: (fields) => listed(texts(fields)),
  ageBand: bandWords,
  said: (band) => `said ${bandWords(band)}`,
  as: (as) => `as ${text(as)}`,
  exception: (why) => text(why),
  backBy: (at, { zone }) => (typeof at === 'number' ? `back by ${formatTime(at, zone)}` : null),
  late: (late) => (late === true ? 'late' : null),
  minutes: (minutes) => (typeof minutes === 'number' ? `${minutes} min more` : null),
  givenBack: (ids) => (texts(ids).length > 0 ? `${counted(texts(ids).length, 'step')} given back` : null),
  reason: (reason) => (text(reason) ? `"${text(reason)}"` : null),
};

/** What an entry is about, in words; ids that nothing is known of are left out. */
export function subjectWords(entry: DayLogView, names: LogNames): string {
  return Object.entries(SAY)
    .flatMap(([key, say]) => {
      const value = entry.subject[key];
      return value === undefined || value === null ? [] : (say(value, names, entry) ?? []);
    })
    .filter(Boolean)
    .join(', ');
}
