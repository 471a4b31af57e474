import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import type { DayLogView } from '../../../shared/contracts/progress';
import type { LiveMaps } from '../../../src/lib/live-state';
import {
  actorName,
  forName,
  subjectWords,
  type LogNames,
} from '../../../src/features/planning/day-log-subject';
import { ACTION_GROUPS, actionWords, flagWords } from '../../../src/features/planning/day-log-words';
import { nextCodes } from '../../../src/features/planning/next-codes';
import { movedStep } from '../../../src/features/planning/template-draft';

const maps = {
  people: new Map([
    ['p1', { name: 'Lena W' }],
    ['p2', { name: 'Rafi B' }],
  ]),
  subAssemblies: new Map([
    ['s1', { code: 'V-01', name: 'North bay 1' }],
    ['s2', { code: 'V-02', name: 'North bay 2' }],
    ['s3', { code: 'V-03', name: 'North bay 3' }],
  ]),
  steps: new Map([['t1', { subAssemblyId: 's1', name: 'glue out' }]]),
  tools: new Map([['g7', { number: 'G-07', name: 'hot-glue gun' }]]),
  stations: new Map(),
  buildDays: new Map([['d1', { date: '2027-06-12' }]]),
  briefings: new Map(),
} as unknown as LiveMaps;
const names: LogNames = { records: maps, frames: new Map(), zone: 'Europe/Lisbon' };

const entry = (
  action: string,
  subject: Record<string, unknown>,
  more: Partial<DayLogView> = {},
): DayLogView => ({
  seq: 1,
  revision: 1,
  happenedAt: 0,
  recordedAt: 0,
  actor: 'person:p1',
  forPersonId: null,
  action,
  subject,
  flags: [],
  ...more,
});

describe('day log in words', () => {
  it.each([
    ['step.claimed', { stepId: 't1', subAssemblyId: 's1' }, 'V-01 glue out'],
    ['sub-assembly.renamed', { subAssemblyId: 's2' }, 'V-02 North bay 2'],
    ['sub-assembly.added', { ids: ['s1', 's2', 's3'], frameId: 'f', templateId: 'x' }, 'V-01 to V-03'],
    [
      'tool.lent',
      { toolId: 'g7', personId: 'p2', stationId: null, backBy: 0 },
      'G-07 hot-glue gun, to Rafi B, back by 01:00',
    ],
    ['build-day.added', { buildDayId: 'd1' }, 'Sat 12 June'],
    ['person.duty-given', { personId: 'p2', duty: 'checker' }, 'to Rafi B, checker'],
    ['step.held', { stepId: 'unknown', reason: 'glue ran out' }, 'a step, "glue ran out"'],
  ])('subjectWords > %s > ids become names', (action, subject, words) => {
    expect(subjectWords(entry(action, subject), names)).toBe(words);
  });

  it('actorName, forName > a person, an account, the server, for oneself > names, never ids', () => {
    expect(actorName('person:p1', names)).toBe('Lena W');
    expect(actorName('person:gone', names)).toBe('somebody who is gone');
    expect(actorName('account:a1', names)).toBe('an administrator');
    expect(actorName('server', names)).toBe('Strutbee');
    expect(forName(entry('person.confirmed', {}, { forPersonId: 'p2' }), names)).toBe('Rafi B');
    expect(forName(entry('person.joined', {}, { forPersonId: 'p1' }), names)).toBeNull();
  });

  it('flagWords > a known rule and one that is new > words, never capitals', () => {
    expect(flagWords('RECORDED_FROM_PAPER')).toBe('typed in from paper');
    expect(flagWords('SOME_NEW_RULE')).toBe('some new rule');
  });

  it('actionWords > every action that the server writes > has words of its own and stands in the filter', () => {
    const source = readdirSync('server/modules', { recursive: true, encoding: 'utf8' })
      .filter((file) => file.endsWith('.ts'))
      .map((file) => readFileSync(path.join('server/modules', file), 'utf8'))
      .concat(readFileSync('shared/travellers/decide.ts', 'utf8'))
      .join('\n');
    const written = [
      ...source.matchAll(/log\(\{\s*action: (?:[^,']*\? )?'([a-z-]+\.[a-z-]+)'(?: : '([a-z-]+\.[a-z-]+)')?/g),
    ]
      .flatMap(([, first, second]) => [first, second])
      .filter((action) => action !== undefined && !action.startsWith('account.'));
    expect(written.length).toBeGreaterThan(25);
    const listed = new Set(ACTION_GROUPS.flatMap(({ actions }) => actions));
    expect(written.filter((action) => action === undefined || !listed.has(action))).toEqual([]);
    expect(actionWords('step.sent-to-rework')).toBe('sent to rework');
  });
});

describe('codes and order', () => {
  it('nextCodes > letters with pieces, one of them taken out > numbered on from the highest', () => {
    expect(nextCodes('v', 2, ['V-01', 'V-07', 'L-40'])).toEqual(['V-08', 'V-09']);
    expect(nextCodes('L', 1, ['V-01'])).toEqual(['L-01']);
    expect(nextCodes('V', 1, ['V-99'])).toEqual(['V-100']);
  });

  it.each([
    ['O', 1],
    ['V', 0],
    ['V', 1.5],
    ['', 3],
    ['VVV', 1],
  ])('nextCodes > letter "%s", quantity %d > none', (letter, quantity) => {
    expect(nextCodes(letter, quantity, [])).toEqual([]);
  });

  it('movedStep > past either end > the same list', () => {
    const list = ['a', 'b'];
    expect(movedStep(list, 0, -1)).toBe(list);
    expect(movedStep(list, 1, 1)).toBe(list);
    expect(movedStep(list, 0, 1)).toEqual(['b', 'a']);
  });
});
