import type { Duty } from '../../../shared/accounts';

export type GivenDuty = Exclude<Duty, 'volunteer'>;

/** Duties that are given, in the order of the table, with what each may do. */
export const GIVEN_DUTIES: readonly { duty: GivenDuty; may: string }[] = [
  { duty: 'organiser', may: 'plans, publishes, gives duties' },
  { duty: 'safety lead', may: 'briefs, countersigns, lifts a stop' },
  { duty: 'bench lead', may: 'checks, holds, records' },
  { duty: 'checker', may: 'checks finished steps' },
  { duty: 'crib keeper', may: 'lends tools' },
  { duty: 'muster desk', may: 'confirms who is there' },
  { duty: 'first-aider', may: 'is called for an injury' },
];
