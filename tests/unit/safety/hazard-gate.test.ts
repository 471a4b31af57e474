import { describe, expect, it } from 'vitest';
import { hazardGate, missingByHazard, WAY_KEYS, type BriefingWithVersions } from '../../../shared/safety';
import { BLANK, FIRST, MINUTE, signOff, T0 } from './fixtures';

const NOW = T0 + 60 * MINUTE;
const ADA = { id: 'ada', ageConfirmed: true };
const glue: BriefingWithVersions = {
  key: 'hot-glue',
  title: 'Hot glue',
  hazards: ['hot-glue'],
  versions: [FIRST],
};
const hall: BriefingWithVersions = {
  key: 'hall',
  title: 'Hall',
  hazards: ['hot-glue', 'ladder'],
  versions: [FIRST],
};

describe('hazardGate', () => {
  it('hazardGate > no hazards > nothing is missing', () => {
    expect(hazardGate([], [], [glue], NOW, ADA)).toEqual([]);
  });

  it('hazardGate > signed but not countersigned > says so, with the way to change it', () => {
    const record = signOff({
      countersignedAt: null,
      countersignedBy: null,
      countersignedAs: null,
      expiresAt: null,
    });
    const missing = hazardGate(['hot-glue', 'hot-glue'], [record], [glue], NOW, ADA);
    expect(missing).toEqual([
      {
        hazard: 'hot-glue',
        reason: 'NOT_COUNTERSIGNED',
        briefingKey: 'hot-glue',
        way: { key: 'safety.way.ask-countersign', params: { hazard: 'hot-glue', briefing: 'Hot glue' } },
      },
    ]);
    expect(missingByHazard(missing)).toEqual({ 'hot-glue': 'NOT_COUNTERSIGNED' });
  });

  it('hazardGate > sign-off of another person or another briefing > does not count', () => {
    const others = [signOff({ personId: 'ben' }), signOff({ briefingKey: 'hall' })];
    expect(hazardGate(['hot-glue'], others, [glue], NOW, ADA)[0]?.reason).toBe('NOT_READ');
  });

  it('hazardGate > two briefings cover the hazard, one valid > enough', () => {
    expect(hazardGate(['hot-glue'], [signOff({ briefingKey: 'hall' })], [glue, hall], NOW, ADA)).toEqual([]);
  });

  it('hazardGate > two briefings, one further on > names the nearer one', () => {
    const half = signOff({
      ...BLANK,
      briefingKey: 'hall',
      attempts: [{ at: T0, wrongIds: [] }],
      passedAt: T0,
    });
    for (const briefings of [
      [glue, hall],
      [hall, glue],
    ]) {
      const [missing] = hazardGate(['hot-glue'], [half], briefings, NOW, ADA);
      expect(missing).toMatchObject({ briefingKey: 'hall', reason: 'NOT_SIGNED' });
    }
  });

  it('hazardGate > several hazards > one entry each in the order asked, one without a briefing', () => {
    const missing = hazardGate(['overhead', 'hot-glue', 'ladder'], [signOff()], [glue, hall], NOW, ADA);
    expect(missing.map(({ hazard, reason }) => [hazard, reason])).toEqual([
      ['overhead', 'NO_BRIEFING'],
      ['ladder', 'NOT_READ'],
    ]);
    expect(missing[0]?.briefingKey).toBeNull();
  });

  it('hazardGate > complete, desk has not confirmed the age band > go to the desk', () => {
    const [missing] = hazardGate(['hot-glue'], [signOff()], [glue], NOW, { ...ADA, ageConfirmed: false });
    expect(missing?.way.key).toBe('safety.way.go-to-desk');
    expect(WAY_KEYS).toContain('safety.way.go-to-desk');
  });
});
