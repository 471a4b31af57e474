import type Database from 'better-sqlite3';
import type { RegisterRowView, RegisterView } from '../../../shared/contracts/safety';
import {
  genesisHash,
  verifyRegister,
  type PersonalFields,
  type PrintedHead,
  type RegisterRow,
  type RegisterSecret,
} from '../../../shared/safety';
import { prepared } from '../../realtime/live-source';
import { sha256 } from './register.service';

interface RawRow {
  seq: number;
  at: number;
  kind: string;
  ids: string;
  commitment: string;
  prev_hash: string;
  hash: string;
  salt: string | null;
  personal: string | null;
  person_id: string | null;
}

interface Entry {
  row: RegisterRow;
  secret: RegisterSecret | null;
  personId: string | null;
}

/** A stored JSON object, or null for text that is none: somebody may have been at the file. */
function parsed<T>(json: string | null): T | null {
  if (json === null) return null;
  try {
    return JSON.parse(json) as T;
  } catch {
    return null;
  }
}

function readEntries(db: Database.Database, installationId: string): Entry[] {
  const rows = prepared<RawRow>(
    db,
    `SELECT seq, at, kind, ids, commitment, prev_hash, hash, salt, personal, person_id FROM register_row
     WHERE installation_id = ? ORDER BY seq`,
  ).all(installationId);
  return rows.map((row) => ({
    row: {
      seq: row.seq,
      at: row.at,
      kind: row.kind,
      ids: parsed<Record<string, string | number>>(row.ids) ?? {},
      commitment: row.commitment,
      prevHash: row.prev_hash,
      hash: row.hash,
    },
    secret: secretOf(row),
    personId: row.person_id,
  }));
}

function secretOf({ salt, personal }: RawRow): RegisterSecret | null {
  if (salt === null && personal === null) return null;
  // One of the two gone is no erasure: the empty half makes the commitment fail.
  return { salt: salt ?? '', personal: parsed<PersonalFields>(personal) ?? {} };
}

/** First fault of a register: of the chain, then of the fields beside it. */
function check(
  installationId: string,
  entries: readonly Entry[],
  printed?: PrintedHead,
): RegisterView['verified'] {
  const genesis = genesisHash(sha256, 'sign-offs', installationId);
  const { chain, alteredPersonal, erased } = verifyRegister(sha256, genesis, entries, printed);
  if (!chain.ok) return { ok: false, seq: chain.seq, why: chain.why };
  const [altered] = alteredPersonal;
  if (altered !== undefined) return { ok: false, seq: altered, why: 'altered personal fields' };
  const gone = new Set(
    entries.filter((entry) => entry.row.kind === 'erased').map((entry) => entry.row.ids.personId),
  );
  const unexplained = entries.find(
    ({ row, personId }) => erased.includes(row.seq) && (personId === null || !gone.has(personId)),
  );
  if (unexplained) return { ok: false, seq: unexplained.row.seq, why: 'personal fields removed' };
  return { ok: true };
}

/** The register of an installation as leads see it, checked. */
export function readRegister(
  db: Database.Database,
  installationId: string,
  printed?: PrintedHead,
): RegisterView {
  const entries = readEntries(db, installationId);
  const head = entries.at(-1)?.row.hash ?? genesisHash(sha256, 'sign-offs', installationId);
  return {
    rows: entries.map(({ row, secret }): RegisterRowView => ({
      seq: row.seq,
      at: row.at,
      kind: row.kind,
      ids: row.ids,
      hash: row.hash,
      personal: secret ? { ...secret.personal } : null,
    })),
    count: entries.length,
    headHash: head,
    verified: check(installationId, entries, printed),
  };
}

/** Installations that have a register, or had one; with their names where the row is still there. */
export const registeredInstallations = (db: Database.Database): { id: string; name: string | null }[] =>
  prepared<{ id: string; name: string | null }>(
    db,
    `SELECT ids.id, installation.name FROM (SELECT id FROM installation UNION SELECT installation_id FROM register_row) AS ids
     LEFT JOIN installation ON installation.id = ids.id ORDER BY ids.id`,
  ).all();
