import { describe, expect, it } from 'vitest';
import { mayCountersign, type SignOff } from '../../../shared/safety';
import type { Duty } from '../../../shared/accounts';
import { FIRST, MINUTE, signOff, T0 } from './fixtures';

const SIGNED: Partial<SignOff> = {
  countersignedBy: null,
  countersignedAt: null,
  countersignedAs: null,
  expiresAt: null,
};
const signed = (changes: Partial<SignOff> = {}) => signOff({ ...SIGNED, ...changes });
const person = (personId: string, ...duties: Duty[]) => ({ personId, duties });

describe('mayCountersign', () => {
  it('mayCountersign > another person who is safety lead > may, nothing special to log', () => {
    expect(
      mayCountersign({ lead: person('lena', 'safety lead'), signOff: signed(), safetyLeadsOnSite: ['lena'] }),
    ).toEqual({ ok: true, value: { as: 'safety lead', logged: false } });
  });

  it('mayCountersign > a safety lead their own > refused with COUNTERSIGN_SELF', () => {
    const own = {
      lead: person('ada', 'safety lead', 'organiser'),
      signOff: signed(),
      safetyLeadsOnSite: ['ada'],
    };
    expect(mayCountersign(own)).toEqual({ ok: false, refusal: 'COUNTERSIGN_SELF' });
  });

  it('mayCountersign > organiser, the only safety lead on site is the signer > may as organiser, logged', () => {
    expect(
      mayCountersign({ lead: person('omar', 'organiser'), signOff: signed(), safetyLeadsOnSite: ['ada'] }),
    ).toEqual({ ok: true, value: { as: 'organiser', logged: true } });
  });

  it.each([
    ['another safety lead is there as well', ['ada', 'lena']],
    ['the only safety lead there is somebody else', ['lena']],
    ['no safety lead is there', []],
  ])('mayCountersign > organiser, %s > refused with COUNTERSIGN_NOT_LEAD', (_name, safetyLeadsOnSite) => {
    expect(
      mayCountersign({ lead: person('omar', 'organiser'), signOff: signed(), safetyLeadsOnSite }),
    ).toEqual({ ok: false, refusal: 'COUNTERSIGN_NOT_LEAD' });
  });

  it('mayCountersign > bench lead where the signer is the only safety lead > refused with COUNTERSIGN_NOT_LEAD', () => {
    expect(
      mayCountersign({ lead: person('ben', 'bench lead'), signOff: signed(), safetyLeadsOnSite: ['ada'] }),
    ).toEqual({ ok: false, refusal: 'COUNTERSIGN_NOT_LEAD' });
  });

  const wrong = [
    { at: T0, wrongIds: ['a'] },
    { at: T0, wrongIds: ['a'] },
  ];
  it.each([
    ['revoked', signed({ revokedAt: T0 }), 'SIGN_OFF_REVOKED'],
    ['countersigned already', signOff(), 'BRIEFING_SIGNED'],
    ['a talk is due', signed({ attempts: wrong }), 'BRIEFING_TALK_NEEDED'],
    ['not passed', signed({ passedAt: null }), 'BRIEFING_NOT_PASSED'],
    ['not signed', signed({ signedAt: null }), 'BRIEFING_NOT_SIGNED'],
  ])('mayCountersign > %s > refused with its code', (_name, record, code) => {
    const lead = person('lena', 'safety lead');
    expect(mayCountersign({ lead, signOff: record, safetyLeadsOnSite: ['lena'] })).toEqual({
      ok: false,
      refusal: code,
    });
  });

  it('mayCountersign > signed on a version that a change has ended > refused with BRIEFING_VERSION_OLD', () => {
    const context = {
      versions: [FIRST, { version: 2, kind: 'change' as const, effectiveFrom: T0 + MINUTE }],
      now: T0 + MINUTE,
    };
    expect(
      mayCountersign({
        lead: person('lena', 'safety lead'),
        signOff: signed(),
        safetyLeadsOnSite: ['lena'],
        context,
      }),
    ).toEqual({ ok: false, refusal: 'BRIEFING_VERSION_OLD' });
  });
});
