import type { LendRefusal } from '../../../shared/crib';
import { ageRefusalText, HAZARD_LABELS } from '../../../shared/safety';
import type { LoadedTool } from './crib.repository';

/** Names for the words of a refusal: who asks, who has the tool, who tagged it. */
export interface LendNames {
  borrower: string;
  holder: string;
  tagger: string;
}

/** A span of time in whole minutes, such as `12 min` or `1 h 30 min`: right in every time zone. */
function span(ms: number): string {
  const minutes = Math.max(1, Math.round(ms / 60_000));
  const [hours, rest] = [Math.floor(minutes / 60), minutes % 60];
  return [...(hours > 0 ? [`${hours} h`] : []), ...(rest > 0 ? [`${rest} min`] : [])].join(' ');
}

/**
 * Why a tool stays in the crib, in words for the keeper: what happened, what it means, what to do next.
 * @param now ms UTC, for how long ago and how soon
 */
export function lendWords(refusal: LendRefusal, tool: LoadedTool, names: LendNames, now: number): string {
  const what = `${tool.number} ${tool.name}`;
  const { borrower } = names;
  switch (refusal.code) {
    case 'TOOL_OUT': {
      const { outAt, backBy } = refusal.details;
      const due =
        backBy < now ? `was due back ${span(now - backBy)} ago` : `is due back in ${span(backBy - now)}`;
      return `${what} is out already: ${names.holder} has had it for ${span(now - outAt)}, and it ${due}. Take it back first, or lend another one.`;
    }
    case 'TOOL_OUT_OF_USE': {
      const { reason, at } = refusal.details;
      return `${what} is out of use: ${names.tagger} tagged it ${span(now - at)} ago, "${reason}". Lend another one.`;
    }
    case 'PERSON_NOT_CONFIRMED':
      return `The muster desk has not confirmed ${borrower} yet. Send them there first.`;
    case 'PERSON_NOT_ON_SITE':
      return `${borrower} is signed out for today. Send them to the muster desk first.`;
    case 'STOP_ACTIVE':
      return `A stop covers ${what}. It stays in the crib until a safety lead lifts the stop.`;
    case 'AGE_RULE':
      return `Not for ${borrower}. ${ageRefusalText(refusal.details, tool.name)}`;
    case 'SIGN_OFF_MISSING':
      return `${borrower} has no valid ${HAZARD_LABELS[refusal.details.hazard]} sign-off. They read the briefing, answer and sign on their phone, and a safety lead countersigns.`;
  }
}
