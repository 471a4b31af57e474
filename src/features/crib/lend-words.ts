import type { PersonRecord, ToolRecord } from '../../../shared/contracts/live';
import type { LendRefusal } from '../../../shared/crib/decide-lend';
import { ageRefusalText, type AgeLimit } from '../../../shared/safety/age-rules';
import { HAZARD_LABELS } from '../../../shared/safety/hazards';
import { formatDuration } from '../../lib/formats';
import { timeWords } from './back-by';

/** What the words of a refusal are made from. */
export interface LendContext {
  tool: ToolRecord;
  person: PersonRecord;
  nameOf: (personId: string) => string;
  now: number;
  zone: string;
}

/** A refusal in words for the keeper: what happened, in madder, and what it means and what to do. */
export interface LendWords {
  title: string;
  text: string;
}

/** What is still missing of a sign-off, and who does it. */
const MISSING: Record<string, string> = {
  NOT_READ: 'They have not read the briefing yet. It takes a few minutes on their phone.',
  NOT_PASSED: 'They answer the question sheet once more on their phone.',
  TALK_NEEDED: 'A safety lead talks to them first: they missed a question twice.',
  NOT_SIGNED: 'They have answered rightly and still have to sign on their phone.',
  NOT_COUNTERSIGNED: 'They have signed. A safety lead countersigns it.',
  EXPIRED: 'It has run out. They read, answer and sign again.',
  REVOKED: 'A safety lead took it back. Send them to a safety lead.',
  VOIDED_BY_CHANGE: 'The briefing has changed since. They read what is new, answer and sign.',
  AGE_NOT_CONFIRMED: 'The muster desk has not confirmed their age.',
  NO_BRIEFING: 'There is no briefing for it here. Ask a safety lead.',
};

export function lendWords(refusal: LendRefusal, context: LendContext): LendWords {
  const { tool, person, nameOf, now, zone } = context;
  const time = (ms: number) => timeWords(ms, now, zone);
  const what = `${tool.number} ${tool.name}`;
  switch (refusal.code) {
    case 'TOOL_OUT_OF_USE': {
      const { reason, by, at } = refusal.details;
      return {
        title: `${tool.number} is out of use.`,
        text: `${nameOf(by)} tagged it at ${time(at)}: ${reason} Lend another one.`,
      };
    }
    case 'TOOL_OUT': {
      const { personId, outAt, backBy } = refusal.details;
      const due =
        backBy < now
          ? `It is ${formatDuration((now - backBy) / 1000)} over its ${time(backBy)}.`
          : `It is due back by ${time(backBy)}.`;
      return {
        title: `${tool.number} is out already.`,
        text: `${nameOf(personId)} has had it since ${time(outAt)}. ${due} Take it back first, or lend another one.`,
      };
    }
    case 'PERSON_NOT_CONFIRMED':
      return {
        title: `${person.name} has not been to the muster desk.`,
        text: 'Tools go to people whom the desk has confirmed. Send them there; it takes half a minute.',
      };
    case 'PERSON_NOT_ON_SITE':
      return {
        title: `${person.name} is signed out for today.`,
        text: 'Send them to the muster desk to come in again.',
      };
    case 'STOP_ACTIVE':
      return {
        title: `A stop covers ${what}.`,
        text: 'It stays in the crib until a safety lead lifts the stop. Taking tools back goes on.',
      };
    case 'AGE_RULE':
      return { title: `Not for ${person.name}.`, text: ageRefusalText(refusal.details, tool.name) };
    case 'SIGN_OFF_MISSING': {
      const { hazard, missing } = refusal.details;
      return {
        title: `${person.name} has no valid ${HAZARD_LABELS[hazard]} sign-off.`,
        text: MISSING[missing] ?? 'They read the briefing, answer and sign, and a safety lead countersigns.',
      };
    }
  }
}

/** What to say when handing a tool to somebody under 18. */
export function limitWords({ key, params }: AgeLimit): string {
  switch (key) {
    case 'low-temperature-gun-only':
      return 'Low-temperature guns only.';
    case 'still-burns':
      return 'It still burns: say so.';
    case 'constant-supervision':
      return 'Only with somebody beside them all the time.';
    case 'no-powered-saw':
      return 'No powered saw.';
    case 'ladder-height':
      return `Not above ${Number(params.mm) / 1000} m on the ladder.`;
    case 'adult-at-bench':
      return 'Their adult stays at the same bench.';
  }
}
