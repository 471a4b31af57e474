import { counted, listed } from '../formats';

/** Why not, and the way to change it; one per error code. `what` is the piece's code and the step, `V-14 lay out`. */
export const refusals = {
  titles: {
    notYet: (what: string) => `${what}: not yet.`,
  },
  STEP_CREW_FULL: (what: string, places: number, names: readonly string[]) =>
    `${what} has ${counted(places, 'place')}, and ${names.length > 0 ? listed(names) : 'somebody'} ${names.length > 1 ? 'have' : 'has'} ${places === 1 ? 'it' : 'them'}. Take another step.`,
  STEP_NOT_READY: (before: string) => `Not before ${before} has passed. It moves up to your list by itself.`,
  STEP_NOT_READY_PIECES: (codes: readonly string[]) =>
    `Not before ${listed(codes)} ${codes.length === 1 ? 'has' : 'have'} passed: the pieces meet here. It moves up to your list by itself.`,
  STEP_NOT_READY_KIT: 'Something it needs is not there yet. It moves up to your list by itself.',
  STEP_HELD: (name: string, reason: string) =>
    `Held by ${name}: ${reason} Only ${name} or another safety lead lifts it.`,
  STEP_NOT_HELD: 'It is not held any more.',
  STEP_STATE: 'It has gone on meanwhile. Look at it again.',
  STEP_DRYING: (time: string) => `Not before ${time}: it dries. It moves up to your list by itself.`,
  STEP_CLOCK_RUNNING: (coat: string, time: string) =>
    `Not before ${time}: the paint of ${coat} has to be ready for it. It moves up to your list by itself.`,
  STEP_ALREADY_YOURS: 'You have it in hand already.',
  STEP_NOT_YOURS: 'You do not have it in hand. Somebody may have taken it over; look at the board.',
  STEP_CREW_TOO_SMALL: (have: number, needed: number) =>
    `It needs ${counted(needed, 'person', 'people')} to start, and ${counted(have, 'has', 'have')} taken it. Ask somebody near you to take a place.`,
  STEP_NOT_STARTED: 'Start it first, then finish it.',
  IN_HAND_LIMIT: (limit: number) =>
    `You have ${counted(limit, 'step')} in hand, and nobody has more. Finish one or give one back.`,
  SIGN_OFF: {
    NOT_READ: (hazard: string) => `Needs your ${hazard} sign-off. Read the briefing, answer and sign.`,
    NOT_PASSED: (hazard: string) => `Needs your ${hazard} sign-off. Answer its question sheet again.`,
    TALK_NEEDED: (hazard: string) =>
      `Needs your ${hazard} sign-off. Talk to a safety lead first: two tries went wrong.`,
    NOT_SIGNED: (hazard: string) => `Needs your ${hazard} sign-off. You answered rightly; sign it.`,
    NOT_COUNTERSIGNED: (hazard: string) =>
      `You signed the ${hazard} briefing. Ask a safety lead to countersign it.`,
    EXPIRED: (hazard: string) =>
      `Your ${hazard} sign-off has run out. Read the briefing, answer and sign again.`,
    REVOKED: (hazard: string) => `A safety lead took your ${hazard} sign-off back. Talk to them.`,
    VOIDED_BY_CHANGE: (hazard: string) =>
      `The ${hazard} briefing has changed. Read what is new, answer and sign; it takes two minutes.`,
    AGE_NOT_CONFIRMED: () => 'The muster desk has not confirmed your age yet. Go there and say your name.',
    NO_BRIEFING: (hazard: string) => `There is no ${hazard} briefing here yet. Ask a safety lead.`,
    read: (hazard: string) => `Read the ${hazard} briefing`,
  },
  AGE_RULE: {
    'powered-saw': (from: number) => `Powered saws are for ${from} and over.`,
    'hand-cutting': (from: number) => `Cutting by hand is for ${from} and over.`,
    'hot-glue': (from: number) => `Hot glue is for ${from} and over.`,
    'high-temperature-gun': (from: number) =>
      `High-temperature guns are for ${from} and over. A low-temperature gun, beside your adult, is for you; it still burns.`,
    ladder: (from: number) => `Ladders are for ${from} and over.`,
    'ladder-height': (from: number) => `Ladders this high are for ${from} and over.`,
    'solvent-spray': (from: number) => `Spraying is for ${from} and over.`,
    overhead: (from: number) => `Overhead work is for ${from} and over.`,
    other: 'This is not for your age.',
    instead: (things: readonly string[]) => `You may do ${listed(things)}.`,
  },
  STOP_ACTIVE: 'A stop covers it. Make safe, and wait until a safety lead lifts the stop.',
  PERSON_NOT_CONFIRMED:
    'The muster desk has not seen you yet. Go there and say your name; it takes half a minute.',
  PERSON_NOT_ON_SITE: 'You are signed out for today. Go to the muster desk to come in again.',
  CHECKER_DID_WORK: (what: string) => `You worked on ${what}, so a second person has to check it.`,
  CHECKER_NEEDED: 'Checks are for bench leads and checkers. Ask one of them to look at it.',
  HAND_OVER_NOT_OFFERED: 'It is not offered to you any more. Ask the person who had it.',
  HAND_OVER_TO_SELF: 'They have a place on it already. Choose somebody else.',
  OFFLINE_CLAIM_EXPIRED:
    'You asked for this place more than two minutes ago, without network. It was not taken for you. Ask again if you still want it.',
  INSTALLATION_CLOSED: 'This build is closed. Nothing can be changed any more; thank you for coming.',
};
