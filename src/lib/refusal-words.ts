import type { StepRecord } from '../../shared/contracts/live';
import type { AgeActivity } from '../../shared/safety/age-rules';
import { formatTime } from './formats';
import type { Messages } from './messages';

/** A refusal as the pure rules or the server give it. */
export interface AnyRefusal {
  code: string;
  details: Record<string, unknown>;
}

/** What words of a refusal are made from. */
export interface RefusalContext {
  messages: Messages;
  /** IANA zone of the installation. */
  zone: string;
  /** `V-14 lay out`. */
  what: string;
  step: Pick<StepRecord, 'state' | 'dryUntil' | 'held'>;
  /** First name and initial of a person, or a word for somebody. */
  nameOf: (personId: string) => string;
}

const text = (value: unknown): string => (typeof value === 'string' ? value : '');
const number = (value: unknown): number => (typeof value === 'number' ? value : 0);

/** Full years from which an age band's rule allows, for `16 and over`. */
const BAND_FROM: Record<string, number> = { '18+': 18, '16-17': 16, '13-15': 13, '9-12': 9, 'under-9': 0 };

/**
 * Why somebody may not, and the way to change it, in the volunteers' words.
 * @param refusal code and details
 * @returns a sentence or two; the catalogue's plain failure when the code is none of the step rules
 */
export function refusalText(refusal: AnyRefusal, context: RefusalContext): string {
  const { messages, zone, what, step, nameOf } = context;
  const { refusals, common } = messages;
  const { code, details } = refusal;
  switch (code) {
    case 'STEP_CREW_FULL':
      return refusals.STEP_CREW_FULL(
        what,
        number(details.places),
        Array.isArray(details.crew) ? details.crew.map((id) => nameOf(text(id))) : [],
      );
    case 'STEP_NOT_READY':
      if (Array.isArray(details.waitsForPieces))
        return refusals.STEP_NOT_READY_PIECES(details.waitsForPieces.map(text));
      return details.waitsForName
        ? refusals.STEP_NOT_READY(text(details.waitsForName))
        : refusals.STEP_NOT_READY_KIT;
    case 'STEP_HELD':
      return refusals.STEP_HELD(nameOf(text(details.by)), sentence(text(details.reason)));
    case 'STEP_STATE':
      return step.state === 'drying' && step.dryUntil !== null
        ? refusals.STEP_DRYING(formatTime(step.dryUntil, zone))
        : refusals.STEP_STATE;
    case 'STEP_CLOCK_RUNNING':
      return refusals.STEP_CLOCK_RUNNING(text(details.coat), formatTime(number(details.until), zone));
    case 'STEP_CREW_TOO_SMALL':
      return refusals.STEP_CREW_TOO_SMALL(number(details.crew), number(details.needed));
    case 'IN_HAND_LIMIT':
      return refusals.IN_HAND_LIMIT(number(details.limit));
    case 'SIGN_OFF_MISSING':
      return signOffText(details, messages);
    case 'AGE_RULE':
      return ageText(details, messages);
    case 'CHECKER_DID_WORK':
      return refusals.CHECKER_DID_WORK(what);
    default: {
      const plain = (refusals as unknown as Record<string, unknown>)[code];
      return typeof plain === 'string' ? plain : common.failed;
    }
  }
}

const sentence = (words: string) => (/[.!?]$/.test(words) ? words : `${words}.`);

function signOffText(details: Record<string, unknown>, { refusals, common }: Messages): string {
  const hazard = (common.hazards as Partial<Record<string, string>>)[text(details.hazard)] ?? '';
  const says = (refusals.SIGN_OFF as Record<string, unknown>)[text(details.missing)];
  return typeof says === 'function'
    ? (says as (hazard: string) => string)(hazard)
    : refusals.SIGN_OFF.NOT_READ(hazard);
}

function ageText(details: Record<string, unknown>, { refusals, common }: Messages): string {
  const says = (refusals.AGE_RULE as Record<string, unknown>)[text(details.rule)];
  const from = BAND_FROM[text(details.from)] ?? 18;
  const rule =
    typeof says === 'function' ? (says as (from: number) => string)(from) : refusals.AGE_RULE.other;
  const instead = (Array.isArray(details.alternatives) ? (details.alternatives as AgeActivity[]) : [])
    .slice(0, 3)
    .map((activity) => common.activities[activity]);
  return instead.length > 0 ? `${rule} ${refusals.AGE_RULE.instead(instead)}` : rule;
}
