import type { BuildDayInput, StationInput } from '../../../shared/contracts/installations';
import { newId } from '../../../shared/kernel/ids';
import type { WriteScope } from '../../db/write';
import { AppError, fieldError, notFound } from '../../http/app-error';
import { BuildDay, Station } from './installation.entity';
import { usesOfStation } from './installations.repository';
import { assertOpen } from './installations.service';

async function guardDate(
  scope: WriteScope,
  installationId: string,
  date: string,
  except: string,
): Promise<void> {
  const same = await scope.manager.query<unknown[]>(
    'SELECT 1 FROM build_day WHERE installation_id = ? AND date = ? AND id <> ? AND removed_at IS NULL',
    [installationId, date, except],
  );
  if (same.length > 0)
    throw fieldError('date', 'taken', 'There is a build day on this date already. Edit that one.');
}

/** Add a build day. */
export async function addBuildDay(
  scope: WriteScope,
  installationId: string,
  input: BuildDayInput,
  id = newId(),
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  await guardDate(scope, installationId, input.date, '');
  const revision = await scope.revision();
  await scope.manager.insert(BuildDay, { id, installationId, ...input, revision, removedAt: null });
  scope.changed('buildDays', id);
  await scope.log({ action: 'build-day.added', subject: { buildDayId: id } });
  return { id };
}

/** Change a build day. */
export async function editBuildDay(
  scope: WriteScope,
  installationId: string,
  id: string,
  input: BuildDayInput,
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  await findRow(scope, 'build_day', installationId, id);
  await guardDate(scope, installationId, input.date, id);
  const revision = await scope.revision();
  await scope.manager.update(BuildDay, { id }, { ...input, revision });
  scope.changed('buildDays', id);
  await scope.log({ action: 'build-day.edited', subject: { buildDayId: id } });
  return { id };
}

/**
 * Take a build day away.
 * @throws AppError IN_USE for the only one of a published installation
 */
export async function removeBuildDay(
  scope: WriteScope,
  installationId: string,
  id: string,
): Promise<{ id: string }> {
  const { status } = await assertOpen(scope, installationId);
  await findRow(scope, 'build_day', installationId, id);
  if (status === 'published' && (await countRows(scope, 'build_day', installationId)) <= 1)
    throw new AppError(
      'IN_USE',
      'This is the only build day of a published installation. Add the other one first.',
    );
  const revision = await scope.revision();
  await scope.manager.update(BuildDay, { id }, { removedAt: scope.now, revision });
  scope.changed('buildDays', id);
  await scope.log({ action: 'build-day.removed', subject: { buildDayId: id } });
  return { id };
}

async function guardName(
  scope: WriteScope,
  installationId: string,
  name: string,
  except: string,
): Promise<void> {
  const same = await scope.manager.query<unknown[]>(
    'SELECT 1 FROM station WHERE installation_id = ? AND lower(name) = lower(?) AND id <> ? AND removed_at IS NULL',
    [installationId, name, except],
  );
  if (same.length > 0)
    throw fieldError('name', 'taken', `There is a station ${name} already. Give this one another name.`);
}

/** Add a station after the others. */
export async function addStation(
  scope: WriteScope,
  installationId: string,
  input: StationInput,
  id = newId(),
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  await guardName(scope, installationId, input.name, '');
  const last = await scope.manager.query<{ position: number | null }[]>(
    'SELECT max(position) AS position FROM station WHERE installation_id = ?',
    [installationId],
  );
  const revision = await scope.revision();
  await scope.manager.insert(Station, {
    id,
    installationId,
    ...input,
    position: (last[0]?.position ?? 0) + 1,
    revision,
    removedAt: null,
  });
  scope.changed('stations', id);
  await scope.log({ action: 'station.added', subject: { stationId: id } });
  return { id };
}

/** Change a station. */
export async function editStation(
  scope: WriteScope,
  installationId: string,
  id: string,
  input: StationInput,
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  await findRow(scope, 'station', installationId, id);
  await guardName(scope, installationId, input.name, id);
  const revision = await scope.revision();
  await scope.manager.update(Station, { id }, { ...input, revision });
  scope.changed('stations', id);
  await scope.log({ action: 'station.edited', subject: { stationId: id } });
  return { id };
}

/**
 * Take a station away.
 * @throws AppError IN_USE with what still uses it
 */
export async function removeStation(
  scope: WriteScope,
  installationId: string,
  id: string,
): Promise<{ id: string }> {
  const { status } = await assertOpen(scope, installationId);
  await findRow(scope, 'station', installationId, id);
  const { steps, templates } = await usesOfStation(scope.manager, installationId, id);
  if (steps > 0 || templates.length > 0) {
    const uses = [
      ...(steps > 0 ? [`${steps} ${steps === 1 ? 'step is' : 'steps are'} done here`] : []),
      ...(templates.length > 0 ? [`it stands in ${templates.join(', ')}`] : []),
    ].join(' and ');
    throw new AppError('IN_USE', `This station stays: ${uses}. Give them another station first.`, {
      details: { steps, templates },
    });
  }
  if (status === 'published' && (await countRows(scope, 'station', installationId)) <= 1)
    throw new AppError(
      'IN_USE',
      'This is the only station of a published installation. Add another one first.',
    );
  const revision = await scope.revision();
  await scope.manager.update(Station, { id }, { removedAt: scope.now, revision });
  scope.changed('stations', id);
  await scope.log({ action: 'station.removed', subject: { stationId: id } });
  return { id };
}

type Table = 'build_day' | 'station';

async function findRow(scope: WriteScope, table: Table, installationId: string, id: string): Promise<void> {
  const rows = await scope.manager.query<unknown[]>(
    `SELECT 1 FROM ${table} WHERE installation_id = ? AND id = ? AND removed_at IS NULL`,
    [installationId, id],
  );
  if (rows.length === 0) throw notFound();
}

async function countRows(scope: WriteScope, table: Table, installationId: string): Promise<number> {
  const rows = await scope.manager.query<{ n: number }[]>(
    `SELECT count(*) AS n FROM ${table} WHERE installation_id = ? AND removed_at IS NULL`,
    [installationId],
  );
  return rows[0]?.n ?? 0;
}
