import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  AGE_BANDS,
  AGE_RULE_KEYS,
  ageVerdict,
  DEFAULT_AGE_RULES,
  HAZARDS,
  limitValue,
  tightenAgeRules,
  whatIMayDo,
} from '../../../shared/safety';

const change = fc.record({
  key: fc.constantFrom(...AGE_RULE_KEYS),
  value: fc.oneof(
    fc.constantFrom(...AGE_BANDS),
    fc.nat({ max: 4000 }).map(String),
    fc.string({ maxLength: 4 }),
  ),
});
const changes = fc.uniqueArray(change, { selector: (one) => one.key, maxLength: AGE_RULE_KEYS.length });
/** Changes that are tightenings: of those drawn, the ones that are accepted alone. */
const tightenings = changes.map((list) => list.filter((one) => tightenAgeRules(DEFAULT_AGE_RULES, [one]).ok));
const question = fc.record({
  hazard: fc.option(fc.constantFrom(...HAZARDS)),
  tool: fc.option(
    fc.record({
      poweredSaw: fc.option(fc.boolean(), { nil: undefined }),
      temperature: fc.constantFrom('high' as const, 'low' as const, undefined),
      ladderHeightMm: fc.option(fc.nat({ max: 4000 }), { nil: undefined }),
    }),
    { nil: undefined },
  ),
  toolKinds: fc.subarray([
    'mitre saw',
    'pull saw',
    'high-temperature glue gun',
    'low-temperature glue gun',
    'pliers',
  ]),
});
const strictness = { allowed: 0, limited: 1, refused: 2 } as const;

describe('tighten only', () => {
  it('tightenAgeRules > any accepted changes, any person and question > never more is allowed than by default', () => {
    fc.assert(
      fc.property(tightenings, fc.constantFrom(...AGE_BANDS), question, (list, band, asked) => {
        const result = tightenAgeRules(DEFAULT_AGE_RULES, list);
        if (!result.ok) throw new Error('each was accepted alone, so all are together');
        const before = ageVerdict(DEFAULT_AGE_RULES, band, asked).verdict;
        const after = ageVerdict(result.value, band, asked).verdict;
        expect(strictness[after]).toBeGreaterThanOrEqual(strictness[before]);
      }),
      { numRuns: 1000 },
    );
  });

  it('tightenAgeRules > one change that lets anybody do more > refused, table unchanged', () => {
    const limits = DEFAULT_AGE_RULES.map(limitValue);
    fc.assert(
      fc.property(changes, (list) => {
        const result = tightenAgeRules(DEFAULT_AGE_RULES, list);
        const single = list.map((one) => tightenAgeRules(DEFAULT_AGE_RULES, [one]).ok);
        expect(result.ok).toBe(single.every(Boolean));
        if (!result.ok) expect(result.refusal).toHaveLength(single.filter((accepted) => !accepted).length);
        expect(DEFAULT_AGE_RULES.map(limitValue)).toEqual(limits);
      }),
    );
  });

  it('ageVerdict > an older band > never less is allowed than to a younger one', () => {
    fc.assert(
      fc.property(tightenings, question, (list, asked) => {
        const result = tightenAgeRules(DEFAULT_AGE_RULES, list);
        if (!result.ok) return;
        const verdicts = AGE_BANDS.map((band) => strictness[ageVerdict(result.value, band, asked).verdict]);
        expect(verdicts).toEqual([...verdicts].sort((a, b) => a - b));
      }),
    );
  });

  it('whatIMayDo > any tightened table > every activity once, permitted first, each refusal with something allowed instead', () => {
    fc.assert(
      fc.property(tightenings, fc.constantFrom(...AGE_BANDS), (list, band) => {
        const result = tightenAgeRules(DEFAULT_AGE_RULES, list);
        if (!result.ok) return;
        const permissions = whatIMayDo(result.value, band);
        const order = permissions.map((one) => strictness[one.verdict]);
        expect(order).toEqual([...order].sort((a, b) => a - b));
        const allowed = permissions.filter((one) => one.verdict !== 'refused').map((one) => one.activity);
        for (const one of permissions) {
          if (one.verdict !== 'refused') continue;
          expect(one.alternatives.length).toBeGreaterThan(0);
          expect(allowed).toEqual(expect.arrayContaining(one.alternatives));
        }
      }),
    );
  });
});
