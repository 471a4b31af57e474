import { describe, expect, it } from 'vitest';
import type { BuildDayRecord } from '../../../shared/contracts/live';
import { timeWords } from '../../../src/features/crib/back-by';
import { lineWindow } from '../../../src/features/crib/line-window';
import { personOffer, personProblem, readPerson, readTool } from '../../../src/features/crib/scan';
import type { ToolOut } from '../../../src/features/crib/use-crib';
import { checkoutRecord, NOW, personRecord, toolRecord } from '../board/fixtures';

const MIN = 60_000;
const HOUR = 60 * MIN;
const ZONE = 'Pacific/Auckland';

const people = [
  personRecord({ id: 'mei-t', name: 'Mei T', number: 4 }),
  personRecord({ id: 'mei-too', name: 'Mei T', number: 40 }),
  personRecord({ id: 'zoe', name: 'Zoë N', number: 7 }),
];

describe('readPerson', () => {
  it('readPerson > what the field offers, chosen > that person, also where two have one name', () => {
    for (const person of people) expect(readPerson(personOffer(person), people)).toBe(person);
  });

  it('readPerson > a link cut off inside a coded letter > nobody, and no error', () => {
    expect(readPerson('https://hall.example/p/%E0%A', people)).toBeNull();
    expect(readTool('https://hall.example/t/%E0%A', [])).toBeNull();
  });

  it('readPerson > a link whose name is coded > that person', () => {
    expect(readPerson('https://hall.example/p/Zo%C3%AB%20N', people)?.id).toBe('zoe');
  });
});

describe('personProblem', () => {
  it('personProblem > two of one name, a number, a name, a tool’s number > each said with what to type instead', () => {
    expect(personProblem('mei t', people)).toBe('2 people are called Mei T: 4, 40. Type the number.');
    expect(personProblem('99', people)).toBe('Nobody here has the number 99. Ask at the muster desk.');
    expect(personProblem('Mei', people)).toContain('Nobody here is called Mei.');
    expect(personProblem('G-77', people)).toContain('No tool has the number G-77.');
  });
});

describe('timeWords', () => {
  it('timeWords > today, and yesterday evening in the hall’s zone > the day is said only for the other', () => {
    expect(timeWords(NOW - HOUR, NOW, ZONE)).toBe('13:07');
    expect(timeWords(NOW - 20 * HOUR, NOW, ZONE)).toBe('18:07 on Fri 13 June');
  });
});

describe('lineWindow', () => {
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
  const out = (outAt: number, backBy: number): ToolOut => ({
    checkout: checkoutRecord({ outAt, backBy }),
    tool: toolRecord({}),
    late: backBy < NOW,
  });

  it('lineWindow > lent at 12:37, due at 14:37 > whole hours from the first lent to clear-up', () => {
    const line = lineWindow({
      out: [out(NOW - 90 * MIN, NOW + 30 * MIN)],
      day,
      now: NOW,
      zone: ZONE,
    });
    expect([line.opens, line.closes]).toEqual(['12:00', '17:30']);
    expect(line.place(NOW)).toBe('14:07');
  });

  it('lineWindow > one that should have come back yesterday > starts at the edge, late, and the others keep their room', () => {
    const old = out(NOW - 22 * HOUR, NOW - 20 * HOUR);
    const line = lineWindow({ out: [old], day, now: NOW, zone: ZONE });
    expect(line.opens).toBe('06:00');
    expect([line.place(old.checkout.outAt), line.place(old.checkout.backBy)]).toEqual(['06:00', '06:00']);
    expect(line.place(NOW)).toBe('14:07');
  });

  it('lineWindow > lent until tomorrow evening > ends half a day ahead', () => {
    const line = lineWindow({ out: [out(NOW, NOW + 24 * HOUR)], day, now: NOW, zone: ZONE });
    expect([line.opens, line.closes]).toEqual(['14:00', '03:00']);
    expect(line.place(NOW + 24 * HOUR)).toBe('03:00');
  });

  it('lineWindow > a zone half an hour off, after clear-up, nothing out > the hour that runs there', () => {
    // 02:07 UTC is 07:37 in Kolkata.
    const line = lineWindow({
      out: [],
      day: { ...day, doors: '05:00', clearUp: '07:00' },
      now: NOW,
      zone: 'Asia/Kolkata',
    });
    expect([line.opens, line.closes]).toEqual(['07:00', '08:00']);
  });
});
