import { createHash } from 'node:crypto';
import type { RegisterSecret, Sha256, SignOff, VersionFacts } from '../../../shared/safety';

/** The port as the tests bring it; checked against FIPS 180-4 in the reference tests. */
export const sha256: Sha256 = (text) => createHash('sha256').update(text, 'utf8').digest('hex');

export const T0 = Date.UTC(2031, 5, 14, 8, 0, 0);
export const MINUTE = 60_000;
export const DAY = 86_400_000;

export const secretOf = (name: string, digit = '0'): RegisterSecret => ({
  salt: digit.repeat(64),
  personal: { name },
});

/** Complete, countersigned by another, one year long, on version 1. */
export const signOff = (changes: Partial<SignOff> = {}): SignOff => ({
  id: 'so-1',
  personId: 'ada',
  briefingKey: 'hot-glue',
  version: 1,
  attempts: [{ at: T0 + MINUTE, wrongIds: [] }],
  talkBy: null,
  talkAt: null,
  passedAt: T0 + MINUTE,
  signedAt: T0 + 2 * MINUTE,
  countersignedBy: 'lena',
  countersignedAt: T0 + 3 * MINUTE,
  countersignedAs: 'safety lead',
  expiresAt: T0 + 3 * MINUTE + 365 * DAY,
  revokedAt: null,
  revokedBy: null,
  revokeReason: null,
  ...changes,
});

/** What a person has before anything is done. */
export const BLANK: Partial<SignOff> = {
  attempts: [],
  passedAt: null,
  signedAt: null,
  countersignedBy: null,
  countersignedAt: null,
  countersignedAs: null,
  expiresAt: null,
};

export const FIRST: VersionFacts = { version: 1, kind: 'first', effectiveFrom: T0 };
