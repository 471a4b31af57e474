import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { signOffValidity, type SignOff, type VersionFacts } from '../../../shared/safety';

const time = fc.integer({ min: 0, max: 100 });
const maybe = fc.option(time);
const person = fc.constantFrom('ada', 'lena');
const signOff: fc.Arbitrary<SignOff> = fc.record({
  id: fc.constant('so'),
  personId: person,
  briefingKey: fc.constant('hot-glue'),
  version: fc.integer({ min: 1, max: 4 }),
  attempts: fc.array(fc.record({ at: time, wrongIds: fc.subarray(['a', 'b']) }), { maxLength: 3 }),
  talkBy: fc.option(person),
  talkAt: maybe,
  passedAt: maybe,
  signedAt: maybe,
  countersignedBy: fc.option(person),
  countersignedAt: maybe,
  countersignedAs: fc.option(fc.constantFrom('safety lead' as const, 'organiser' as const)),
  expiresAt: fc.option(fc.integer({ min: 0, max: 200 })),
  revokedAt: fc.option(time, { freq: 2 }),
  revokedBy: fc.constant(null),
  revokeReason: fc.constant(null),
});
const versions: fc.Arbitrary<VersionFacts[]> = fc
  .array(fc.record({ kind: fc.constantFrom('change' as const, 'correction' as const), wait: time }), {
    maxLength: 3,
  })
  .map((list) => {
    let effectiveFrom = 0;
    const later = list.map(({ kind, wait }, index) => {
      effectiveFrom += wait;
      return { version: index + 2, kind, effectiveFrom };
    });
    return [{ version: 1, kind: 'first' as const, effectiveFrom: 0 }, ...later];
  });

describe('signOffValidity', () => {
  it('signOffValidity > any record that counts > has everything rule 2 asks for', () => {
    let valid = 0;
    fc.assert(
      fc.property(signOff, versions, time, (record, list, now) => {
        if (signOffValidity(record, { versions: list, now, ageConfirmed: true }) !== 'valid') return;
        valid += 1;
        expect(record.passedAt).not.toBeNull();
        expect(record.signedAt).not.toBeNull();
        expect(record.countersignedBy).not.toBeNull();
        expect(record.countersignedBy).not.toBe(record.personId);
        expect(record.revokedAt).toBeNull();
        expect(record.expiresAt).toBeGreaterThan(now);
        const later = list.filter((one) => one.version > record.version && one.effectiveFrom <= now);
        expect(later.filter((one) => one.kind === 'change')).toEqual([]);
      }),
      { numRuns: 20_000, seed: 7 },
    );
    // The property would say nothing if no record ever counted.
    expect(valid).toBeGreaterThan(20);
  });

  it('signOffValidity > a correction added > changes nothing; a change in force added > nothing earlier counts', () => {
    fc.assert(
      fc.property(signOff, versions, time, (record, list, now) => {
        const next = list.length + 1;
        const added = (kind: VersionFacts['kind']) => [...list, { version: next, kind, effectiveFrom: now }];
        fc.pre(record.version <= list.length);
        const judge = (all: VersionFacts[]) =>
          signOffValidity(record, { versions: all, now, ageConfirmed: true });
        expect(judge(added('correction'))).toBe(judge(list));
        expect(judge(added('change'))).not.toBe('valid');
      }),
    );
  });
});
