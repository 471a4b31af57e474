import { formatLength, parseLength, type LengthUnit } from '../../shared/kernel/lengths';

const DAY_MINUTES = 24 * 60;

/** Minutes since midnight of a local time of day, `HH:MM`. */
export function minutesOf(time: string): number {
  const [hours = 0, minutes = 0] = time.split(':').map(Number);
  return hours * 60 + minutes;
}

/** A local time of day, `HH:MM`, of minutes since midnight; past midnight it starts over. */
export function timeOfDay(minutes: number): string {
  const at = ((Math.round(minutes) % DAY_MINUTES) + DAY_MINUTES) % DAY_MINUTES;
  return `${String(Math.floor(at / 60)).padStart(2, '0')}:${String(at % 60).padStart(2, '0')}`;
}

/** Minutes from one local time of day to another; over midnight when the second is the earlier one. */
export function minutesBetween(from: string, to: string): number {
  const span = minutesOf(to) - minutesOf(from);
  return span < 0 ? span + DAY_MINUTES : span;
}

const formats = new Map<string, Intl.DateTimeFormat>();

/** Making a format is slow and a board shows hundreds of times: each is made once. */
function formatFor(zone: string, kind: 'time' | 'second' | 'day' | 'date'): Intl.DateTimeFormat {
  const key = `${kind} ${zone}`;
  const known = formats.get(key);
  if (known) return known;
  const clock = { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' } as const;
  const options: Record<typeof kind, Intl.DateTimeFormatOptions> = {
    time: clock,
    second: { ...clock, second: '2-digit' },
    day: { weekday: 'short', day: 'numeric', month: 'long' },
    date: { day: 'numeric', month: 'long', year: 'numeric' },
  };
  const made = new Intl.DateTimeFormat('en-GB', { timeZone: zone, ...options[kind] });
  formats.set(key, made);
  return made;
}

/** Local time of an instant, `14:07`. `at` in ms UTC, `zone` an IANA name. */
export const formatTime = (at: number, zone: string): string => formatFor(zone, 'time').format(at);

/** Local time of an instant to the second, `14:07:31`. */
export const formatSecond = (at: number, zone: string): string => formatFor(zone, 'second').format(at);

/** Local day of an instant, `Sat 14 June`. */
export const formatDay = (at: number, zone: string): string =>
  formatFor(zone, 'day').format(at).replace(',', '');

/** Local date of an instant, `14 June 2025`. */
export const formatDate = (at: number, zone: string): string => formatFor(zone, 'date').format(at);

/** A calendar date `YYYY-MM-DD` as `Sat 14 June`; it has no zone of its own. */
export const formatCalendarDay = (date: string): string => formatDay(Date.parse(`${date}T12:00:00Z`), 'UTC');

/** A duration in whole minutes: `6 min`, `1 h 20 min`; under a minute `less than a minute`. */
export function formatDuration(seconds: number): string {
  const minutes = Math.round(seconds / 60);
  if (minutes < 1) return 'less than a minute';
  if (minutes < 60) return `${minutes} min`;
  const rest = minutes % 60;
  return rest === 0 ? `${minutes / 60} h` : `${Math.floor(minutes / 60)} h ${rest} min`;
}

/** A count with its word: `1 place`, `2 places`; `many` where an `s` does not make the plural. */
export const counted = (count: number, one: string, many = `${one}s`): string =>
  `${count.toLocaleString('en-GB')} ${count === 1 ? one : many}`;

/** Names in a row: `Sol V, Mei T and Rafi B`. */
export function listed(names: readonly string[]): string {
  if (names.length < 2) return names[0] ?? '';
  return `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`;
}

/**
 * A length as it is typed in the installation's unit; reads back to the same length within 0.01 mm.
 * @param mm below zero for a place before it
 */
export function typedLength(mm: number, unit: LengthUnit): string {
  if (mm < 0) return `-${typedLength(-mm, unit)}`;
  if (unit === 'mm') return String(Number(mm.toFixed(2)));
  const shown = formatLength(mm, 'inch');
  const back = parseLength(shown, 'inch');
  return back !== null && Math.abs(back - mm) < 0.01
    ? shown.replace(/ in$/, '')
    : String(Number((mm / 25.4).toFixed(4)));
}
