import { useMemo } from 'react';
import type { Duty } from '../../../shared/accounts';
import type { BriefingRecord, PersonRecord } from '../../../shared/contracts/live';
import { mayCountersign } from '../../../shared/safety/countersign';
import type { AgeRules } from '../../../shared/safety/age-table';
import { useLive, useLiveMap } from '../../lib/live';
import { membershipIn, useMay, useSession } from '../../lib/session';
import { serverNow, useServerNow } from '../../lib/server-clock';
import { houseRules } from '../../lib/world';
import { adultHere, allowedWords, momentIn, refusalWords, type Allowed, type Moment } from './desk-words';
import { signOffLists, type SignOffLine, type SignOffLists } from './sign-off-lists';

/** What the desk knows, for all of its lists. */
export interface Desk {
  installationId: string;
  me: PersonRecord | null;
  may: ReturnType<typeof useMay>;
  people: ReadonlyMap<string, PersonRecord>;
  nameOf: (personId: string) => string;
  at: Moment;
  zone: string;
  lists: SignOffLists;
  ageRules: AgeRules;
}

/** The desk of one installation, from the live state. */
export function useDesk(installationId: string): Desk | null {
  const { data } = useSession();
  const may = useMay(installationId);
  const clock = useServerNow(3000);
  const people = useLiveMap(installationId, 'people');
  const signOffs = useLiveMap(installationId, 'signOffs');
  const briefings = useLiveMap(installationId, 'briefings');
  const live = useLive(installationId, (state) => state);
  // A version that counts at once counts on this page at once.
  const heard = useMemo(() => (briefings.size > 0 ? serverNow() : 0), [briefings]);
  const now = momentOfChange(Math.max(clock, heard), briefings.values());
  const lists = useMemo(
    () => signOffLists(people.values(), signOffs.values(), briefings.values(), now),
    [people, signOffs, briefings, now],
  );
  if (!live) return null;
  const [installation] = live.records.installation.values();
  const zone = installation?.timeZone ?? 'UTC';
  return {
    installationId,
    me: people.get(membershipIn(data, installationId)?.personId ?? '') ?? null,
    may,
    people,
    nameOf: (id) => people.get(id)?.name ?? 'somebody who was erased',
    at: momentIn(zone, now),
    zone,
    lists,
    ageRules: houseRules(live).ageRules,
  };
}

const MINUTE = 60_000;

/**
 * The last moment at which something may have ended or begun by the mere passing of time: a minute is close enough for what
 * expires, and a version counts from its very moment. Lists are made anew only then.
 */
function momentOfChange(now: number, briefings: Iterable<BriefingRecord>): number {
  const begun = [...briefings]
    .flatMap(({ versions }) => versions.map(({ effectiveFrom }) => effectiveFrom))
    .filter((from) => from <= now);
  return Math.max(Math.floor(now / MINUTE) * MINUTE, ...begun);
}

const onSiteWith = ({ people }: Desk, duty: Duty, but: string): string[] =>
  [...people.values()]
    .filter((person) => person.onSite && !person.removed && person.id !== but && person.duties.includes(duty))
    .map(({ name }) => name);

/** Whether whoever is signed in may countersign a line. */
export type CountersignOffer = { ok: true; as: 'safety lead' | 'organiser' } | { ok: false; why: string };

/** The answer of the one rule, in words; null for somebody who never countersigns anything. */
export function countersignOffer(
  desk: Desk,
  { person, briefing, signOff }: SignOffLine,
): CountersignOffer | null {
  const { me, may, people, at } = desk;
  if (!me || !may('briefing.countersign')) return null;
  const verdict = mayCountersign({
    lead: { personId: me.id, duties: me.duties },
    signOff,
    safetyLeadsOnSite: [...people.values()]
      .filter((one) => one.onSite && !one.removed && one.duties.includes('safety lead'))
      .map(({ id }) => id),
    context: { versions: briefing.versions, now: at.now },
  });
  if (!verdict.ok) {
    const leads = onSiteWith(desk, 'safety lead', person.id);
    const organisers = onSiteWith(desk, 'organiser', person.id);
    return { ok: false, why: refusalWords(verdict.refusal, { name: person.name, leads, organisers }) };
  }
  if (!person.confirmed)
    return {
      ok: false,
      why: `First the muster desk confirms ${person.name} and the age band. The signature is kept.`,
    };
  return { ok: true, as: verdict.value.as };
}

/** What a line opens for its person; null where the age band is not known here. */
export function allowedFor({ ageRules, people }: Desk, { person, briefing }: SignOffLine): Allowed | null {
  if (!person.details) return null;
  const { ageBand, adultName } = person.details;
  const adult = adultHere(adultName, people.values()) ? adultName : null;
  return allowedWords(ageRules, ageBand, briefing.hazards, adult);
}
