import type { BuildDayRecord } from '../../../shared/contracts/live';
import { formatTime, minutesOf } from '../../lib/formats';
import { backByMinutes } from './back-by';
import type { ToolOut } from './use-crib';

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
/** Together they stay under a day, so that a time of day has one place on the line. */
const MOST_BACK = 8 * HOUR;
const MOST_AHEAD = 12 * HOUR;

/** The hours over which the lines of tools stretch. */
export interface LineWindow {
  opens: string;
  closes: string;
  /** Where an instant stands, as a local time of day; what lies outside stands at the edge. */
  place: (at: number) => string;
}

/**
 * From the first lent to the last due, whole hours, and to the end of the build day; a tool from yesterday does not
 * press the others together.
 * @param out what is out
 * @param day today's build day
 * @param now ms UTC
 * @param zone IANA zone of the hall
 */
export function lineWindow({
  out,
  day,
  now,
  zone,
}: {
  out: readonly ToolOut[];
  day: BuildDayRecord | undefined;
  now: number;
  zone: string;
}): LineWindow {
  const sinceHour = (at: number) => (minutesOf(formatTime(at, zone)) % 60) * MINUTE + (at % MINUTE);
  const first = Math.min(now, ...out.map(({ checkout }) => checkout.outAt));
  const last = Math.max(now, ...out.map(({ checkout }) => checkout.backBy));
  const from = Math.max(first, now - MOST_BACK);
  const opensAt = from - sinceHour(from);
  const to = Math.min(last, now + MOST_AHEAD);
  const clearUpAt = now - (now % MINUTE) + (backByMinutes('day', day, now, zone) ?? 0) * MINUTE;
  const closesAt = Math.max(to - sinceHour(to) + HOUR, Math.min(clearUpAt, now + MOST_AHEAD));
  return {
    opens: formatTime(opensAt, zone),
    closes: formatTime(closesAt, zone),
    place: (at) => formatTime(Math.min(Math.max(at, opensAt), closesAt), zone),
  };
}
