import { describe, expect, it } from 'vitest';
import type { BuildDayRecord } from '../../../shared/contracts/live';
import { backByMinutes, buildDayNow } from '../../../src/features/crib/back-by';
import { lendWords } from '../../../src/features/crib/lend-words';
import { looksLikeTool, readPerson, readTool } from '../../../src/features/crib/scan';
import { NOW, personRecord, toolRecord } from './fixtures';

const people = [
  personRecord({ id: 'kofi', number: 12 }),
  personRecord({ id: 'wren', name: 'Wren S', number: 120 }),
  personRecord({ id: 'gone', name: 'Zoe N', number: 7, removed: true }),
];
const tools = [
  toolRecord({ id: 'g7', number: 'G-07' }),
  toolRecord({ id: 'g70', number: 'G-070' }),
  toolRecord({ id: 'old', number: 'S-01', removed: true }),
];

describe('readPerson', () => {
  it('readPerson > number typed, scanned with noughts or spaces, or a link that ends in it > that person', () => {
    for (const text of [
      '12',
      ' 12 ',
      '0012',
      'http://10.0.0.5:4310/i/x/p/12',
      'https://hall.example/p/12/?a=1#b',
    ])
      expect(readPerson(text, people)?.id).toBe('kofi');
    expect(readPerson('120', people)?.id).toBe('wren');
  });

  it('readPerson > a whole name > that person; part of a name, a removed person, nonsense, nothing > nobody', () => {
    expect(readPerson('wren s.', people)?.id).toBe('wren');
    for (const text of ['Wren', '7', 'G-07', '12a', '-12', '1.2', '', 'http://hall.example/'])
      expect(readPerson(text, people)).toBeNull();
  });

  it('readPerson > a name that two have > nobody: a number decides', () => {
    const two = [...people, personRecord({ id: 'other', number: 13 })];
    expect(readPerson('Kofi A', two)).toBeNull();
    expect(readPerson('13', two)?.id).toBe('other');
  });
});

describe('readTool', () => {
  it('readTool > number as painted, said or in a link > that tool, whatever its noughts and dashes', () => {
    for (const text of ['G-07', 'g7', 'G 07', ' g-7 ', 'http://10.0.0.5/t/G-07'])
      expect(readTool(text, tools)?.id).toBe('g7');
    expect(readTool('G-70', tools)?.id).toBe('g70');
  });

  it('readTool > removed tool, person’s number, nonsense > none', () => {
    for (const text of ['S-01', '12', 'gun', 'G-', '', 'GGG-07']) expect(readTool(text, tools)).toBeNull();
    expect([looksLikeTool('X-99'), looksLikeTool('12')]).toEqual([true, false]);
  });
});

describe('backByMinutes', () => {
  const day: BuildDayRecord = {
    id: 'd',
    revision: 1,
    date: '2025-06-14',
    doors: '09:00',
    start: '09:30',
    clearUp: '17:30',
    end: '18:30',
    breaks: [],
    removed: false,
  };
  const ZONE = 'Pacific/Auckland';

  it('backByMinutes > end of day at 14:07 in the hall’s zone > until clear-up at 17:30', () => {
    expect(buildDayNow([day], NOW, ZONE)).toBe(day);
    expect(backByMinutes('day', day, NOW, ZONE)).toBe(203);
    expect(backByMinutes('60', day, NOW, ZONE)).toBe(60);
  });

  it('backByMinutes > after clear-up, minutes before it, or on another day > no end of day to choose', () => {
    expect(backByMinutes('day', day, NOW + 4 * 3_600_000, ZONE)).toBeNull();
    expect(backByMinutes('day', day, NOW + 200 * 60_000, ZONE)).toBeNull();
    expect(buildDayNow([day], NOW + 86_400_000, ZONE)).toBeUndefined();
    expect(backByMinutes('day', undefined, NOW, ZONE)).toBeNull();
  });

  it('backByMinutes > a night build that clears up after midnight > counted over midnight', () => {
    const night = { ...day, doors: '12:00', clearUp: '01:00', end: '02:00' };
    expect(backByMinutes('day', night, NOW, ZONE)).toBe(653);
  });
});

describe('lendWords', () => {
  const context = {
    tool: toolRecord({ number: 'G-14' }),
    person: personRecord({}),
    nameOf: (id: string) => (id === 'wren' ? 'Wren S' : 'Lena W'),
    now: NOW,
    zone: 'Pacific/Auckland',
  };

  it('lendWords > tool out and over its time > who, since when, how much over, what to do', () => {
    const words = lendWords(
      {
        code: 'TOOL_OUT',
        details: { personId: 'wren', outAt: NOW - 5_400_000, backBy: NOW - 1_020_000 },
      },
      context,
    );
    expect(words).toEqual({
      title: 'G-14 is out already.',
      text: 'Wren S has had it since 12:37. It is 17 min over its 13:50. Take it back first, or lend another one.',
    });
  });

  it('lendWords > sign-off not countersigned > the hazard and the one thing that is missing', () => {
    expect(
      lendWords(
        { code: 'SIGN_OFF_MISSING', details: { hazard: 'hot-glue', missing: 'NOT_COUNTERSIGNED' } },
        context,
      ),
    ).toEqual({
      title: 'Kofi A has no valid hot glue sign-off.',
      text: 'They have signed. A safety lead countersigns it.',
    });
  });

  it('lendWords > tag out of use > its author, time and reason', () => {
    expect(
      lendWords({ code: 'TOOL_OUT_OF_USE', details: { reason: 'Drips.', by: 'lena', at: NOW } }, context)
        .text,
    ).toBe('Lena W tagged it at 14:07: Drips. Lend another one.');
  });
});
