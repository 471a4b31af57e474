import { describe, expect, it } from 'vitest';
import {
  appendRow,
  commitmentOf,
  genesisHash,
  newSalt,
  verifyChain,
  verifyCommitment,
  verifyRegister,
  type RegisterRow,
  type RegisterSecret,
} from '../../../shared/safety';
import { secretOf, sha256, T0 } from './fixtures';

const GENESIS = genesisHash(sha256, 'sign-offs', 'canopy');

/** A book of some rows, each with its secret. */
function book(count: number, genesis = GENESIS): { row: RegisterRow; secret: RegisterSecret | null }[] {
  const entries: { row: RegisterRow; secret: RegisterSecret | null }[] = [];
  for (let index = 0; index < count; index += 1) {
    const secret = secretOf(`Person ${index}`, (index % 16).toString(16));
    const head = entries.at(-1)?.row ?? null;
    const kind = index % 2 === 0 ? 'signed' : 'countersigned';
    const row = appendRow(sha256, genesis, head, {
      at: T0 + index,
      kind,
      ids: { signOff: `so-${index}` },
      secret,
    });
    entries.push({ row, secret });
  }
  return entries;
}
const rowsOf = (count: number) => book(count).map((entry) => entry.row);
const at = (rows: readonly RegisterRow[], index: number): RegisterRow => {
  const row = rows[index];
  if (!row) throw new Error(`no row ${index}`);
  return row;
};

describe('verifyChain', () => {
  it('verifyChain > untouched book > ok with count and head hash; the empty book ends at its genesis', () => {
    const rows = rowsOf(40);
    expect(verifyChain(sha256, GENESIS, rows)).toEqual({ ok: true, count: 40, headHash: at(rows, 39).hash });
    expect(verifyChain(sha256, GENESIS, [])).toEqual({ ok: true, count: 0, headHash: GENESIS });
  });

  it('verifyChain > last ten rows deleted > unseen by the chain alone, found against the printed head hash', () => {
    const rows = rowsOf(40);
    const printed = { count: 40, headHash: at(rows, 39).hash };
    const cut = rows.slice(0, 30);
    expect(verifyChain(sha256, GENESIS, cut).ok).toBe(true);
    expect(verifyChain(sha256, GENESIS, cut, printed)).toEqual({ ok: false, seq: 31, why: 'truncated' });
  });

  it('verifyChain > last ten rows deleted and ten forged in their place > not the printed head', () => {
    const rows = rowsOf(40);
    const printed = { count: 40, headHash: at(rows, 39).hash };
    const forged = rows.slice(0, 30);
    while (forged.length < 40) {
      forged.push(
        appendRow(sha256, GENESIS, at(forged, forged.length - 1), {
          at: T0,
          kind: 'signed',
          ids: { signOff: 'forged' },
          secret: secretOf('Nobody'),
        }),
      );
    }
    expect(verifyChain(sha256, GENESIS, forged).ok).toBe(true);
    expect(verifyChain(sha256, GENESIS, forged, printed)).toEqual({ ok: false, seq: 40, why: 'other head' });
  });

  it('verifyChain > printed earlier, rows added since > ok', () => {
    const rows = rowsOf(40);
    expect(verifyChain(sha256, GENESIS, rows, { count: 12, headHash: at(rows, 11).hash })).toMatchObject({
      ok: true,
      count: 40,
    });
    expect(verifyChain(sha256, GENESIS, rows, { count: 0, headHash: GENESIS }).ok).toBe(true);
    expect(verifyChain(sha256, GENESIS, rows, { count: 0, headHash: 'other' })).toMatchObject({
      ok: false,
      why: 'other head',
    });
    expect(() => verifyChain(sha256, GENESIS, rows, { count: 1.5, headHash: '' })).toThrow(RangeError);
  });

  it('verifyChain > one row taken out, doubled, swapped > names the first bad seq', () => {
    const rows = rowsOf(6);
    expect(verifyChain(sha256, GENESIS, rows.toSpliced(2, 1))).toEqual({
      ok: false,
      seq: 3,
      why: 'missing row',
    });
    expect(verifyChain(sha256, GENESIS, rows.slice(1))).toEqual({ ok: false, seq: 1, why: 'missing row' });
    expect(verifyChain(sha256, GENESIS, rows.toSpliced(2, 0, at(rows, 1)))).toEqual({
      ok: false,
      seq: 3,
      why: 'out of order',
    });
    expect(verifyChain(sha256, GENESIS, rows.toSpliced(1, 2, at(rows, 2), at(rows, 1)))).toMatchObject({
      ok: false,
      seq: 2,
    });
  });

  it('verifyChain > a row replaced and sealed anew > the next row no longer follows it', () => {
    const rows = rowsOf(6);
    const replaced = appendRow(sha256, GENESIS, at(rows, 1), {
      at: T0,
      kind: 'signed',
      ids: { signOff: 'other' },
      secret: secretOf('Other'),
    });
    expect(verifyChain(sha256, GENESIS, rows.with(2, replaced))).toEqual({
      ok: false,
      seq: 4,
      why: 'broken link',
    });
  });

  it('verifyChain > a book of another installation or the other book > broken at its first row', () => {
    for (const other of [
      genesisHash(sha256, 'sign-offs', 'lantern'),
      genesisHash(sha256, 'accidents', 'canopy'),
    ]) {
      expect(verifyChain(sha256, other, rowsOf(3))).toEqual({ ok: false, seq: 1, why: 'broken link' });
    }
  });

  it('verifyChain > a field that nothing could have written > altered row, no exception', () => {
    const rows = rowsOf(3);
    const broken = { ...at(rows, 1), at: 1.5 };
    expect(verifyChain(sha256, GENESIS, rows.with(1, broken))).toEqual({
      ok: false,
      seq: 2,
      why: 'altered row',
    });
  });
});

describe('erasing a person', () => {
  it('verifyRegister > salt and fields of some rows deleted > the chain verifies, the rows count as erased', () => {
    const entries = book(20).map((entry, index) => (index % 5 === 0 ? { ...entry, secret: null } : entry));
    const head = { count: 20, headHash: at(rowsOf(20), 19).hash };
    expect(verifyRegister(sha256, GENESIS, entries, head)).toEqual({
      chain: { ok: true, ...head },
      alteredPersonal: [],
      erased: [1, 6, 11, 16],
    });
  });

  it('verifyRegister > a name swapped beside an untouched row > that row is named', () => {
    const entries = book(4).map((entry, index) =>
      index === 2 ? { ...entry, secret: secretOf('Somebody', '2') } : entry,
    );
    expect(verifyRegister(sha256, GENESIS, entries)).toMatchObject({
      chain: { ok: true },
      alteredPersonal: [3],
    });
  });
});

describe('commitments', () => {
  it('commitmentOf > same name, other salt > another commitment, so that equal names do not show', () => {
    expect(commitmentOf(sha256, secretOf('Ada', '1'))).not.toBe(commitmentOf(sha256, secretOf('Ada', '2')));
  });

  it('commitmentOf > a salt of another form > throws; verifying one reports it as altered', () => {
    const bad = { salt: 'abc', personal: {} };
    expect(() => commitmentOf(sha256, bad)).toThrow(RangeError);
    expect(verifyCommitment(sha256, at(rowsOf(1), 0), bad)).toBe('altered');
  });

  it('newSalt > 32 bytes > 64 hexadecimal digits with leading noughts', () => {
    expect(newSalt((length) => new Uint8Array(length).fill(10))).toBe('0a'.repeat(32));
  });

  it('hash domains > one text under each domain > never the same hash', () => {
    const seen = new Set<string>();
    const spy = (text: string) => {
      seen.add(text.split('\n')[0] ?? '');
      return sha256(text);
    };
    const genesis = genesisHash(spy, 'sign-offs', 'canopy');
    appendRow(spy, genesis, null, { at: T0, kind: 'signed', ids: {}, secret: secretOf('Ada') });
    expect([...seen].sort()).toEqual([
      'strutbee/register/commitment/1',
      'strutbee/register/genesis/1',
      'strutbee/register/row/1',
    ]);
  });
});
