import { describe, expect, it } from 'vitest';
import { AGE_BANDS, ageVerdict, DEFAULT_AGE_RULES, type AgeQuestion } from '../../../shared/safety';

const verdicts = (question: AgeQuestion) =>
  AGE_BANDS.map((band) => ageVerdict(DEFAULT_AGE_RULES, band, question).verdict);
const source = (key: string) => DEFAULT_AGE_RULES.find((rule) => rule.key === key)?.source.text ?? '';
const [A, L, R] = ['allowed', 'limited', 'refused'] as const;

// Columns: 18+, 16-17, 13-15, 9-12, under 9.
describe('age rules against their published sources', () => {
  it('powered saw > each band > 18 and over only', () => {
    // US child-labour orders (employment): < 18 HO 5 power-driven woodworking machines, HO 14 saws (DOL via osha.gov).
    expect(verdicts({ hazard: 'cutting', tool: { poweredSaw: true } })).toEqual([A, R, R, R, R]);
    expect(source('powered-saw')).toMatch(/HO 5.*HO 14.*osha\.gov/);
  });

  it('ladder > 6 ft as metres and a step more > minors to 1.8 m', () => {
    // Habitat affiliates: minors not above 6 ft (1.8 m).
    expect(verdicts({ hazard: 'ladder', tool: { ladderHeightMm: 1800 } })).toEqual([A, L, L, L, L]);
    expect(verdicts({ hazard: 'ladder', tool: { ladderHeightMm: 1801 } })).toEqual([A, R, R, R, R]);
    expect(source('ladder-height')).toContain('6 ft (1.8 m)');
  });

  it('solvent spray > each band > 18 and over only', () => {
    // Watauga policy: minors may not handle hazardous substances; no solvent spraying for minors.
    expect(verdicts({ hazard: 'solvent-spray' })).toEqual([A, R, R, R, R]);
    expect(source('solvent-spray')).toContain('Watauga');
  });

  it('overhead work > each band > 18 and over only', () => {
    // Housing-build policies: 16-17 no > 6 ft, no roof (Habitat affiliates); by analogy.
    expect(verdicts({ hazard: 'overhead' })).toEqual([A, R, R, R, R]);
  });

  it('hot glue > high and low temperature > under 16 low only, under 9 none', () => {
    // Craft-safety page, weak: < 8 not; 8+ direct constant supervision, low temperature; teens after sign-off.
    expect(verdicts({ hazard: 'hot-glue', tool: { temperature: 'high' } })).toEqual([A, L, R, R, R]);
    expect(verdicts({ hazard: 'hot-glue', tool: { temperature: 'low' } })).toEqual([A, L, L, L, R]);
    expect(source('hot-glue')).toContain('under 8 not');
  });

  it('NSTA "regardless of the temperature setting, glue guns can burn skin" > low gun for minors > said so', () => {
    const verdict = ageVerdict(DEFAULT_AGE_RULES, '13-15', {
      hazard: 'hot-glue',
      tool: { temperature: 'low' },
    });
    expect(verdict).toMatchObject({ verdict: 'limited' });
    expect(JSON.stringify(verdict)).toContain('still-burns');
    expect(source('high-temperature-gun')).toContain('regardless of the temperature setting');
  });

  it('every default > its source > text, edition and status are shown', () => {
    for (const rule of DEFAULT_AGE_RULES) {
      expect(rule.source.text.length).toBeGreaterThan(20);
      expect(rule.source.edition).not.toBe('');
      expect(['read', 'read, weak', 'read, by analogy', 'own']).toContain(rule.source.status);
    }
  });
});
