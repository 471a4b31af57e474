import type { InstallationRecord } from '../../../shared/contracts/live';
import { useLiveMap } from '../../lib/live';

/** The installation's own record; undefined until the live state is there. */
export const useInstallationRecord = (installationId: string): InstallationRecord | undefined =>
  useLiveMap(installationId, 'installation').get(installationId);

/** What was not removed, in an order that stays. */
export const standing = <R extends { removed: boolean }>(
  records: ReadonlyMap<string, R>,
  order: (a: R, b: R) => number,
): R[] => [...records.values()].filter((record) => !record.removed).sort(order);
