import type { Refusal, Step } from '../../../shared/travellers';
import { HAZARD_LABELS } from '../../../shared/safety';

const hazardOf = (details: Record<string, unknown>) =>
  (HAZARD_LABELS as Partial<Record<string, string>>)[String(details.hazard)] ?? 'this hazard';

/** A count as it stands in the details of a refusal. */
const count = (value: unknown) => (typeof value === 'number' ? String(value) : '?');

/**
 * A refusal in plain words, for whoever talks to the API. The client says it with names and local times from its own
 * catalogue; it never reads this text.
 */
export function refusalWords({ code, details }: Refusal, step: Pick<Step, 'name'>): string {
  switch (code) {
    case 'STEP_CREW_FULL':
      return `All ${count(details.places)} places on ${step.name} are taken. Take another step.`;
    case 'STEP_NOT_READY':
      return Array.isArray(details.waitsForPieces)
        ? `${step.name} waits until ${details.waitsForPieces.join(' and ')} ${details.waitsForPieces.length === 1 ? 'has' : 'have'} passed. It opens by itself.`
        : `${step.name} waits for an earlier step to pass. It opens by itself.`;
    case 'STEP_HELD':
      return `${step.name} is held. Ask whoever holds it.`;
    case 'STEP_NOT_HELD':
      return `${step.name} is not held any more.`;
    case 'STEP_STATE':
      return `${step.name} has moved on meanwhile. Look at it again.`;
    case 'STEP_ALREADY_YOURS':
      return `You have ${step.name} in hand already.`;
    case 'STEP_NOT_YOURS':
      return `You do not have ${step.name} in hand. Take it first.`;
    case 'STEP_CREW_TOO_SMALL':
      return `${step.name} needs ${count(details.needed)} people to start; ${count(details.crew)} have taken it.`;
    case 'STEP_NOT_STARTED':
      return `Start ${step.name} before you finish it.`;
    case 'STEP_CLOCK_RUNNING':
      return `The paint is not ready for ${step.name} yet. Wait until its clock has run out.`;
    case 'IN_HAND_LIMIT':
      return `You have ${count(details.limit)} steps in hand, which is the most. Finish one or give one back.`;
    case 'SIGN_OFF_MISSING':
      return `${step.name} needs your ${hazardOf(details)} sign-off. Read the briefing, answer, sign, and ask a safety lead to countersign.`;
    case 'AGE_RULE':
      return `${step.name} is not for your age. Take another step; My bench shows which.`;
    case 'STOP_ACTIVE':
      return `A stop covers ${step.name}. Make safe and wait until a safety lead lifts it.`;
    case 'PERSON_NOT_CONFIRMED':
      return 'The muster desk has not confirmed you yet. Go there and say your name.';
    case 'CHECKER_DID_WORK':
      return `You worked on ${step.name}, so a second person has to check it.`;
    case 'CHECKER_NEEDED':
      return 'Checks are for bench leads and checkers. Ask one of them.';
    case 'HAND_OVER_NOT_OFFERED':
      return `${step.name} is not offered to you any more.`;
    case 'HAND_OVER_TO_SELF':
      return `That person has a place on ${step.name} already. Choose somebody else.`;
    case 'REWORK_TARGET':
      return 'Send it back to this step or an earlier one of the same traveller.';
    case 'OFFLINE_CLAIM_EXPIRED':
      return 'You asked for this place more than two minutes ago, without network. Ask again if you still want it.';
  }
}
