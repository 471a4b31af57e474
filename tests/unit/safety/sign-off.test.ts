import { describe, expect, it } from 'vitest';
import {
  bestSignOff,
  sheetFor,
  signOffProgress,
  signOffValidity,
  talkNeeded,
  type SignOff,
  type SignOffContext,
  type VersionFacts,
} from '../../../shared/safety';
import { BLANK, DAY, FIRST, MINUTE, signOff, T0 } from './fixtures';

const NOW = T0 + 60 * MINUTE;
const context = (changes: Partial<SignOffContext> = {}): SignOffContext => ({
  versions: [FIRST],
  now: NOW,
  ageConfirmed: true,
  ...changes,
});
const CHANGE: VersionFacts = { version: 2, kind: 'change', effectiveFrom: NOW };
const CORRECTION: VersionFacts = { version: 2, kind: 'correction', effectiveFrom: T0 + 5 * MINUTE };
const missed = (...wrongIds: string[]) => ({ at: T0 + MINUTE, wrongIds });

describe('signOffValidity', () => {
  const cases: [string, SignOff | null, Partial<SignOffContext>, string][] = [
    ['everything done', signOff(), {}, 'valid'],
    ['no record', null, {}, 'NOT_READ'],
    ['opened, not answered', signOff(BLANK), {}, 'NOT_READ'],
    ['one wrong answer', signOff({ ...BLANK, attempts: [missed('a')] }), {}, 'NOT_PASSED'],
    [
      'different questions missed',
      signOff({ ...BLANK, attempts: [missed('a'), missed('b')] }),
      {},
      'NOT_PASSED',
    ],
    [
      'one question missed twice',
      signOff({ ...BLANK, attempts: [missed('a'), missed('a')] }),
      {},
      'TALK_NEEDED',
    ],
    [
      'passed after two misses, no talk',
      signOff({ attempts: [missed('a'), missed('a'), missed()] }),
      {},
      'TALK_NEEDED',
    ],
    [
      'passed after two misses and a talk',
      signOff({ attempts: [missed('a'), missed('a')], talkBy: 'lena', talkAt: T0 + MINUTE }),
      {},
      'valid',
    ],
    ['not signed', signOff({ ...BLANK, attempts: [missed()], passedAt: T0 }), {}, 'NOT_SIGNED'],
    [
      'not countersigned',
      signOff({ ...BLANK, attempts: [missed()], passedAt: T0, signedAt: T0 }),
      {},
      'NOT_COUNTERSIGNED',
    ],
    ['countersigned by the signer', signOff({ countersignedBy: 'ada' }), {}, 'NOT_COUNTERSIGNED'],
    ['countersigned in no capacity', signOff({ countersignedAs: null }), {}, 'NOT_COUNTERSIGNED'],
    ['the last instant before its end', signOff({ expiresAt: NOW + 1 }), {}, 'valid'],
    ['its end has come', signOff({ expiresAt: NOW }), {}, 'EXPIRED'],
    ['countersigned without an end', signOff({ expiresAt: null }), {}, 'EXPIRED'],
    ['revoked', signOff({ revokedAt: NOW - 1, revokedBy: 'lena', revokeReason: 'unsafe' }), {}, 'REVOKED'],
    ['a version that was never published', signOff({ version: 9 }), {}, 'NOT_READ'],
    ['age band not confirmed', signOff(), { ageConfirmed: false }, 'AGE_NOT_CONFIRMED'],
    ['a change came into force', signOff(), { versions: [FIRST, CHANGE] }, 'VOIDED_BY_CHANGE'],
    ['a correction came into force', signOff(), { versions: [FIRST, CORRECTION] }, 'valid'],
    ['a change one instant ahead', signOff(), { versions: [FIRST, CHANGE], now: NOW - 1 }, 'valid'],
    ['signed on the changed version', signOff({ version: 2 }), { versions: [FIRST, CHANGE] }, 'valid'],
    [
      'a correction after a change',
      signOff(),
      { versions: [FIRST, CHANGE, { version: 3, kind: 'correction', effectiveFrom: NOW }] },
      'VOIDED_BY_CHANGE',
    ],
  ];
  it.each(cases.map(([name, record, changes, expected]) => [name, expected, record, changes] as const))(
    'signOffValidity > %s > %s',
    (_name, expected, record, changes) => {
      expect(signOffValidity(record, context(changes))).toBe(expected);
    },
  );

  it('signOffValidity > briefing changed from 09:00, asked a minute before and at 09:00 > holds, then is void', () => {
    const versions = [FIRST, CHANGE];
    expect(signOffValidity(signOff(), context({ versions, now: NOW - MINUTE }))).toBe('valid');
    expect(signOffValidity(signOff(), context({ versions, now: NOW }))).toBe('VOIDED_BY_CHANGE');
  });
});

describe('talkNeeded', () => {
  it('talkNeeded > two more misses after the talk > a second talk is due', () => {
    const at = (minute: number, ...wrongIds: string[]) => ({ at: T0 + minute * MINUTE, wrongIds });
    const attempts = [at(1, 'a'), at(2, 'a'), at(5, 'a')];
    expect(talkNeeded({ attempts, talkAt: T0 + 3 * MINUTE })).toEqual([]);
    expect(talkNeeded({ attempts: [...attempts, at(6, 'a')], talkAt: T0 + 3 * MINUTE })).toEqual(['a']);
  });
});

describe('bestSignOff', () => {
  const revoked = signOff({
    id: 'so-2',
    version: 2,
    signedAt: T0 + 10 * MINUTE,
    revokedAt: T0 + 20 * MINUTE,
  });

  it('bestSignOff > a newer one was revoked, an older one stands > the older one cannot stand in', () => {
    expect(bestSignOff([signOff(), revoked], context({ versions: [FIRST, CORRECTION] })).validity).toBe(
      'REVOKED',
    );
  });

  it('bestSignOff > signed again after the revocation > counts', () => {
    const again = signOff({ id: 'so-3', version: 2, signedAt: T0 + 21 * MINUTE });
    const best = bestSignOff([again, revoked, signOff()], context({ versions: [FIRST, CORRECTION] }));
    expect(best).toEqual({ signOff: again, validity: 'valid' });
  });

  it('bestSignOff > void, and the new version half done > names the next step of the new one', () => {
    const half = signOff({ ...BLANK, id: 'so-2', version: 2, attempts: [missed()], passedAt: NOW });
    expect(bestSignOff([signOff(), half], context({ versions: [FIRST, CHANGE] })).validity).toBe(
      'NOT_SIGNED',
    );
  });
});

describe('signOffProgress', () => {
  const states = (record: SignOff | null, changes: Partial<SignOffContext> = {}) =>
    signOffProgress(record, context(changes)).steps.map((step) => step.state);

  it('signOffProgress > each stage > passed up to there, one in hand, the rest waiting', () => {
    expect(states(null)).toEqual(['in hand', 'waiting', 'waiting', 'waiting']);
    expect(states(signOff({ ...BLANK, attempts: [missed('a')] }))).toEqual([
      'passed',
      'in hand',
      'waiting',
      'waiting',
    ]);
    expect(states(signOff({ ...BLANK, passedAt: T0 }))).toEqual(['passed', 'passed', 'in hand', 'waiting']);
    expect(states(signOff({ ...BLANK, passedAt: T0, signedAt: T0 }))).toEqual([
      'passed',
      'passed',
      'passed',
      'in hand',
    ]);
    expect(states(signOff())).toEqual(['passed', 'passed', 'passed', 'passed']);
  });

  it('signOffProgress > voided by a change > all four start again', () => {
    expect(states(signOff(), { versions: [FIRST, CHANGE] })).toEqual([
      'in hand',
      'waiting',
      'waiting',
      'waiting',
    ]);
  });
});

describe('sheetFor', () => {
  const versions = [FIRST, CHANGE];

  it('sheetFor > a complete sign-off ended by a change > the short sheet since the signed version', () => {
    expect(sheetFor([signOff()], versions, NOW)).toEqual({
      version: CHANGE,
      sheet: 'what changed',
      since: 1,
    });
  });

  it('sheetFor > newcomer, unfinished, expired or revoked > the whole sheet', () => {
    const whole = { version: CHANGE, sheet: 'whole', since: null };
    expect(sheetFor([], versions, NOW)).toEqual(whole);
    expect(sheetFor([signOff({ signedAt: null })], versions, NOW)).toEqual(whole);
    expect(sheetFor([signOff({ expiresAt: NOW })], versions, NOW)).toEqual(whole);
    expect(sheetFor([signOff({ revokedAt: NOW - DAY })], versions, NOW)).toEqual(whole);
  });

  it('sheetFor > an older one complete, a newer one revoked > the whole sheet', () => {
    const later: VersionFacts = { version: 3, kind: 'change', effectiveFrom: NOW };
    const revoked = signOff({ id: 'so-2', version: 2, revokedAt: T0 + 20 * MINUTE });
    const all = [FIRST, CORRECTION, later];
    expect(sheetFor([signOff()], all, NOW)).toMatchObject({ sheet: 'what changed', since: 1 });
    expect(sheetFor([signOff(), revoked], all, NOW)).toEqual({ version: later, sheet: 'whole', since: null });
  });

  it('sheetFor > before the change > the first version; before the first > nothing', () => {
    expect(sheetFor([], versions, NOW - 1)?.version).toBe(FIRST);
    expect(sheetFor([], versions, T0 - 1)).toBeNull();
  });
});
