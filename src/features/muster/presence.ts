import type { Duty } from '../../../shared/accounts';
import type { PersonRecord } from '../../../shared/contracts/live';

/** The people of an installation as the desk sorts them. */
export interface Presence {
  /** Joined and not yet seen by the desk, longest waiting first. */
  waiting: PersonRecord[];
  /** On site, by name. */
  present: PersonRecord[];
  /** Signed out today, the last first. */
  gone: PersonRecord[];
}

const byName = new Intl.Collator('en', { numeric: true });

/** Who waits, who is there, who has left. Removed people are nowhere. */
export function presenceOf(people: Iterable<PersonRecord>): Presence {
  const presence: Presence = { waiting: [], present: [], gone: [] };
  for (const person of people) {
    if (person.removed) continue;
    if (person.onSite) presence.present.push(person);
    else if (person.details?.leftAt != null) presence.gone.push(person);
    else presence.waiting.push(person);
  }
  presence.waiting.sort((a, b) => (a.details?.joinedAt ?? 0) - (b.details?.joinedAt ?? 0));
  presence.present.sort((a, b) => byName.compare(a.name, b.name) || a.number - b.number);
  presence.gone.sort((a, b) => (b.details?.leftAt ?? 0) - (a.details?.leftAt ?? 0));
  return presence;
}

const plain = (name: string) =>
  name
    .toLowerCase()
    .replace(/[\s.]+/g, ' ')
    .trim();

/** The present adult a minor named, by first name and initial; the first name alone is enough where only one has it. */
export function adultOnSite(
  named: string | null | undefined,
  present: readonly PersonRecord[],
): PersonRecord | null {
  if (!named) return null;
  const wanted = plain(named);
  const adults = present.filter((person) => person.details?.ageBand === '18+');
  const exact = adults.find((person) => plain(person.name) === wanted);
  if (exact) return exact;
  const sameFirst = adults.filter((person) => plain(person.name).split(' ')[0] === wanted.split(' ')[0]);
  const whole = wanted.includes(' ');
  return !whole && sameFirst.length === 1 ? (sameFirst[0] ?? null) : null;
}

/** People whose name or number has what was typed. */
export function found(people: readonly PersonRecord[], typed: string): PersonRecord[] {
  const wanted = plain(typed);
  if (wanted === '') return [...people];
  return people.filter(
    (person) => plain(person.name).includes(wanted) || String(person.number).startsWith(wanted),
  );
}

/** Duties that a hall needs somebody for, in the order the desk reads them. */
export const WANTED_DUTIES: readonly Duty[] = [
  'first-aider',
  'safety lead',
  'bench lead',
  'checker',
  'crib keeper',
  'muster desk',
  'organiser',
];

/** Who is present with a duty. */
export const presentWith = (present: readonly PersonRecord[], duty: Duty): PersonRecord[] =>
  present.filter((person) => person.duties.includes(duty));
