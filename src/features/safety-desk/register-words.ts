import type { RegisterRowView } from '../../../shared/contracts/safety';
import { AGE_BAND_LABELS, AGE_BANDS } from '../../../shared/safety/hazards';
import type { Moment } from './desk-words';

/** What each kind of row says happened. */
export const KIND_WORDS: Record<string, string> = {
  signed: 'signed',
  countersigned: 'countersigned',
  revoked: 'revoked',
  voided: 'earlier sign-offs end',
  talked: 'talked with a lead',
  erased: 'person erased',
  'version-published': 'version published',
};

/** Whom a row is about; empty for a row about no person. */
export function whoOf({ ids, personal }: Pick<RegisterRowView, 'ids' | 'personal'>): string {
  if (personal === null) return 'erased';
  return personal.name ?? (ids.personId === undefined ? '' : 'without a name');
}

/** What a row is about, in a few words: the briefing, the age band, who did it, from when. */
export function detailOf(
  { ids, personal }: Pick<RegisterRowView, 'ids' | 'personal'>,
  names: { person: (id: string) => string; briefing: (key: string) => string },
  at: Moment,
): string {
  const band = AGE_BANDS.find((one) => one === personal?.ageBand);
  // Where a row is about no other person, the one it names is the one who did it.
  const by = ids.by === undefined || ids.personId === undefined ? '' : `by ${names.person(String(ids.by))}`;
  return [
    ids.briefingKey === undefined
      ? ''
      : `${personal?.briefing ?? names.briefing(String(ids.briefingKey))} ${ids.version ?? ''}`.trim(),
    band ? AGE_BAND_LABELS[band] : '',
    by === '' || ids.as === undefined ? by : `${by} as ${ids.as}`,
    ids.proposedBy === undefined ? '' : `proposed by ${names.person(String(ids.proposedBy))}`,
    ids.effectiveFrom === undefined
      ? ''
      : `from ${at.date(Number(ids.effectiveFrom))} ${at.time(Number(ids.effectiveFrom))}`,
    personal?.reason === undefined ? '' : `“${personal.reason}”`,
  ]
    .filter((part) => part !== '')
    .join(', ');
}

/** What a fault of the chain means, and what to do. */
export function faultWords(why: string): string {
  switch (why) {
    case 'altered row':
      return 'its contents are not what was written';
    case 'broken link':
      return 'it does not follow from the row before: one of the two was replaced';
    case 'missing row':
      return 'it is gone';
    case 'out of order':
      return 'its number stands twice or out of order';
    case 'altered personal fields':
      return 'the name or another personal field beside it was changed';
    case 'personal fields removed':
      return 'the personal fields beside it are gone without an erasure';
    default:
      return why;
  }
}
