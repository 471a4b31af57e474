import { describe, expect, it } from 'vitest';
import type { PersonRecord } from '../../../shared/contracts/live';
import { adultOnSite, found, presenceOf, presentWith } from '../../../src/features/muster/presence';
import { NOW, personRecord } from './fixtures';

type Details = NonNullable<PersonRecord['details']>;
function person(
  name: string,
  number: number,
  details: Partial<Details> = {},
  change: Partial<PersonRecord> = {},
) {
  const base = personRecord({}).details as Details;
  return personRecord({ id: name, name, number, details: { ...base, ...details }, ...change });
}

describe('presenceOf', () => {
  it('presenceOf > joined, confirmed, left, removed > each in one list, longest waiting first, last to leave first', () => {
    const away = { confirmed: true, onSite: false };
    const presence = presenceOf([
      person('Zoe N', 4),
      person('Ada K', 9),
      person(
        'Fenn W',
        11,
        { joinedAt: NOW - 60_000, confirmedAt: null },
        { confirmed: false, onSite: false },
      ),
      person(
        'Sana R',
        10,
        { joinedAt: NOW - 90_000, confirmedAt: null },
        { confirmed: false, onSite: false },
      ),
      person('Edda S', 2, { leftAt: NOW - 500 }, away),
      person('Gus N', 3, { leftAt: NOW - 100 }, away),
      person('Otto F', 5, {}, { removed: true }),
    ]);
    const names = (list: readonly PersonRecord[]) => list.map(({ name }) => name);
    expect(names(presence.waiting)).toEqual(['Sana R', 'Fenn W']);
    expect(names(presence.present)).toEqual(['Ada K', 'Zoe N']);
    expect(names(presence.gone)).toEqual(['Gus N', 'Edda S']);
  });
});

describe('adultOnSite', () => {
  const present = [
    person('Mei T', 1),
    person('Mei L', 2),
    person('Kofi A', 3),
    person('Lulu A', 4, { ageBand: '9-12' }),
  ];
  it('adultOnSite > name as written, in any case > found; a first name two have, a child, nobody > not', () => {
    expect(adultOnSite('mei t.', present)?.number).toBe(1);
    expect(adultOnSite('Kofi', present)?.number).toBe(3);
    expect(adultOnSite('Mei', present)).toBeNull();
    expect(adultOnSite('Kofi B', present)).toBeNull();
    expect(adultOnSite('Lulu A', present)).toBeNull();
    expect(adultOnSite('', present)).toBeNull();
    expect(adultOnSite(null, present)).toBeNull();
  });
});

describe('found', () => {
  it('found > part of a name or the beginning of a number > those people; nothing typed > all', () => {
    const people = [person('Ada K', 7), person('Kadir A', 70), person('Zoe N', 17)];
    expect(found(people, 'ad').map(({ number }) => number)).toEqual([7, 70]);
    expect(found(people, '7').map(({ number }) => number)).toEqual([7, 70]);
    expect(found(people, ' ')).toHaveLength(3);
    expect(found(people, 'xyz')).toEqual([]);
  });

  it('presentWith > a duty > those who hold it', () => {
    const aider = person('Lena W', 1, {}, { duties: ['first-aider'] });
    expect(presentWith([aider, person('Ada K', 2)], 'first-aider')).toEqual([aider]);
  });
});
