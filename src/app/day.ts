import type { BuildDayRecord, InstallationRecord } from '../../shared/contracts/live';
import { formatTime } from '../lib/formats';
import { useLiveMap } from '../lib/live';
import { useServerNow } from '../lib/server-clock';

/** The build day that counts now, and where the clock stands in it. */
export interface Today {
  day: BuildDayRecord;
  number: number;
  count: number;
  /** Local time `HH:MM` when it is that very day, else undefined. */
  now: string | undefined;
}

const localDate = (at: number, zone: string) =>
  new Intl.DateTimeFormat('sv-SE', { timeZone: zone }).format(at);

/**
 * Today's build day, else the next one, else the last one.
 * @param days not removed
 * @param at ms UTC
 */
export function dayOf(days: readonly BuildDayRecord[], at: number, zone: string): Today | null {
  const sorted = [...days].sort((a, b) => a.date.localeCompare(b.date));
  const today = localDate(at, zone);
  const day = sorted.find((other) => other.date >= today) ?? sorted.at(-1);
  if (!day) return null;
  return {
    day,
    number: sorted.indexOf(day) + 1,
    count: sorted.length,
    now: day.date === today ? formatTime(at, zone) : undefined,
  };
}

/** The installation's own record, once the live state is there. */
export function useInstallation(installationId: string): InstallationRecord | undefined {
  return useLiveMap(installationId, 'installation').get(installationId);
}

/** Today's build day of an installation. */
export function useToday(installationId: string): Today | null {
  const installation = useInstallation(installationId);
  const days = useLiveMap(installationId, 'buildDays');
  const now = useServerNow(15_000);
  if (!installation) return null;
  return dayOf(
    [...days.values()].filter((day) => !day.removed),
    now,
    installation.timeZone,
  );
}
