import { describe, expect, it } from 'vitest';
import {
  AGE_BANDS,
  ageRefusalText,
  ageVerdict,
  DEFAULT_AGE_RULES as TABLE,
  tightenAgeRules,
  whatIMayDo,
  type AgeBand,
  type AgeRefusal,
  type AgeQuestion,
} from '../../../shared/safety';

const refusal = (band: AgeBand, question: AgeQuestion, table = TABLE): AgeRefusal => {
  const verdict = ageVerdict(table, band, question);
  if (verdict.verdict !== 'refused') throw new Error(`expected a refusal, got ${verdict.verdict}`);
  return verdict;
};
const limits = (band: AgeBand, question: AgeQuestion) => {
  const verdict = ageVerdict(TABLE, band, question);
  return verdict.verdict === 'refused' ? verdict.rule : verdict.limits.map((limit) => limit.key);
};
const tightened = (...changes: { key: string; value: string }[]) => {
  const result = tightenAgeRules(TABLE, changes);
  if (!result.ok) throw new Error(JSON.stringify(result.refusal));
  return result.value;
};

describe('ageVerdict', () => {
  it('ageVerdict > 16-year-old asks for the mitre saw > refused with rule, source and alternative', () => {
    const verdict = refusal('16-17', { hazard: 'cutting', tool: { poweredSaw: true } });
    expect(verdict).toMatchObject({
      rule: 'powered-saw',
      from: '18+',
      alternatives: ['lay-out', 'clean', 'hand-cutting'],
    });
    expect(verdict.source.text).toContain('HO 14');
    expect(ageRefusalText(verdict, 'mitre saw')).toBe(
      'The mitre saw is for 18 and over. You can take lay-out steps, clean steps or a hand saw.',
    );
  });

  it('ageVerdict > minor claims a step that lists a mitre saw > refused; one that lists a pull saw > limited', () => {
    expect(refusal('16-17', { hazard: 'cutting', toolKinds: ['pull saw', 'mitre saw'] }).rule).toBe(
      'powered-saw',
    );
    expect(limits('16-17', { hazard: 'cutting', toolKinds: ['pull saw'] })).toEqual([
      'no-powered-saw',
      'adult-at-bench',
    ]);
  });

  it('ageVerdict > a powered saw whose hazard is not recorded > refused all the same', () => {
    expect(refusal('13-15', { hazard: null, tool: { poweredSaw: true } }).rule).toBe('powered-saw');
  });

  it('ageVerdict > 15-year-old on a hot-glue step > low-temperature gun only, told that it burns', () => {
    expect(limits('13-15', { hazard: 'hot-glue' })).toEqual([
      'low-temperature-gun-only',
      'still-burns',
      'adult-at-bench',
    ]);
    expect(limits('9-12', { hazard: 'hot-glue' })).toContain('constant-supervision');
    expect(limits('16-17', { hazard: 'hot-glue' })).toEqual(['adult-at-bench']);
  });

  it('ageVerdict > 15-year-old, gun of high or unrecorded temperature > refused; low > limited', () => {
    const high = refusal('13-15', { hazard: 'hot-glue', tool: { temperature: 'high' } });
    expect(high).toMatchObject({ rule: 'high-temperature-gun', unknown: false, from: '16-17' });
    expect(ageRefusalText(high)).toBe(
      'A high-temperature glue gun is for 16 and over. You can take a low-temperature gun (it still burns), lay-out steps or clean steps.',
    );
    expect(refusal('13-15', { hazard: 'hot-glue', tool: {} })).toMatchObject({ unknown: true });
    expect(ageVerdict(TABLE, '13-15', { hazard: 'hot-glue', tool: { temperature: 'low' } }).verdict).toBe(
      'limited',
    );
    expect(ageVerdict(TABLE, '16-17', { hazard: 'hot-glue', tool: {} }).verdict).toBe('limited');
  });

  it('ageVerdict > ladder at, above and without the limit > limited, refused, refused as unknown', () => {
    const ladder = (ladderHeightMm?: number): AgeQuestion => ({ hazard: 'ladder', tool: { ladderHeightMm } });
    expect(limits('16-17', ladder(1800))).toEqual(['ladder-height', 'adult-at-bench']);
    expect(refusal('16-17', ladder(1801))).toMatchObject({
      rule: 'ladder-height',
      heightMm: 1800,
      unknown: false,
    });
    expect(refusal('16-17', ladder())).toMatchObject({ unknown: true });
    expect(refusal('16-17', ladder(NaN))).toMatchObject({ unknown: true });
    expect(limits('16-17', { hazard: 'ladder' })).toEqual(['ladder-height', 'adult-at-bench']);
    expect(ageRefusalText(refusal('16-17', ladder(2400)))).toBe(
      'Under 18 the limit on a ladder is 1.8 m. You can take a ladder within the limit, lay-out steps or clean steps.',
    );
  });

  it('ageVerdict > spray and overhead work under 18 > refused; adults > everything allowed without limits', () => {
    for (const hazard of ['solvent-spray', 'overhead'] as const)
      expect(refusal('16-17', { hazard }).rule).toBe(hazard);
    for (const one of whatIMayDo(TABLE, '18+')) expect(one).toMatchObject({ verdict: 'allowed', limits: [] });
  });

  it('ageVerdict > any refusal of any band > offers something that is allowed', () => {
    for (const band of AGE_BANDS) {
      for (const one of whatIMayDo(TABLE, band)) {
        if (one.verdict === 'refused') expect(one.alternatives.length).toBeGreaterThan(0);
      }
    }
  });
});

describe('whatIMayDo', () => {
  it('whatIMayDo > 13-15 > permitted things first, refused ones last', () => {
    expect(whatIMayDo(TABLE, '13-15').map((one) => `${one.verdict} ${one.activity}`)).toEqual([
      'allowed lay-out',
      'allowed clean',
      'limited low-temperature-gun',
      'limited hand-cutting',
      'limited low-ladder',
      'refused high-temperature-gun',
      'refused powered-saw',
      'refused high-ladder',
      'refused solvent-spray',
      'refused overhead',
    ]);
  });
});

describe('tightenAgeRules', () => {
  it('tightenAgeRules > stricter band and lower ladder > apply, and the alternatives follow', () => {
    const table = tightened(
      { key: 'high-temperature-gun', value: '18+' },
      { key: 'ladder-height', value: '0' },
      { key: 'hand-cutting', value: '16-17' },
    );
    expect(refusal('16-17', { hazard: 'hot-glue', tool: { temperature: 'high' } }, table).rule).toBe(
      'high-temperature-gun',
    );
    expect(refusal('16-17', { hazard: 'ladder' }, table)).toMatchObject({
      heightMm: 0,
      unknown: false,
      alternatives: ['lay-out', 'clean'],
    });
    expect(refusal('13-15', { hazard: 'cutting', tool: { poweredSaw: true } }, table).alternatives).toEqual([
      'lay-out',
      'clean',
    ]);
    expect(TABLE.find((rule) => rule.key === 'ladder-height')?.limit).toEqual({ kind: 'height', mm: 1800 });
  });

  it('tightenAgeRules > loosening, unknown, nonsense and doubled lines > every problem, nothing changed', () => {
    const result = tightenAgeRules(TABLE, [
      { key: 'powered-saw', value: '16-17' },
      { key: 'ladder-height', value: '1801' },
      { key: 'trampoline', value: '18+' },
      { key: 'overhead', value: 'adults' },
      { key: 'ladder-height', value: '1000' },
      { key: 'ladder', value: '13-15' },
    ]);
    expect(result.ok).toBe(false);
    if (result.ok) return;
    expect(result.refusal.map(({ key, code, default: byDefault }) => [key, code, byDefault])).toEqual([
      ['powered-saw', 'LOOSER_THAN_DEFAULT', '18+'],
      ['ladder-height', 'LOOSER_THAN_DEFAULT', '1800'],
      ['trampoline', 'UNKNOWN_RULE', null],
      ['overhead', 'NOT_A_LIMIT', '18+'],
      ['ladder-height', 'CHANGED_TWICE', '1800'],
    ]);
  });

  it.each(['-1', '1e2', '1.5', '', '0x10', '9999999'])(
    'tightenAgeRules > ladder height %j > NOT_A_LIMIT',
    (value) => {
      expect(tightenAgeRules(TABLE, [{ key: 'ladder-height', value }])).toMatchObject({
        ok: false,
        refusal: [{ code: 'NOT_A_LIMIT' }],
      });
    },
  );
});
