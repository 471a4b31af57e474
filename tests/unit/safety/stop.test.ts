import { describe, expect, it } from 'vitest';
import {
  isHotTool,
  makeSafe,
  stopCovers,
  stopCoversTool,
  traitsOfKind,
  type StopScope,
} from '../../../shared/safety';

const HOT: StopScope = { scope: 'hot-tools', stationId: null };
const AREA: StopScope = { scope: 'area', stationId: 'glue-1' };
const ALL: StopScope = { scope: 'everything', stationId: null };

describe('stopCovers', () => {
  it('stopCovers > hot-tools stop > hot-glue steps everywhere, no other hazard', () => {
    expect(stopCovers(HOT, { stationId: 'glue-2', hazards: ['hot-glue'] })).toBe(true);
    expect(stopCovers(HOT, { stationId: 'saw-1', hazards: ['cutting', 'overhead'] })).toBe(false);
    expect(stopCovers(HOT, { stationId: 'glue-2', hazards: [], toolKinds: ['heat gun'] })).toBe(true);
  });

  it('stopCovers > area stop > hazard steps at that station only', () => {
    expect(stopCovers(AREA, { stationId: 'glue-1', hazards: ['cutting'] })).toBe(true);
    expect(stopCovers(AREA, { stationId: 'glue-2', hazards: ['hot-glue'] })).toBe(false);
    expect(stopCovers(AREA, { stationId: 'glue-1', hazards: [] })).toBe(false);
    expect(stopCovers(AREA, { stationId: 'glue-1', hazards: [], toolKinds: ['mitre saw'] })).toBe(true);
  });

  it('stopCovers > everything > every hazard step, no step without a hazard', () => {
    expect(stopCovers(ALL, { stationId: 'bay', hazards: ['solvent-spray'] })).toBe(true);
    expect(stopCovers(ALL, { stationId: 'bench', hazards: [] })).toBe(false);
  });

  it('stopCovers > area stop that lost its station > covers hazard steps everywhere', () => {
    expect(stopCovers({ scope: 'area', stationId: null }, { stationId: 'x', hazards: ['ladder'] })).toBe(
      true,
    );
  });
});

describe('stopCoversTool', () => {
  const gun = { stationId: 'glue-2', hazard: 'hot-glue' as const };
  const pliers = { stationId: null, hazard: null, kind: 'pliers' };

  it('stopCoversTool > hot-tools stop > hot tools stay, pliers go out', () => {
    expect(stopCoversTool(HOT, gun)).toBe(true);
    expect(stopCoversTool(HOT, { ...pliers, traits: { hot: true } })).toBe(true);
    expect(stopCoversTool(HOT, pliers)).toBe(false);
  });

  it('stopCoversTool > area stop > by station; where that is not known, tools with a hazard', () => {
    expect(stopCoversTool(AREA, gun)).toBe(false);
    expect(stopCoversTool(AREA, { ...pliers, stationId: 'glue-1' })).toBe(true);
    expect(stopCoversTool(AREA, { ...gun, stationId: null })).toBe(true);
    expect(stopCoversTool(AREA, pliers)).toBe(false);
  });

  it('stopCoversTool > everything > every tool', () => {
    expect(stopCoversTool(ALL, pliers)).toBe(true);
  });
});

describe('makeSafe', () => {
  it('makeSafe > hot tools > stand, plug, step back, in this order', () => {
    expect(makeSafe(HOT)).toEqual([
      'stop.make-safe.gun-in-stand',
      'stop.make-safe.pull-plug',
      'stop.make-safe.step-back',
    ]);
  });

  it('makeSafe > area or everything > also lowers or ties off a load', () => {
    for (const scope of [AREA, ALL]) {
      expect(makeSafe(scope)).toContain('stop.make-safe.lower-or-tie-off-load');
      expect(makeSafe(scope)).toContain('stop.make-safe.gun-in-stand');
    }
  });
});

describe('traitsOfKind', () => {
  it.each([
    ['mitre saw', { poweredSaw: true }],
    ['Jigsaw', { poweredSaw: true }],
    ['pull saw', { poweredSaw: false }],
    ['hacksaw', { poweredSaw: false }],
    ['low-temperature glue gun', { hot: true, temperature: 'low' }],
    ['high-temp glue gun', { hot: true, temperature: 'high' }],
    ['soldering iron', { hot: true }],
    ['mitre box', {}],
    ['paint shaker', {}],
  ])('traitsOfKind > %s > its traits', (kind, traits) => {
    expect(traitsOfKind(kind)).toEqual(traits);
    expect(isHotTool({ kind })).toBe('hot' in traits);
  });
});
