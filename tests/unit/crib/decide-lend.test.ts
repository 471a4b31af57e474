import { describe, expect, it } from 'vitest';
import { decideLend, type LendQuestion } from '../../../shared/crib';
import { AGE_BANDS, DEFAULT_AGE_RULES, HAZARDS, type Hazard } from '../../../shared/safety';

const GUN: LendQuestion['tool'] = {
  kind: 'hot-glue gun',
  hazard: 'hot-glue',
  traits: { temperature: 'high', hot: true },
  tag: null,
};
const LOW_GUN: LendQuestion['tool'] = {
  ...GUN,
  kind: 'low-temp glue gun',
  traits: { temperature: 'low', hot: true },
};
const MITRE_SAW: LendQuestion['tool'] = {
  kind: 'mitre saw',
  hazard: 'cutting',
  traits: { poweredSaw: true },
  tag: null,
};
const ladder = (ladderHeightMm?: number): LendQuestion['tool'] => ({
  kind: 'step ladder',
  hazard: 'ladder',
  traits: ladderHeightMm === undefined ? {} : { ladderHeightMm },
  tag: null,
});
const BRIEFED: LendQuestion['person'] = { confirmed: true, onSite: true, ageBand: '18+', missing: {} };
const TAG = { reason: 'drips', by: 'lena', at: 1000 };
const OUT = { personId: 'ines', outAt: 2000, backBy: 3000 };
const lacksAll = Object.fromEntries(HAZARDS.map((hazard) => [hazard, 'NOT_READ'])) as Record<Hazard, string>;

const ask = (changes: Partial<LendQuestion> = {}) =>
  decideLend({
    tool: GUN,
    out: null,
    person: BRIEFED,
    stationId: null,
    stops: [],
    ageRules: DEFAULT_AGE_RULES,
    ...changes,
  });
const refusal = (changes: Partial<LendQuestion>) => {
  const decision = ask(changes);
  if (decision.ok) throw new Error('the tool went out');
  return decision.refusal;
};

describe('decideLend', () => {
  it('decideLend > a confirmed adult, signed off, nothing against it > goes out without limits', () => {
    expect(ask()).toEqual({ ok: true, value: { limits: [] } });
  });

  it('decideLend > tagged out of use > refused with who, why and when, also for somebody who may everything else', () => {
    expect(refusal({ tool: { ...GUN, tag: TAG } })).toEqual({ code: 'TOOL_OUT_OF_USE', details: TAG });
  });

  it('decideLend > out with somebody > refused with who, since when and until when, and nothing else of the row', () => {
    const row = { ...OUT, id: 'checkout', name: 'Ines K' };
    expect(refusal({ out: row })).toEqual({ code: 'TOOL_OUT', details: OUT });
  });

  it('decideLend > not confirmed by the desk, or signed out > refused before any sign-off is looked at', () => {
    const person = { ...BRIEFED, missing: lacksAll };
    expect(refusal({ person: { ...person, confirmed: false } }).code).toBe('PERSON_NOT_CONFIRMED');
    expect(refusal({ person: { ...person, onSite: false } }).code).toBe('PERSON_NOT_ON_SITE');
  });

  it('decideLend > no valid sign-off for the hazard of the tool > refused with the hazard and what is missing', () => {
    expect(refusal({ person: { ...BRIEFED, missing: { 'hot-glue': 'NOT_COUNTERSIGNED' } } })).toEqual({
      code: 'SIGN_OFF_MISSING',
      details: { hazard: 'hot-glue', missing: 'NOT_COUNTERSIGNED' },
    });
  });

  it('decideLend > another hazard is missing, or the tool has none > goes out', () => {
    expect(ask({ person: { ...BRIEFED, missing: { cutting: 'NOT_READ' } } }).ok).toBe(true);
    const nippers = { kind: 'nippers', hazard: null, traits: {}, tag: null };
    expect(ask({ tool: nippers, person: { ...BRIEFED, missing: lacksAll } }).ok).toBe(true);
  });

  it('decideLend > a gun whose record forgot its hazard > still needs the hot-glue sign-off, still covered by a stop of hot tools', () => {
    const tool = { ...GUN, hazard: null };
    expect(refusal({ tool, person: { ...BRIEFED, missing: lacksAll } })).toMatchObject({
      code: 'SIGN_OFF_MISSING',
      details: { hazard: 'hot-glue' },
    });
    expect(refusal({ tool, stops: [{ scope: 'hot-tools', stationId: null }] }).code).toBe('STOP_ACTIVE');
  });

  it('decideLend > a stop of hot tools > keeps the gun, lets the nippers go', () => {
    const stops = [{ scope: 'hot-tools' as const, stationId: null }];
    expect(refusal({ stops })).toEqual({ code: 'STOP_ACTIVE', details: stops[0] });
    expect(ask({ stops, tool: { kind: 'nippers', hazard: null, traits: {}, tag: null } }).ok).toBe(true);
  });

  it('decideLend > an area is stopped > keeps what would go there, and a gun nobody knows the place of', () => {
    const stops = [{ scope: 'area' as const, stationId: 'glue' }];
    expect(refusal({ stops, stationId: 'glue' }).code).toBe('STOP_ACTIVE');
    expect(ask({ stops, stationId: 'bench' }).ok).toBe(true);
    expect(refusal({ stops, stationId: null }).code).toBe('STOP_ACTIVE');
  });

  it('decideLend > fifteen and the high-temperature gun > refused with rule, source and the low-temperature gun instead', () => {
    const person = { ...BRIEFED, ageBand: '13-15' as const };
    const { code, details } = refusal({ person });
    expect({ code, details }).toMatchObject({
      code: 'AGE_RULE',
      details: { ageBand: '13-15', rule: 'high-temperature-gun', from: '16-17', unknown: false },
    });
    expect(details).toMatchObject({ source: { text: expect.stringContaining('195 C') as string } });
    expect(details).toMatchObject({ alternatives: ['low-temperature-gun', 'lay-out', 'clean'] });
    const low = ask({ tool: LOW_GUN, person });
    expect(low).toMatchObject({ ok: true });
    expect(low.ok && low.value.limits.map(({ key }) => key)).toEqual([
      'low-temperature-gun-only',
      'still-burns',
      'adult-at-bench',
    ]);
  });

  it('decideLend > under 18 and a powered saw (US child-labour orders HO 5, HO 14) > refused, however it is signed off', () => {
    for (const ageBand of AGE_BANDS.filter((band) => band !== '18+')) {
      expect(refusal({ tool: MITRE_SAW, person: { ...BRIEFED, ageBand } })).toMatchObject({
        code: 'AGE_RULE',
        details: { rule: 'powered-saw', from: '18+' },
      });
    }
    expect(ask({ tool: MITRE_SAW }).ok).toBe(true);
  });

  it('decideLend > sixteen and a ladder at, just above and without the limit of 1.8 m (housing-build affiliates: 6 ft) > out, refused, refused as unknown', () => {
    const person = { ...BRIEFED, ageBand: '16-17' as const };
    expect(ask({ tool: ladder(1800), person }).ok).toBe(true);
    expect(refusal({ tool: ladder(1801), person })).toMatchObject({
      code: 'AGE_RULE',
      details: { rule: 'ladder-height', heightMm: 1800, unknown: false },
    });
    expect(refusal({ tool: ladder(), person })).toMatchObject({ details: { unknown: true } });
  });
});
