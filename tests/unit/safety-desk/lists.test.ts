import { describe, expect, it } from 'vitest';
import { DEFAULT_AGE_RULES } from '../../../shared/safety';
import { allowedWords } from '../../../src/features/safety-desk/desk-words';
import { questionsRight, signOffLists } from '../../../src/features/safety-desk/sign-off-lists';
import { briefingRecord, NOW, personRecord, signOffRecord } from '../board/fixtures';

const open = {
  countersignedBy: null,
  countersignedAt: null,
  countersignedAs: null,
  expiresAt: null,
} as const;
const ids = (lines: readonly { signOff: { id: string } }[]) => lines.map(({ signOff }) => signOff.id);
const AHEAD = [
  { version: 1, kind: 'first' as const, effectiveFrom: NOW - 86_400_000, whatChanged: null },
  { version: 2, kind: 'change' as const, effectiveFrom: NOW + 3_600_000, whatChanged: 'Clips.' },
];

describe('signOffLists', () => {
  it('signOffLists > signed off, and the next version signed ahead > in force and waiting, both', () => {
    const lists = signOffLists(
      [personRecord({})],
      [signOffRecord({ id: 'old' }), signOffRecord({ id: 'ahead', version: 2, ...open })],
      [briefingRecord({ versions: AHEAD })],
      NOW,
    );
    expect(ids(lists.signedOff)).toEqual(['old']);
    expect(ids(lists.waiting)).toEqual(['ahead']);
  });

  it('signOffLists > signed before a revocation > waits for nothing, goes through it again', () => {
    const lists = signOffLists(
      [personRecord({})],
      [
        signOffRecord({ id: 'before', signedAt: NOW - 5000, ...open }),
        signOffRecord({ id: 'revoked', signedAt: NOW - 9000, revokedAt: NOW - 1000, revokedBy: 'lena' }),
      ],
      [briefingRecord({})],
      NOW,
    );
    expect(lists.waiting).toEqual([]);
    expect(lists.notYet.map(({ validity }) => validity)).toEqual(['REVOKED']);
  });

  it('signOffLists > a change came into force > no longer signed off, before it nobody is touched', () => {
    const at = (now: number) =>
      signOffLists([personRecord({})], [signOffRecord({})], [briefingRecord({ versions: AHEAD })], now);
    expect(ids(at(NOW + 3_599_999).signedOff)).toEqual(['so1']);
    expect(at(NOW + 3_600_000).signedOff).toEqual([]);
    expect(at(NOW + 3_600_000).notYet.map(({ validity }) => validity)).toEqual(['VOIDED_BY_CHANGE']);
  });

  it('signOffLists > on site without a sheet, at the door, removed > only who is on site has not begun', () => {
    const people = [
      personRecord({ id: 'in', name: 'Tam W' }),
      personRecord({ id: 'door', onSite: false, confirmed: false }),
      personRecord({ id: 'gone', removed: true }),
    ];
    const lists = signOffLists(people, [], [briefingRecord({})], NOW);
    expect(lists.notBegun.map((one) => one.people.map(({ name }) => name))).toEqual([['Tam W']]);
  });
});

describe('questionsRight', () => {
  it('questionsRight > two tries > the last one counts; before the first there is no figure', () => {
    const attempts = [
      { at: 1, wrongIds: ['a', 'b', 'c'] },
      { at: 2, wrongIds: ['a'] },
    ];
    expect(questionsRight({ attempts }, 5)).toBe(4);
    expect(questionsRight({ attempts: [] }, 5)).toBeNull();
  });
});

describe('allowedWords', () => {
  it.each([
    ['18+', 'any gun', false],
    ['16-17', 'any gun, beside Mei T', false],
    ['13-15', 'low-temperature gun only, beside Mei T', false],
    ['9-12', 'low-temperature gun only, watched by Mei T all the time', false],
    ['under-9', 'no gun at this age', true],
  ] as const)('allowedWords > hot glue at %s > %s', (band, words, nothing) => {
    expect(allowedWords(DEFAULT_AGE_RULES, band, ['hot-glue'], 'Mei T')).toEqual({ words, nothing });
  });

  it('allowedWords > cutting and ladder for a minor without a named adult > the milder ones, beside their adult', () => {
    expect(allowedWords(DEFAULT_AGE_RULES, '16-17', ['cutting', 'ladder'], null).words).toBe(
      'hand saw only, low ladders only, beside their adult',
    );
  });
});
