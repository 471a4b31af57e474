import type { BuildDayRecord } from '../../../shared/contracts/live';
import { formatDay, formatTime, minutesBetween, minutesOf } from '../../lib/formats';

export const BACK_BY = ['30', '60', '120', 'day'] as const;
export type BackBy = (typeof BACK_BY)[number];

export const BACK_BY_WORDS: Record<BackBy, string> = {
  '30': '30 min',
  '60': '1 h',
  '120': '2 h',
  day: 'end of day',
};

/** The least the server takes. */
const LEAST_MINUTES = 5;

const localDate = (at: number, zone: string) =>
  new Intl.DateTimeFormat('sv-SE', { timeZone: zone }).format(at);

/**
 * Today's build day.
 * @param days live records
 * @param now ms UTC
 * @param zone IANA zone of the hall
 */
export const buildDayNow = (
  days: Iterable<BuildDayRecord>,
  now: number,
  zone: string,
): BuildDayRecord | undefined => [...days].find((day) => !day.removed && day.date === localDate(now, zone));

/**
 * Minutes until a tool is due.
 * @param day today's build day; its clear-up is the end of the day for tools
 * @returns null for the end of a day that is not today, or has come
 */
export function backByMinutes(
  choice: BackBy,
  day: BuildDayRecord | undefined,
  now: number,
  zone: string,
): number | null {
  if (choice !== 'day') return Number(choice);
  if (!day) return null;
  const time = formatTime(now, zone);
  // A day that ends after midnight goes on past it.
  const overnight = minutesOf(day.clearUp) < minutesOf(day.doors);
  if (!overnight && minutesOf(time) >= minutesOf(day.clearUp)) return null;
  const left = minutesBetween(time, day.clearUp);
  return left >= LEAST_MINUTES ? left : null;
}

/** A time of today as `14:07`, one of another day as `14:07 on Sat 14 June`. Times in ms UTC. */
export function timeWords(at: number, now: number, zone: string): string {
  const time = formatTime(at, zone);
  return localDate(at, zone) === localDate(now, zone) ? time : `${time} on ${formatDay(at, zone)}`;
}
