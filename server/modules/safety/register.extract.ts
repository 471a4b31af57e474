import type Database from 'better-sqlite3';
import type { RegisterRowView, RegisterView } from '../../../shared/contracts/safety';
import { prepared } from '../../realtime/live-source';
import { roomName } from './safety.repository';

const KIND_WORDS: Record<string, string> = {
  signed: 'signed',
  countersigned: 'countersigned',
  revoked: 'revoked',
  voided: 'earlier sign-offs end',
  talked: 'talked with a lead',
  erased: 'person erased',
  'version-published': 'version published',
};

/** An instant in the installation's zone, `2027-06-12 10:00:00`. */
function localTime(at: number, timeZone: string): string {
  const format = new Intl.DateTimeFormat('sv-SE', { timeZone, dateStyle: 'short', timeStyle: 'medium' });
  return format.format(at);
}

/** The register as a page of text to print and keep: the rows, how many there are, and the hash of the last. */
export function registerExtract(
  db: Database.Database,
  installationId: string,
  register: RegisterView,
  now: number,
): string {
  const installation = prepared<{ name: string; time_zone: string }>(
    db,
    'SELECT name, time_zone FROM installation WHERE id = ?',
  ).get(installationId);
  const timeZone = installation?.time_zone ?? 'UTC';
  const names = namesById(db, installationId);
  const { verified, count, headHash } = register;
  return [
    'STRUTBEE · SIGN-OFF REGISTER, EXTRACT',
    '',
    `Installation  ${installation?.name ?? ''} (${installationId})`,
    `Made          ${localTime(now, timeZone)} ${timeZone}`,
    `Rows          ${count}`,
    `Head hash     ${headHash}`,
    verified.ok
      ? 'Chain         verified: every row follows from the one before, none was altered'
      : `Chain         NOT INTACT at row ${verified.seq}: ${verified.why}`,
    '',
    'Keep this page. Rows cut off the end show only against a page like this one, with this command:',
    `npm run verify:register -- --installation ${installationId} --count ${count} --head ${headHash}`,
    '',
    ...register.rows.map((row) => rowLine(row, timeZone, names)),
    '',
  ].join('\n');
}

function rowLine(row: RegisterRowView, timeZone: string, names: ReadonlyMap<string, string>): string {
  const { ids, personal } = row;
  const who = personal?.name ?? (personal === null ? '(erased)' : '');
  const by = ids.by === undefined ? '' : `by ${names.get(String(ids.by)) ?? '(erased)'}`;
  const what = [
    ids.briefingKey === undefined ? '' : `${ids.briefingKey} v${ids.version ?? '?'}`,
    personal?.ageBand ?? '',
    ids.as === undefined ? by : `${by} as ${ids.as}`,
    ids.effectiveFrom === undefined ? '' : `from ${localTime(Number(ids.effectiveFrom), timeZone)}`,
    personal?.reason === undefined ? '' : `"${personal.reason}"`,
  ].filter((part) => part !== '');
  return [
    String(row.seq).padStart(5),
    localTime(row.at, timeZone),
    (KIND_WORDS[row.kind] ?? row.kind).padEnd(21),
    who.padEnd(18),
    what.join(' · '),
    `[${row.hash.slice(0, 12)}]`,
  ].join('  ');
}

function namesById(db: Database.Database, installationId: string): Map<string, string> {
  const rows = prepared<{ id: string; first_name: string; initial: string }>(
    db,
    'SELECT id, first_name, initial FROM person WHERE installation_id = ? AND erased_at IS NULL',
  ).all(installationId);
  return new Map(rows.map((row) => [row.id, roomName(row.first_name, row.initial)]));
}
