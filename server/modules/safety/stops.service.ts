import type { StopKind } from '../../../shared/safety';
import { newId } from '../../../shared/kernel/ids';
import type { WriteScope } from '../../db/write';
import { AppError, fieldError, notFound } from '../../http/app-error';
import { activeStops } from './missing-sign-offs';
import { nameOf, openInstallation } from './safety.repository';
import { StopRow, StopSeen } from './safety.entity';

const SCOPE_WORDS: Record<StopKind, string> = {
  'hot-tools': 'all hot tools',
  area: 'this area',
  everything: 'everything',
};

const timeOfDay = (at: number, timeZone: string) =>
  new Intl.DateTimeFormat('en-GB', { timeZone, hour: '2-digit', minute: '2-digit' }).format(at);

/** What is stopped: hot tools, one station, or everything. */
type StopWish = { reason: string } & (
  { scope: 'hot-tools' | 'everything'; stationId?: undefined } | { scope: 'area'; stationId: string }
);

/**
 * Raise a stop. Whoever raises it has seen it.
 * @throws AppError STOP_ALREADY_RAISED with who raised the same one and when
 */
export async function raiseStop(
  scope: WriteScope,
  installationId: string,
  personId: string,
  wish: StopWish,
): Promise<{ stopId: string }> {
  const { manager, now } = scope;
  const { timeZone } = await openInstallation(manager, installationId);
  const stationId = wish.stationId ?? null;
  if (stationId !== null) {
    const stations = await manager.query<{ id: string }[]>(
      'SELECT id FROM station WHERE id = ? AND installation_id = ? AND removed_at IS NULL',
      [stationId, installationId],
    );
    if (stations.length === 0) {
      throw fieldError('stationId', 'unknown', 'This station is not there any more. Choose another one.');
    }
  }
  const stops = await activeStops(manager, installationId);
  const same = stops.find((stop) => stop.scope === wish.scope && stop.stationId === stationId);
  if (same) {
    const by = await nameOf(manager, installationId, same.raisedBy);
    throw new AppError(
      'STOP_ALREADY_RAISED',
      `${by} has stopped ${SCOPE_WORDS[wish.scope]} since ${timeOfDay(same.raisedAt, timeZone)}. The stop stands; make safe and wait for a safety lead.`,
      { details: { stopId: same.stopId, raisedBy: same.raisedBy, raisedAt: same.raisedAt } },
    );
  }
  const revision = await scope.revision();
  const id = newId();
  await manager.insert(StopRow, {
    id,
    installationId,
    scope: wish.scope,
    stationId,
    reason: wish.reason,
    raisedBy: personId,
    raisedAt: now,
    liftedBy: null,
    liftedAt: null,
    liftNote: null,
    revision,
  });
  await manager.insert(StopSeen, { stopId: id, personId, at: now });
  scope.changed('stops', id);
  await scope.log({
    action: 'stop.raised',
    subject: { stopId: id, scope: wish.scope, ...(stationId === null ? {} : { stationId }) },
  });
  return { stopId: id };
}

async function findStop(scope: WriteScope, installationId: string, stopId: string): Promise<StopRow> {
  const stop = await scope.manager.findOneBy(StopRow, { id: stopId, installationId });
  if (!stop) throw notFound();
  return stop;
}

/** Say that one has seen a stop; a second time, or after it was lifted, nothing changes. */
export async function seeStop(
  scope: WriteScope,
  installationId: string,
  personId: string,
  stopId: string,
): Promise<{ stopId: string; lifted: boolean }> {
  const { manager, now } = scope;
  const stop = await findStop(scope, installationId, stopId);
  if (stop.liftedAt !== null) return { stopId, lifted: true };
  const seen = await manager.query<{ at: number }[]>(
    'INSERT INTO stop_seen (stop_id, person_id, at) VALUES (?, ?, ?) ON CONFLICT DO NOTHING RETURNING at',
    [stopId, personId, now],
  );
  if (seen.length === 1) {
    await manager.update(StopRow, { id: stopId }, { revision: await scope.revision() });
    scope.changed('stops', stopId);
    await scope.log({ action: 'stop.seen', subject: { stopId } });
  }
  return { stopId, lifted: false };
}

/**
 * Lift a stop, with a note on what was found and done.
 * @throws AppError STOP_LIFTED with who lifted it and when
 */
export async function liftStop(
  scope: WriteScope,
  installationId: string,
  leadId: string,
  stopId: string,
  note: string,
): Promise<{ stopId: string }> {
  const { manager, now } = scope;
  const { timeZone } = await openInstallation(manager, installationId);
  const stop = await findStop(scope, installationId, stopId);
  if (stop.liftedAt !== null) {
    const by = stop.liftedBy === null ? 'Somebody' : await nameOf(manager, installationId, stop.liftedBy);
    throw new AppError(
      'STOP_LIFTED',
      `${by} lifted this stop at ${timeOfDay(stop.liftedAt, timeZone)}. There is nothing to do.`,
      { details: { stopId, liftedBy: stop.liftedBy, liftedAt: stop.liftedAt } },
    );
  }
  const revision = await scope.revision();
  await manager.update(
    StopRow,
    { id: stopId },
    { liftedBy: leadId, liftedAt: now, liftNote: note, revision },
  );
  scope.changed('stops', stopId);
  await scope.log({ action: 'stop.lifted', subject: { stopId } });
  return { stopId };
}
