import { canonicalJson, type CanonicalValue } from './canonical';
import type { RandomBytes } from '../kernel/ids';

/** SHA-256 of a text's UTF-8 bytes, 64 small hexadecimal digits. A port: the server and the tests bring their own. */
export type Sha256 = (text: string) => string;

/** The two chained books. */
export type RegisterName = 'sign-offs' | 'accidents';

export const REGISTER_KINDS = [
  'signed',
  'countersigned',
  'revoked',
  'voided',
  'talked',
  'erased',
  'version-published',
] as const;
export type RegisterKind = (typeof REGISTER_KINDS)[number];

/** Personal fields stand outside the hash; only a salted commitment to them is in it. */
export type PersonalFields = Readonly<Record<string, string>>;

export interface RegisterRow {
  /** 1, 2, 3, without gaps. */
  seq: number;
  /** Ms since the epoch. */
  at: number;
  kind: string;
  /** Ids of the rows it is about; no names. */
  ids: Readonly<Record<string, string | number>>;
  commitment: string;
  prevHash: string;
  hash: string;
}

/** What stands beside a row and is deleted when the person is erased. */
export interface RegisterSecret {
  salt: string;
  personal: PersonalFields;
}

const SALT = /^[0-9a-f]{64}$/;

// Every hash begins with what it is a hash of, so that none can pass for another.
const domain = (what: string, text: string): string => `strutbee/register/${what}/1\n${text}`;

/**
 * A salt for one row: 256 random bits, so that an erased name cannot be found again by trying names.
 * @param bytes where the randomness comes from
 * @returns 64 small hexadecimal digits
 */
export const newSalt = (bytes: RandomBytes): string =>
  Array.from(bytes(32), (byte) => byte.toString(16).padStart(2, '0')).join('');

/**
 * What the first row of a book is chained to.
 * @param sha256 the hash function
 * @param register which book
 * @param installationId so that rows of one installation cannot stand in another's book
 * @returns 64 hexadecimal digits
 */
export const genesisHash = (sha256: Sha256, register: RegisterName, installationId: string): string =>
  sha256(domain('genesis', canonicalJson({ register, installationId })));

/**
 * The commitment to a row's personal fields.
 * @param sha256 the hash function
 * @param secret salt (64 hexadecimal digits) and fields
 * @returns 64 hexadecimal digits
 * @throws RangeError for a salt of another form, since only a fixed length keeps salt and fields apart
 */
export function commitmentOf(sha256: Sha256, secret: RegisterSecret): string {
  if (!SALT.test(secret.salt)) throw new RangeError('a salt is 64 small hexadecimal digits');
  return sha256(domain('commitment', `${secret.salt}\n${canonicalJson(secret.personal)}`));
}

function rowHash(sha256: Sha256, row: Omit<RegisterRow, 'hash'>): string {
  const { seq, at, kind, ids, commitment, prevHash } = row;
  const hashed: CanonicalValue = { seq, at, kind, ids, commitment, prevHash };
  return sha256(domain('row', canonicalJson(hashed)));
}

/**
 * The next row of a book, chained to the one before.
 * @param sha256 the hash function
 * @param genesis from `genesisHash`
 * @param head `seq` and `hash` of the last row; null for the first
 * @param entry time (ms), kind, ids, and the secret to commit to
 * @returns the row; the secret is stored beside it, never in it
 * @throws RangeError for a bad salt, TypeError for a time that is no integer
 * @source hash-linked records after Haber and Stornetta (1991); salted commitments so that erasure leaves the chain whole
 */
export function appendRow(
  sha256: Sha256,
  genesis: string,
  head: Pick<RegisterRow, 'seq' | 'hash'> | null,
  entry: { at: number; kind: RegisterKind; ids: RegisterRow['ids']; secret: RegisterSecret },
): RegisterRow {
  const unsealed = {
    seq: (head?.seq ?? 0) + 1,
    at: entry.at,
    kind: entry.kind,
    ids: entry.ids,
    commitment: commitmentOf(sha256, entry.secret),
    prevHash: head?.hash ?? genesis,
  };
  return { ...unsealed, hash: rowHash(sha256, unsealed) };
}

export type ChainFault =
  'altered row' | 'broken link' | 'missing row' | 'out of order' | 'truncated' | 'other head';

export type ChainResult =
  { ok: true; count: number; headHash: string } | { ok: false; seq: number; why: ChainFault };

/** What a printed extract says: how many rows the book had then, and the hash of the last (the genesis for none). */
export interface PrintedHead {
  count: number;
  headHash: string;
}

/**
 * Check a whole book, and against a printed extract also that nothing was cut off its end or rewritten as a whole.
 * @param sha256 the hash function
 * @param genesis from `genesisHash`
 * @param rows all rows in ascending order of seq
 * @param printed count and head hash of an extract; rows added since are fine
 * @returns count and head hash, or the first bad seq and why: `missing row` (seq is the one that is gone), `out of order`
 *   (a seq twice or backwards), `altered row` (its own hash does not fit), `broken link` (it does not follow the row before, so
 *   one of the two was replaced), `truncated` (seq is the first that is gone from the end), `other head` (the row with
 *   the printed number is not the printed one). Whatever a row holds, it is a fault and no exception.
 * @throws RangeError for a printed count that is no whole number from 0 on, since then nothing would be compared
 * @source as `appendRow`
 */
export function verifyChain(
  sha256: Sha256,
  genesis: string,
  rows: readonly RegisterRow[],
  printed?: PrintedHead,
): ChainResult {
  if (printed && (!Number.isSafeInteger(printed.count) || printed.count < 0)) {
    throw new RangeError('a printed count is a whole number from 0 on');
  }
  let previous = genesis;
  let seq = 0;
  for (const row of rows) {
    seq += 1;
    if (row.seq !== seq) return { ok: false, seq, why: row.seq > seq ? 'missing row' : 'out of order' };
    if (!sealed(sha256, row)) return { ok: false, seq, why: 'altered row' };
    if (row.prevHash !== previous) return { ok: false, seq, why: 'broken link' };
    previous = row.hash;
    if (seq === printed?.count && row.hash !== printed.headHash) return { ok: false, seq, why: 'other head' };
  }
  if (printed && rows.length < printed.count) return { ok: false, seq: rows.length + 1, why: 'truncated' };
  if (printed?.count === 0 && printed.headHash !== genesis) return { ok: false, seq: 0, why: 'other head' };
  return { ok: true, count: rows.length, headHash: previous };
}

function sealed(sha256: Sha256, row: RegisterRow): boolean {
  try {
    return rowHash(sha256, row) === row.hash;
  } catch {
    // A field that has no canonical text was never written by appendRow.
    return false;
  }
}

/**
 * Whether the personal fields beside a row are the ones that were committed to.
 * @param sha256 the hash function
 * @param row the row
 * @param secret salt and fields as stored; null after the person was erased
 * @returns `matches`, `altered`, or `erased`
 */
export function verifyCommitment(
  sha256: Sha256,
  row: Pick<RegisterRow, 'commitment'>,
  secret: RegisterSecret | null,
): 'matches' | 'altered' | 'erased' {
  if (secret === null) return 'erased';
  try {
    return commitmentOf(sha256, secret) === row.commitment ? 'matches' : 'altered';
  } catch {
    return 'altered';
  }
}

/**
 * Check a book with what stands beside its rows, as the command that verifies the register does.
 * @param sha256 the hash function
 * @param genesis from `genesisHash`
 * @param entries rows in ascending order of seq, each with its secret or null
 * @param printed count and head hash of an extract
 * @returns the chain's result, the seqs whose personal fields were altered, the seqs that were erased
 */
export function verifyRegister(
  sha256: Sha256,
  genesis: string,
  entries: readonly { row: RegisterRow; secret: RegisterSecret | null }[],
  printed?: PrintedHead,
): { chain: ChainResult; alteredPersonal: number[]; erased: number[] } {
  const chain = verifyChain(
    sha256,
    genesis,
    entries.map((entry) => entry.row),
    printed,
  );
  const having = (wanted: ReturnType<typeof verifyCommitment>) =>
    entries
      .filter(({ row, secret }) => verifyCommitment(sha256, row, secret) === wanted)
      .map(({ row }) => row.seq);
  return { chain, alteredPersonal: having('altered'), erased: having('erased') };
}
