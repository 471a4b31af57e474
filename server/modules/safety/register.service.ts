import { createHash } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import {
  appendRow,
  genesisHash,
  newSalt,
  type PersonalFields,
  type RegisterKind,
  type Sha256,
} from '../../../shared/safety';
import type { WriteScope } from '../../db/write';
import { RegisterRow } from './safety.entity';

/** The port that the chain is sealed with. */
export const sha256: Sha256 = (text) => createHash('sha256').update(text, 'utf8').digest('hex');

const randomBytes = (length: number) => globalThis.crypto.getRandomValues(new Uint8Array(length));

/** What becomes a row of the register. */
interface RegisterEntry {
  kind: RegisterKind;
  /** Ids and numbers; they are sealed for good, so nothing personal may stand here. */
  ids: Record<string, string | number>;
  /** Whose personal fields stand beside it, and go when that person is erased. */
  personId: string | null;
  personal: PersonalFields;
}

async function headOf(
  manager: EntityManager,
  installationId: string,
): Promise<{ seq: number; hash: string } | null> {
  const rows = await manager.query<{ seq: number; hash: string }[]>(
    'SELECT seq, hash FROM register_row WHERE installation_id = ? ORDER BY seq DESC LIMIT 1',
    [installationId],
  );
  return rows[0] ?? null;
}

/** Append one row to the sign-off register, in the transaction of what it records. */
export async function appendToRegister(
  scope: Pick<WriteScope, 'manager' | 'now'>,
  installationId: string,
  entry: RegisterEntry,
): Promise<void> {
  const secret = { salt: newSalt(randomBytes), personal: entry.personal };
  const row = appendRow(
    sha256,
    genesisHash(sha256, 'sign-offs', installationId),
    await headOf(scope.manager, installationId),
    { at: scope.now, kind: entry.kind, ids: entry.ids, secret },
  );
  await scope.manager.insert(RegisterRow, {
    installationId,
    ...row,
    ids: entry.ids,
    salt: secret.salt,
    personal: { ...secret.personal },
    personId: entry.personId,
  });
}

/**
 * Forget what the register and the sign-offs know of a person beyond the id: salts, personal fields, signatures and
 * reasons of revocation. The chain still verifies, and says that the person was erased.
 */
export async function erasePersonFromRegister(
  scope: WriteScope,
  installationId: string,
  personId: string,
): Promise<void> {
  const { manager } = scope;
  await manager.query(
    'UPDATE register_row SET salt = NULL, personal = NULL WHERE installation_id = ? AND person_id = ?',
    [installationId, personId],
  );
  const touched = await manager.query<{ id: string }[]>(
    `UPDATE sign_off SET signature = NULL, revoke_reason = NULL, revision = ?
     WHERE installation_id = ? AND person_id = ? RETURNING id`,
    [await scope.revision(), installationId, personId],
  );
  for (const { id } of touched) scope.changed('signOffs', id);
  await appendToRegister(scope, installationId, {
    kind: 'erased',
    ids: { personId },
    personId: null,
    personal: {},
  });
}
