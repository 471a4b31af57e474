import { describe, expect, it } from 'vitest';
import {
  counted,
  formatCalendarDay,
  formatDuration,
  formatSecond,
  formatTime,
  listed,
  minutesBetween,
  minutesOf,
  timeOfDay,
} from '../../../src/lib/formats';

describe('formats', () => {
  it('minutesOf, timeOfDay > there and back > the same; past midnight it starts over', () => {
    expect(minutesOf('14:07')).toBe(847);
    expect(timeOfDay(847)).toBe('14:07');
    expect(timeOfDay(24 * 60 + 5)).toBe('00:05');
    expect(timeOfDay(-5)).toBe('23:55');
  });

  it('minutesBetween > over midnight > counted forward', () => {
    expect(minutesBetween('09:00', '18:30')).toBe(570);
    expect(minutesBetween('22:00', '01:00')).toBe(180);
  });

  it("formatTime > an instant > the installation's local time, not the machine's", () => {
    const at = Date.UTC(2025, 5, 14, 12, 7, 31);
    expect(formatTime(at, 'Europe/Berlin')).toBe('14:07');
    expect(formatTime(at, 'America/New_York')).toBe('08:07');
    expect(formatSecond(at, 'Europe/Berlin')).toBe('14:07:31');
  });

  it('formatTime > midnight > 00, not 24', () => {
    expect(formatTime(Date.UTC(2025, 5, 14, 22, 0), 'Europe/Berlin')).toBe('00:00');
  });

  it('formatCalendarDay > a date without a zone > that very day', () => {
    expect(formatCalendarDay('2025-06-14')).toBe('Sat 14 June');
  });

  it('formatDuration > seconds > whole minutes and hours in words', () => {
    expect([20, 360, 3600, 4800].map(formatDuration)).toEqual([
      'less than a minute',
      '6 min',
      '1 h',
      '1 h 20 min',
    ]);
  });

  it('counted, listed > one, several, none > proper words', () => {
    expect([counted(1, 'place'), counted(2, 'place'), counted(1200, 'person', 'people')]).toEqual([
      '1 place',
      '2 places',
      '1,200 people',
    ]);
    expect([listed([]), listed(['Sol V']), listed(['Sol V', 'Mei T', 'Rafi B'])]).toEqual([
      '',
      'Sol V',
      'Sol V, Mei T and Rafi B',
    ]);
  });
});
