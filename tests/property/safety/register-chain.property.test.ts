import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  appendRow,
  genesisHash,
  REGISTER_KINDS,
  verifyChain,
  verifyCommitment,
  verifyRegister,
  type RegisterRow,
  type RegisterSecret,
  type Sha256,
} from '../../../shared/safety';

const sha256: Sha256 = (text) => createHash('sha256').update(text, 'utf8').digest('hex');
const GENESIS = genesisHash(sha256, 'sign-offs', 'canopy');

const hex64 = fc
  .uint8Array({ minLength: 32, maxLength: 32 })
  .map((bytes) => Buffer.from(bytes).toString('hex'));
const fields = fc.dictionary(fc.string(), fc.string({ unit: 'binary' }), { maxKeys: 4 });
const entry = fc.record({
  at: fc.integer({ min: 0, max: 4_102_444_800_000 }),
  kind: fc.constantFrom(...REGISTER_KINDS),
  ids: fc.dictionary(fc.string(), fc.oneof(fc.string(), fc.integer()), { minKeys: 1, maxKeys: 4 }),
  secret: fc.record({ salt: hex64, personal: fields }),
});
interface Entry {
  row: RegisterRow;
  secret: RegisterSecret | null;
}
const book = fc.array(entry, { minLength: 1, maxLength: 12 }).map((list) =>
  list.reduce<Entry[]>((entries, one) => {
    const row = appendRow(sha256, GENESIS, entries.at(-1)?.row ?? null, one);
    return [...entries, { row, secret: one.secret }];
  }, []),
);
const rowsOf = (entries: readonly Entry[]) => entries.map((one) => one.row);
const same = (a: unknown, b: unknown) => JSON.stringify(a) === JSON.stringify(b);

/** Changes of exactly one field of a row. */
const mutation: fc.Arbitrary<(row: RegisterRow) => RegisterRow> = fc.oneof(
  fc.integer().map((value) => (row: RegisterRow) => ({ ...row, seq: value })),
  fc.oneof(fc.integer(), fc.double()).map((value) => (row: RegisterRow) => ({ ...row, at: value })),
  fc
    .oneof(fc.string(), fc.constantFrom(...REGISTER_KINDS))
    .map((value) => (row: RegisterRow) => ({ ...row, kind: value })),
  fc.string().map((key) => (row: RegisterRow) => ({ ...row, ids: { ...row.ids, [`${key}+`]: 1 } })),
  fc.constant((row: RegisterRow) => ({ ...row, ids: Object.fromEntries(Object.entries(row.ids).slice(1)) })),
  fc.string().map((value) => (row: RegisterRow) => ({
    ...row,
    ids: Object.fromEntries(
      Object.entries(row.ids).map(([key, id], index) => [key, index === 0 ? value : id]),
    ),
  })),
  fc.constant((row: RegisterRow) => ({
    ...row,
    ids: Object.fromEntries(
      Object.entries(row.ids).map(([key, id]) => [key, typeof id === 'number' ? String(id) : id]),
    ),
  })),
  hex64.map((value) => (row: RegisterRow) => ({ ...row, commitment: value })),
  hex64.map((value) => (row: RegisterRow) => ({ ...row, prevHash: value })),
  hex64.map((value) => (row: RegisterRow) => ({ ...row, hash: value })),
);

describe('register chain', () => {
  it('verifyChain > any single field of any row changed > found at that row', () => {
    fc.assert(
      fc.property(book, fc.nat(), mutation, (entries, pick, mutate) => {
        const rows = rowsOf(entries);
        const index = pick % rows.length;
        const row = rows[index];
        if (!row) return;
        const changed = mutate(row);
        // -0 and keys in another order are the same record.
        fc.pre(!same(changed, row));
        const result = verifyChain(sha256, GENESIS, rows.with(index, changed));
        expect(result).toMatchObject({ ok: false, seq: index + 1 });
      }),
      { numRuns: 500 },
    );
  });

  it('verifyChain > untouched, against every extract printed on the way > ok', () => {
    fc.assert(
      fc.property(book, fc.nat(), (entries, pick) => {
        const rows = rowsOf(entries);
        const count = pick % (rows.length + 1);
        const printed = { count, headHash: rows[count - 1]?.hash ?? GENESIS };
        expect(verifyChain(sha256, GENESIS, rows, printed)).toMatchObject({ ok: true, count: rows.length });
      }),
    );
  });

  it('verifyChain > any rows deleted or moved > found against the printed head', () => {
    fc.assert(
      fc.property(
        book.chain((entries) => fc.tuple(fc.constant(entries), fc.shuffledSubarray(rowsOf(entries)))),
        ([entries, kept]) => {
          const rows = rowsOf(entries);
          fc.pre(!same(kept, rows));
          const printed = { count: rows.length, headHash: rows.at(-1)?.hash ?? GENESIS };
          expect(verifyChain(sha256, GENESIS, kept, printed).ok).toBe(false);
        },
      ),
    );
  });

  it('verifyRegister > any set of people erased > the chain verifies and exactly those rows are erased', () => {
    fc.assert(
      fc.property(book, fc.array(fc.boolean(), { minLength: 12, maxLength: 12 }), (entries, erase) => {
        const left = entries.map((one, index) => (erase[index] ? { ...one, secret: null } : one));
        const wanted = left.filter((one) => one.secret === null).map((one) => one.row.seq);
        const result = verifyRegister(sha256, GENESIS, left);
        expect(result).toMatchObject({ chain: { ok: true }, alteredPersonal: [], erased: wanted });
      }),
    );
  });

  it('verifyCommitment > personal fields other than the committed ones > altered', () => {
    fc.assert(
      fc.property(entry, fields, (one, other) => {
        const row = appendRow(sha256, GENESIS, null, one);
        const sorted = (record: Record<string, string>) =>
          Object.entries(record).sort(([a], [b]) => (a < b ? -1 : 1));
        fc.pre(!same(sorted(one.secret.personal), sorted(other)));
        expect(verifyCommitment(sha256, row, one.secret)).toBe('matches');
        expect(verifyCommitment(sha256, row, { ...one.secret, personal: other })).toBe('altered');
      }),
    );
  });
});
