import type { EntityManager } from 'typeorm';
import type { Duty } from '../../../shared/accounts';
import type { BriefingBody, Hazard, SignOff, VersionFacts } from '../../../shared/safety';
import { AppError, notFound } from '../../http/app-error';

/**
 * The installation, when it still takes changes.
 * @throws AppError INSTALLATION_CLOSED; notFound for an unknown id
 */
export async function openInstallation(
  manager: EntityManager,
  installationId: string,
): Promise<{ timeZone: string }> {
  const [row] = await manager.query<{ time_zone: string; status: string }[]>(
    'SELECT time_zone, status FROM installation WHERE id = ?',
    [installationId],
  );
  if (!row) throw notFound();
  if (row.status === 'closed') {
    throw new AppError('INSTALLATION_CLOSED', 'This installation is closed: nothing on it changes any more.');
  }
  return { timeZone: row.time_zone };
}

export interface BriefingFacts {
  id: string;
  key: string;
  title: string;
  hazards: Hazard[];
  validityDays: number;
  /** Published ones, oldest first. */
  versions: (VersionFacts & { contentHash: string })[];
}

interface RawBriefing {
  id: string;
  key: string;
  title: string;
  hazards: string;
  validity_days: number;
}

/** A briefing with its published versions; notFound when the installation has none with that key. */
export async function loadBriefing(
  manager: EntityManager,
  installationId: string,
  key: string,
): Promise<BriefingFacts> {
  const [row] = await manager.query<RawBriefing[]>(
    'SELECT id, key, title, hazards, validity_days FROM briefing WHERE installation_id = ? AND key = ?',
    [installationId, key],
  );
  if (!row) throw notFound();
  const versions = await manager.query<
    { version: number; kind: VersionFacts['kind']; effective_from: number; content_hash: string }[]
  >(
    `SELECT version, kind, effective_from, content_hash FROM briefing_version
     WHERE briefing_id = ? AND status = 'published' ORDER BY version`,
    [row.id],
  );
  return {
    id: row.id,
    key: row.key,
    title: row.title,
    hazards: JSON.parse(row.hazards) as Hazard[],
    validityDays: row.validity_days,
    versions: versions.map((one) => ({
      version: one.version,
      kind: one.kind,
      effectiveFrom: one.effective_from,
      contentHash: one.content_hash,
    })),
  };
}

/** The text of one version, published or proposed. */
export async function loadBody(
  manager: EntityManager,
  briefingId: string,
  version: number,
): Promise<BriefingBody> {
  const [row] = await manager.query<{ body: string }[]>(
    'SELECT body FROM briefing_version WHERE briefing_id = ? AND version = ?',
    [briefingId, version],
  );
  if (!row) throw notFound();
  return JSON.parse(row.body) as BriefingBody;
}

export interface RawSignOff {
  id: string;
  person_id: string;
  briefing_key: string;
  version: number;
  attempts: string;
  talk_by: string | null;
  talk_at: number | null;
  passed_at: number | null;
  signed_at: number | null;
  countersigned_by: string | null;
  countersigned_at: number | null;
  countersigned_as: SignOff['countersignedAs'];
  expires_at: number | null;
  revoked_at: number | null;
  revoked_by: string | null;
  revoke_reason: string | null;
  revision: number;
}

/** Everything but the signature, which is read only on a lead's own request. */
export const SIGN_OFF_COLUMNS = `id, person_id, briefing_key, version, attempts, talk_by, talk_at, passed_at, signed_at,
  countersigned_by, countersigned_at, countersigned_as, expires_at, revoked_at, revoked_by, revoke_reason, revision`;

/** A stored sign-off with its revision, for conditional updates. */
export type StoredSignOff = SignOff & { revision: number };

export const toSignOff = (row: RawSignOff): StoredSignOff => ({
  id: row.id,
  personId: row.person_id,
  briefingKey: row.briefing_key,
  version: row.version,
  attempts: JSON.parse(row.attempts) as { at: number; wrongIds: string[] }[],
  talkBy: row.talk_by,
  talkAt: row.talk_at,
  passedAt: row.passed_at,
  signedAt: row.signed_at,
  countersignedBy: row.countersigned_by,
  countersignedAt: row.countersigned_at,
  countersignedAs: row.countersigned_as,
  expiresAt: row.expires_at,
  revokedAt: row.revoked_at,
  revokedBy: row.revoked_by,
  revokeReason: row.revoke_reason,
  revision: row.revision,
});

/** A person's sign-offs for one briefing, in the order in which they were begun. */
export async function ownSignOffs(
  manager: EntityManager,
  installationId: string,
  personId: string,
  briefingKey: string,
): Promise<StoredSignOff[]> {
  const rows = await manager.query<RawSignOff[]>(
    `SELECT ${SIGN_OFF_COLUMNS} FROM sign_off
     WHERE installation_id = ? AND person_id = ? AND briefing_key = ? ORDER BY rowid`,
    [installationId, personId, briefingKey],
  );
  return rows.map(toSignOff);
}

/** One sign-off of the installation; notFound for any other id. */
export async function loadSignOff(
  manager: EntityManager,
  installationId: string,
  id: string,
): Promise<StoredSignOff> {
  const [row] = await manager.query<RawSignOff[]>(
    `SELECT ${SIGN_OFF_COLUMNS} FROM sign_off WHERE id = ? AND installation_id = ?`,
    [id, installationId],
  );
  if (!row) throw notFound();
  return toSignOff(row);
}

/** Who somebody is to the safety rules. */
export interface Signer {
  id: string;
  name: string;
  ageBand: string;
  ageConfirmed: boolean;
  duties: Duty[];
}

/** A person of the installation; notFound when unknown or removed. */
export async function loadSigner(
  manager: EntityManager,
  installationId: string,
  personId: string,
): Promise<Signer> {
  const [row] = await manager.query<
    {
      first_name: string;
      initial: string;
      age_band: string;
      duties: string;
      confirmed_at: number | null;
    }[]
  >(
    `SELECT first_name, initial, age_band, duties, confirmed_at FROM person
     WHERE id = ? AND installation_id = ? AND removed_at IS NULL`,
    [personId, installationId],
  );
  if (!row) throw notFound();
  return {
    id: personId,
    name: roomName(row.first_name, row.initial),
    ageBand: row.age_band,
    ageConfirmed: row.confirmed_at !== null,
    duties: JSON.parse(row.duties) as Duty[],
  };
}

/** First name and initial, as the room says it. */
export const roomName = (firstName: string, initial: string): string =>
  initial === '' ? firstName : `${firstName} ${initial}.`;

/** The room's name of somebody, removed or not, for words of a refusal. */
export async function nameOf(
  manager: EntityManager,
  installationId: string,
  personId: string,
): Promise<string> {
  const [row] = await manager.query<{ first_name: string; initial: string }[]>(
    'SELECT first_name, initial FROM person WHERE id = ? AND installation_id = ?',
    [personId, installationId],
  );
  return row ? roomName(row.first_name, row.initial) : 'somebody';
}

/** Person ids of all safety leads, and of those confirmed and on site now. */
export async function safetyLeads(
  manager: EntityManager,
  installationId: string,
): Promise<{ all: string[]; onSite: string[] }> {
  const rows = await manager.query<{ id: string; on_site: number }[]>(
    `SELECT id, confirmed_at IS NOT NULL AND left_at IS NULL AS on_site FROM person
     WHERE installation_id = ? AND removed_at IS NULL
       AND EXISTS (SELECT 1 FROM json_each(person.duties) WHERE json_each.value = 'safety lead')`,
    [installationId],
  );
  return {
    all: rows.map((row) => row.id),
    onSite: rows.filter((row) => row.on_site === 1).map((row) => row.id),
  };
}
