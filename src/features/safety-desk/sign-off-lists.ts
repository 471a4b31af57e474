import type { BriefingRecord, PersonRecord, SignOffRecord } from '../../../shared/contracts/live';
import { bestSignOff, type SignOffProblem } from '../../../shared/safety/sign-off';

/** One sign-off as the desk lists it. */
export interface SignOffLine {
  person: PersonRecord;
  briefing: BriefingRecord;
  signOff: SignOffRecord;
  validity: 'valid' | SignOffProblem;
}

/** Everything a safety lead looks after, sorted by what is to be done. */
export interface SignOffLists {
  /** Signed and not countersigned, longest waiting first. */
  waiting: SignOffLine[];
  /** A question was missed twice. */
  talks: SignOffLine[];
  /** Not passed or not signed yet, or ended: the person does something next. */
  notYet: SignOffLine[];
  /** Countersigned and in force, by name. */
  signedOff: SignOffLine[];
  /** On site and not begun, by briefing. */
  notBegun: { briefing: BriefingRecord; people: PersonRecord[] }[];
}

const byName = new Intl.Collator('en', { numeric: true });
const inOrderOfName = (a: SignOffLine, b: SignOffLine): number =>
  byName.compare(a.person.name, b.person.name) || a.person.number - b.person.number;

/** Briefing and person together; neither's id has a space in it. */
const ownerKey = (briefingKey: string, personId: string) => `${briefingKey} ${personId}`;

/**
 * Sorts the sign-offs of an installation.
 * @param now the server's time, ms UTC
 */
export function signOffLists(
  people: Iterable<PersonRecord>,
  signOffs: Iterable<SignOffRecord>,
  briefings: Iterable<BriefingRecord>,
  now: number,
): SignOffLists {
  const lists: SignOffLists = { waiting: [], talks: [], notYet: [], signedOff: [], notBegun: [] };
  const ownOf = new Map<string, SignOffRecord[]>();
  for (const signOff of signOffs) {
    const key = ownerKey(signOff.briefingKey, signOff.personId);
    ownOf.set(key, [...(ownOf.get(key) ?? []), signOff]);
  }
  const here = [...people].filter((person) => !person.removed);
  for (const briefing of briefings) {
    const notBegun: PersonRecord[] = [];
    for (const person of here) {
      const own = ownOf.get(ownerKey(briefing.key, person.id)) ?? [];
      if (!sortIn(lists, person, briefing, own, now) && person.onSite) notBegun.push(person);
    }
    notBegun.sort((a, b) => byName.compare(a.name, b.name));
    lists.notBegun.push({ briefing, people: notBegun });
  }
  lists.waiting.sort((a, b) => (a.signOff.signedAt ?? 0) - (b.signOff.signedAt ?? 0));
  lists.talks.sort(inOrderOfName);
  lists.notYet.sort(inOrderOfName);
  lists.signedOff.sort(inOrderOfName);
  return lists;
}

/** Puts one person's sign-offs for one briefing where they belong; false when there is nothing to list. */
function sortIn(
  lists: SignOffLists,
  person: PersonRecord,
  briefing: BriefingRecord,
  own: readonly SignOffRecord[],
  now: number,
): boolean {
  const context = { versions: briefing.versions, now, ageConfirmed: person.confirmed };
  const revoked = own.filter((signOff) => signOff.revokedAt !== null);
  // Somebody whose sign-off still holds may have signed the next version ahead: that one waits all the same.
  for (const signOff of own) {
    if (signOff.revokedAt !== null) continue;
    const { validity } = bestSignOff([...revoked, signOff], context);
    const line = { person, briefing, signOff, validity };
    if (validity === 'NOT_COUNTERSIGNED') lists.waiting.push(line);
    if (validity === 'TALK_NEEDED') lists.talks.push(line);
  }
  const best = bestSignOff(own, context);
  const signOff = own.find((one) => one.id === best.signOff?.id);
  if (!signOff || best.validity === 'NOT_READ') return false;
  const line = { person, briefing, signOff, validity: best.validity };
  if (best.validity === 'valid' || best.validity === 'AGE_NOT_CONFIRMED') lists.signedOff.push(line);
  else if (best.validity !== 'NOT_COUNTERSIGNED' && best.validity !== 'TALK_NEEDED') lists.notYet.push(line);
  return true;
}

/** How many questions were right at the last try; null before the first. */
export function questionsRight(signOff: Pick<SignOffRecord, 'attempts'>, questions: number): number | null {
  const last = signOff.attempts.at(-1);
  return last ? Math.max(0, questions - last.wrongIds.length) : null;
}
