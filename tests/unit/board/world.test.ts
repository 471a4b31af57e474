import { readFileSync } from 'node:fs';
import { dirname, resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { InstallationRecord, StepRecord } from '../../../shared/contracts/live';
import { mayClaim } from '../../../shared/travellers/decide';
import { worldOf } from '../../../src/lib/world';
import { liveOf, NOW, personRecord, signOffRecord, stepRecord, stopRecord, briefingRecord } from './fixtures';

const installation: InstallationRecord = {
  id: 'i1',
  revision: 1,
  name: 'Mill Canopy',
  venue: 'Old mill',
  timeZone: 'Pacific/Auckland',
  unit: 'mm',
  hallLimit: 80,
  status: 'published',
  settings: { maxInHand: 2, ageChanges: [] },
};
const refusalFor = (live: ReturnType<typeof liveOf>, step: StepRecord, personId = 'kofi') =>
  mayClaim(worldOf(live, personId, step, NOW))?.code ?? null;

describe('worldOf', () => {
  const hot = stepRecord({ id: 's1', hazards: ['hot-glue'] });
  const base = { installation: [installation], steps: [hot], briefings: [briefingRecord({})] };

  it('worldOf > countersigned sign-off for the hazard > the step may be claimed', () => {
    const live = liveOf({
      ...base,
      people: [personRecord({ id: 'kofi' })],
      signOffs: [signOffRecord({ personId: 'kofi' })],
    });
    expect(refusalFor(live, hot)).toBeNull();
  });

  it('worldOf > sign-off that nobody countersigned > SIGN_OFF_MISSING with what is missing', () => {
    const live = liveOf({
      ...base,
      people: [personRecord({ id: 'kofi' })],
      signOffs: [signOffRecord({ personId: 'kofi', countersignedBy: null, countersignedAt: null })],
    });
    expect(mayClaim(worldOf(live, 'kofi', hot, NOW))).toEqual({
      code: 'SIGN_OFF_MISSING',
      details: { hazard: 'hot-glue', missing: 'NOT_COUNTERSIGNED' },
    });
  });

  it('worldOf > a sign-off that ends while the page is open > missing again without any change of records', () => {
    const live = liveOf({
      ...base,
      people: [personRecord({ id: 'kofi' })],
      signOffs: [signOffRecord({ personId: 'kofi', expiresAt: NOW + 3_600_000 })],
    });
    expect(mayClaim(worldOf(live, 'kofi', hot, NOW))).toBeNull();
    expect(mayClaim(worldOf(live, 'kofi', hot, NOW + 3_660_000))?.code).toBe('SIGN_OFF_MISSING');
  });

  it('worldOf > person not confirmed, gone, removed or unknown > PERSON_NOT_CONFIRMED', () => {
    const plain = stepRecord({ id: 's2' });
    for (const change of [{ confirmed: false }, { onSite: false }, { removed: true }]) {
      const live = liveOf({
        installation: [installation],
        steps: [plain],
        people: [personRecord({ id: 'kofi', ...change })],
      });
      expect(refusalFor(live, plain)).toBe('PERSON_NOT_CONFIRMED');
    }
    expect(refusalFor(liveOf({ installation: [installation], steps: [plain] }), plain)).toBe(
      'PERSON_NOT_CONFIRMED',
    );
  });

  it('worldOf > two steps in hand already > IN_HAND_LIMIT with the limit of the settings', () => {
    const crew = [{ personId: 'kofi', claimedAt: NOW }];
    const third = stepRecord({ id: 's3' });
    const live = liveOf({
      installation: [installation],
      people: [personRecord({ id: 'kofi' })],
      steps: [
        stepRecord({ id: 'a', state: 'in hand', crew }),
        stepRecord({ id: 'b', state: 'in hand', crew }),
        stepRecord({ id: 'gone', state: 'in hand', crew, removed: true }),
        third,
      ],
    });
    const world = worldOf(live, 'kofi', third, NOW);
    expect(world.person.inHand).toBe(2);
    expect(mayClaim(world)).toEqual({ code: 'IN_HAND_LIMIT', details: { limit: 2 } });
  });

  it('worldOf > raised stop > covers the step; lifted stop > does not', () => {
    const people = [personRecord({ id: 'kofi' })];
    const signOffs = [signOffRecord({ personId: 'kofi' })];
    const raised = stopRecord({ scope: 'hot-tools' });
    expect(refusalFor(liveOf({ ...base, people, signOffs, stops: [raised] }), hot)).toBe('STOP_ACTIVE');
    const lifted = stopRecord({ scope: 'hot-tools', liftedAt: NOW });
    expect(refusalFor(liveOf({ ...base, people, signOffs, stops: [lifted] }), hot)).toBeNull();
  });

  it('worldOf > tightened age table > a band the default allows is refused', () => {
    const details = { ...personRecord({}).details!, ageBand: '13-15' as const };
    const people = [personRecord({ id: 'kofi', details })];
    const signOffs = [signOffRecord({ personId: 'kofi' })];
    const low = stepRecord({ id: 's1', hazards: ['hot-glue'], toolKinds: ['low-temperature glue gun'] });
    expect(refusalFor(liveOf({ ...base, people, signOffs, steps: [low] }), low)).toBeNull();
    const strict = {
      ...installation,
      settings: { maxInHand: 2, ageChanges: [{ key: 'hot-glue', value: '16-17' }] },
    };
    const live = liveOf({ ...base, installation: [strict], people, signOffs, steps: [low] });
    expect(refusalFor(live, low)).toBe('AGE_RULE');
  });

  it('worldOf > traveller with steps in any order > sorted by position without removed ones; only drying ones at the station', () => {
    const two = stepRecord({ id: 'two', position: 2, state: 'waiting' });
    const one = stepRecord({ id: 'one', position: 1 });
    const wet = stepRecord({ id: 'wet', subAssemblyId: 'other', state: 'drying' });
    const out = stepRecord({ id: 'out', position: 3, removed: true });
    const live = liveOf({ installation: [installation], steps: [two, out, one, wet] });
    const world = worldOf(live, 'kofi', one, NOW);
    expect(world.traveller.map((step) => step.id)).toEqual(['one', 'two']);
    expect(world.station.map((step) => step.id)).toEqual(['wet']);
  });
});

/** Every file a module pulls in when it runs; imports of types cost nothing. */
function runtimeImports(entry: string, seen = new Set<string>()): Set<string> {
  if (seen.has(entry)) return seen;
  seen.add(entry);
  const text = readFileSync(entry, 'utf8');
  for (const [, clause = '', from = ''] of text.matchAll(/^(?:import|export)\s([^;]*?)from '([^']+)';/gms)) {
    if (/^type\s/.test(clause)) continue;
    if (!from.startsWith('.')) seen.add(from);
    else {
      const base = resolve(dirname(entry), from);
      const file = [`${base}.ts`, `${base}.tsx`, `${base}/index.ts`].find((path) => {
        try {
          readFileSync(path);
          return true;
        } catch {
          return false;
        }
      });
      if (!file) throw new Error(`no file for ${from} in ${entry}`);
      runtimeImports(file, seen);
    }
  }
  return seen;
}

describe('what src/lib/world.ts pulls in', () => {
  it('runtimeImports > world.ts, which a phone loads first > neither zod nor a contract; the index of safety has it', () => {
    const pulled = [...runtimeImports(resolve('src/lib/world.ts'))];
    expect(pulled).not.toContain('zod');
    expect(pulled.filter((file) => /shared.contracts/.test(file))).toEqual([]);
    expect([...runtimeImports(resolve('shared/safety/index.ts'))]).toContain('zod');
  });
});
