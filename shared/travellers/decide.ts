import { ok, refuse, type Result } from '../kernel/result';
import { lateFinish, recorded } from './after-the-fact';
import { clockGate } from './clocks';
import { gatePerson, stopOver, type Refusal, type Transition, type World } from './gates';
import { OFFLINE_CLAIM_MS } from './limits';
import type { Step } from './step';

export type { PersonFacts, Refusal, RefusalCode, Transition, World } from './gates';

/** What somebody asks of a step. `happenedAt` (ms) is set when it was done before it reached the server. */
export type Command =
  | { type: 'claim'; happenedAt?: number | undefined }
  | { type: 'give-back' }
  | { type: 'offer'; to: string }
  | { type: 'accept' }
  | { type: 'withdraw' }
  | { type: 'start' }
  | { type: 'finish'; happenedAt?: number | undefined }
  | { type: 'record'; crew: string[]; happenedAt: number }
  | { type: 'end-drying'; reason: string }
  | { type: 'clock-ended' }
  | { type: 'still-wet'; seconds: number }
  | { type: 'pass' }
  | { type: 'rework'; reason: string; targetId: string }
  | { type: 'hold'; reason: string }
  | { type: 'release'; note: string };

type Decision = Result<Transition, Refusal>;

const no = (code: Refusal['code'], details: Record<string, unknown> = {}): Decision =>
  refuse({ code, details });

const done = (
  steps: Step[],
  event: string,
  more: Partial<Pick<Transition, 'flags' | 'warnings'>> = {},
): Decision => ok({ steps, event, flags: more.flags ?? [], warnings: more.warnings ?? [] });

const holds = (step: Step, personId: string) => step.crew.some((member) => member.personId === personId);
const withDoer = (step: Step, personId: string) =>
  step.doers.includes(personId) ? step.doers : [...step.doers, personId];

/**
 * Decide one command on one step: the only place where a transition is allowed or refused. The server decides with
 * it, the client greys out with it, the tests play it.
 *
 * @param world the step, its traveller in order, who asks, the stops that are raised, the settings and the time (ms)
 * @param command what is asked
 * @returns the changed steps and the event for the day log, or the refusal with the facts its words need
 * @source the rules of the product, own
 */
export function decide(world: World, command: Command): Decision {
  switch (command.type) {
    case 'claim':
      return claim(world, command.happenedAt);
    case 'give-back':
      return giveBack(world);
    case 'offer':
      return offer(world, command.to);
    case 'accept':
      return accept(world);
    case 'withdraw':
      return withdraw(world);
    case 'start':
      return start(world);
    case 'finish':
      return finish(world, command.happenedAt);
    case 'record':
      return record(world, command.crew, command.happenedAt);
    case 'clock-ended':
      return clockEnded(world);
    case 'end-drying':
      return endDrying(world, 'step.drying-ended-early');
    case 'still-wet':
      return stillWet(world, command.seconds);
    case 'pass':
      return pass(world);
    case 'rework':
      return rework(world, command.reason, command.targetId);
    case 'hold':
      return hold(world, command.reason);
    case 'release':
      return release(world);
  }
}

/** Whether somebody could take a place now; the same answer a claim would get. */
export const mayClaim = (world: World): Refusal | null => {
  const decision = claim(world, undefined);
  return decision.ok ? null : decision.refusal;
};

function claim(world: World, happenedAt: number | undefined): Decision {
  const { step, person, now } = world;
  if (happenedAt !== undefined && now - happenedAt > OFFLINE_CLAIM_MS) {
    return no('OFFLINE_CLAIM_EXPIRED', { limitSeconds: OFFLINE_CLAIM_MS / 1000 });
  }
  const refusal = placeRefusal(world) ?? gatePerson(world, 'claim');
  if (refusal) return refuse(refusal);
  const crew = [...step.crew, { personId: person.id, claimedAt: now }];
  // Who stands at the bench needs no place of another's: an offer to them ends.
  const handOver = step.handOver?.to === person.id ? null : step.handOver;
  const claimed: Step = { ...step, state: 'in hand', crew, doers: withDoer(step, person.id), handOver };
  return done([claimed], 'step.claimed', {
    warnings: clockGate(world.traveller, step, now).warnings,
  });
}

/** Why the step has no place for this person, before anything about the person is asked. */
function placeRefusal({ step, traveller, missingPieces, person, now }: World): Refusal | null {
  if (holds(step, person.id)) return { code: 'STEP_ALREADY_YOURS', details: {} };
  if (step.held) return { code: 'STEP_HELD', details: { ...step.held } };
  if (step.state === 'waiting') {
    const before = traveller.find((other) => other.position < step.position && other.state !== 'passed');
    return {
      code: 'STEP_NOT_READY',
      details: {
        waitsFor: before?.id ?? null,
        waitsForName: before?.name ?? null,
        ...(before || !missingPieces?.length ? {} : { waitsForPieces: missingPieces }),
      },
    };
  }
  if (step.state !== 'ready' && step.state !== 'rework' && step.state !== 'in hand') {
    return { code: 'STEP_STATE', details: { state: step.state, dryUntil: step.dryUntil } };
  }
  if (step.crew.length >= step.crewMax) {
    return {
      code: 'STEP_CREW_FULL',
      details: {
        crew: step.crew.map((member) => member.personId),
        places: step.crewMax,
        claimedAt: step.crew.at(-1)?.claimedAt,
      },
    };
  }
  return clockGate(traveller, step, now).refusal;
}

/** Without crew a step lies open again, for what it was open for before. */
function laidDown(step: Step): Step {
  return {
    ...step,
    state: openState(step),
    crew: [],
    startedAt: null,
    handOver: null,
  };
}

function giveBack({ step, person }: World): Decision {
  if (!holds(step, person.id)) return no('STEP_NOT_YOURS');
  if (step.state !== 'in hand') return no('STEP_STATE', { state: step.state });
  const crew = step.crew.filter((member) => member.personId !== person.id);
  const handOver = step.handOver?.from === person.id ? null : step.handOver;
  return done([crew.length === 0 ? laidDown(step) : { ...step, crew, handOver }], 'step.given-back');
}

function offer({ step, person, now }: World, to: string): Decision {
  if (!holds(step, person.id)) return no('STEP_NOT_YOURS');
  if (step.state !== 'in hand') return no('STEP_STATE', { state: step.state });
  if (step.held) return no('STEP_HELD', { ...step.held });
  if (to === person.id || holds(step, to)) return no('HAND_OVER_TO_SELF', { to });
  return done([{ ...step, handOver: { from: person.id, to, at: now } }], 'step.offered');
}

function accept(world: World): Decision {
  const { step, person, now } = world;
  const offered = step.handOver;
  if (offered?.to !== person.id) return no('HAND_OVER_NOT_OFFERED');
  if (step.state !== 'in hand') return no('STEP_STATE', { state: step.state });
  if (step.held) return no('STEP_HELD', { ...step.held });
  if (holds(step, person.id)) return no('STEP_ALREADY_YOURS');
  const refusal = gatePerson(world, 'claim');
  if (refusal) return refuse(refusal);
  const crew = step.crew.map((member) =>
    member.personId === offered.from ? { personId: person.id, claimedAt: now } : member,
  );
  return done([{ ...step, crew, doers: withDoer(step, person.id), handOver: null }], 'step.handed-over');
}

function withdraw({ step, person }: World): Decision {
  const offered = step.handOver;
  if (!offered || (offered.from !== person.id && offered.to !== person.id))
    return no('HAND_OVER_NOT_OFFERED');
  return done(
    [{ ...step, handOver: null }],
    offered.to === person.id ? 'step.offer-declined' : 'step.offer-withdrawn',
  );
}

function start(world: World): Decision {
  const { step, person, now } = world;
  if (!holds(step, person.id)) return no('STEP_NOT_YOURS');
  if (step.state !== 'in hand' || step.startedAt !== null)
    return no('STEP_STATE', { state: step.state, startedAt: step.startedAt });
  if (step.held) return no('STEP_HELD', { ...step.held });
  if (step.crew.length < step.crewMin) {
    return no('STEP_CREW_TOO_SMALL', { crew: step.crew.length, needed: step.crewMin });
  }
  const refusal = gatePerson(world, 'start');
  if (refusal) return refuse(refusal);
  return done([{ ...step, startedAt: now }], 'step.started');
}

function finish(world: World, happenedAt: number | undefined): Decision {
  const { step, person, now } = world;
  if (!holds(step, person.id)) {
    const heldOnce = step.doers.includes(person.id) && step.finishedBy !== person.id;
    return happenedAt !== undefined && heldOnce
      ? lateFinish(world, happenedAt)
      : no('STEP_NOT_YOURS', { state: step.state });
  }
  if (step.state !== 'in hand') return no('STEP_STATE', { state: step.state });
  const broken = finishRefusal(world);
  if (happenedAt === undefined)
    return broken ? refuse(broken) : done(finished(world, now, []), 'step.finished');
  // It was done before the server heard of it: never refused, but flagged, and then it waits for a lead.
  const flags = broken ? [broken.code] : [];
  return done(finished(world, Math.min(happenedAt, now), flags), 'step.finished', { flags });
}

function finishRefusal(world: World): Refusal | null {
  const { step } = world;
  if (step.held) return { code: 'STEP_HELD', details: { ...step.held } };
  if (step.startedAt === null) return { code: 'STEP_NOT_STARTED', details: {} };
  return stopOver(world);
}

/** The finished step and, when it passes at once, the next one it opens. */
function finished({ step, traveller, person }: World, at: number, flags: string[]): Step[] {
  const base: Step = {
    ...step,
    crew: [],
    handOver: null,
    startedAt: Math.min(step.startedAt ?? at, at),
    finishedAt: at,
    finishedBy: person.id,
    rework: null,
    flags: [...step.flags, ...flags],
  };
  if (base.flags.length > 0) return [{ ...base, state: 'to check', dryUntil: null }];
  if (step.clocks) return [{ ...base, state: 'drying', dryUntil: at + step.clocks.touchDry * 1000 }];
  if (step.needsCheck) return [{ ...base, state: 'to check', dryUntil: null }];
  return passed(base, traveller, at, null);
}

/** What a step is when it opens: work that was sent back is told from work that was not done yet. */
const openState = (step: Pick<Step, 'rework'>): 'ready' | 'rework' => (step.rework ? 'rework' : 'ready');

/** Pass a step and make the next one ready. */
function passed(step: Step, traveller: readonly Step[], at: number, by: string | null): Step[] {
  const next = traveller.find((other) => other.position > step.position);
  const changed: Step[] = [{ ...step, state: 'passed', dryUntil: null, passedAt: at, passedBy: by }];
  if (next?.state === 'waiting') changed.push({ ...next, state: openState(next) });
  return changed;
}

function record(world: World, crew: string[], happenedAt: number): Decision {
  const { state } = world.step;
  return state === 'passed' ? no('STEP_STATE', { state }) : recorded(world, crew, happenedAt);
}

function endDrying({ step, traveller, now }: World, event: string): Decision {
  if (step.state !== 'drying') return no('STEP_STATE', { state: step.state });
  // A hold stops the step, its paint dries all the same: it goes on to its check and no further. So does what was flagged.
  if (step.needsCheck || step.held || step.flags.length > 0)
    return done([{ ...step, state: 'to check', dryUntil: null }], event);
  return done(passed(step, traveller, now, null), event);
}

function clockEnded(world: World): Decision {
  const { step, now } = world;
  // "Still wet" may have been said between the look at the clock and this.
  if (step.state === 'drying' && step.dryUntil !== null && now < step.dryUntil) {
    return no('STEP_CLOCK_RUNNING', { clock: 'touchDry', until: step.dryUntil, coat: step.name });
  }
  return endDrying(world, 'step.dried');
}

function stillWet({ step, traveller, station, now }: World, seconds: number): Decision {
  const later = traveller.filter((other) => other.position > step.position);
  const dried =
    step.clocks !== null && step.finishedAt !== null && step.state !== 'in hand' && step.state !== 'rework';
  const untouched = (other: Step) =>
    other.state === 'waiting' || other.state === 'ready' || other.state === 'rework';
  if (!dried || !later.every(untouched)) {
    return no('STEP_STATE', { state: step.state });
  }
  const longer = (wet: Step): Step => ({
    ...wet,
    state: 'drying',
    passedAt: null,
    passedBy: null,
    dryUntil: Math.max(wet.dryUntil ?? now, now) + seconds * 1000,
  });
  // The bay is as cold and damp for its other pieces: their clocks run longer too.
  const others = station.filter((other) => other.id !== step.id && other.state === 'drying').map(longer);
  const closed = later
    .filter((other) => other.state !== 'waiting')
    .map((other): Step => ({ ...other, state: 'waiting' }));
  return done([longer(step), ...others, ...closed], 'step.still-wet');
}

function checkRefusal({ step, person }: World): Refusal | null {
  if (!person.confirmed) return { code: 'PERSON_NOT_CONFIRMED', details: {} };
  if (!person.duties.includes('bench lead') && !person.duties.includes('checker')) {
    return { code: 'CHECKER_NEEDED', details: {} };
  }
  if (step.doers.includes(person.id)) return { code: 'CHECKER_DID_WORK', details: { doers: step.doers } };
  return null;
}

function pass(world: World): Decision {
  const { step, traveller, missingPieces, person, now } = world;
  if (step.state !== 'to check') return no('STEP_STATE', { state: step.state });
  if (step.held) return no('STEP_HELD', { ...step.held });
  const refusal = checkRefusal(world);
  if (refusal) return refuse(refusal);
  // Typed in from paper it may be done before its pieces were; it unlocks nothing until they have passed.
  if (missingPieces?.length)
    return no('STEP_NOT_READY', { waitsFor: null, waitsForName: null, waitsForPieces: missingPieces });
  const before = traveller.find((other) => other.position < step.position && other.state !== 'passed');
  if (before) return no('STEP_NOT_READY', { waitsFor: before.id, waitsForName: before.name });
  // Looking at it is what clears its flags: the entry stays in the day log.
  return done(passed({ ...step, flags: [] }, traveller, now, person.id), 'step.passed');
}

function rework(world: World, reason: string, targetId: string): Decision {
  const { step, traveller, person, now } = world;
  if (step.state !== 'to check') return no('STEP_STATE', { state: step.state });
  const refusal = checkRefusal(world);
  if (refusal) return refuse(refusal);
  const target = traveller.find((other) => other.id === targetId);
  if (!target || target.position > step.position) return no('REWORK_TARGET', { targetId });
  // What was typed in from paper may be sent back before its turn has come: then it waits, and opens as rework.
  const tooEarly = traveller.some((other) => other.position < target.position && other.state !== 'passed');
  const reopened: Step = {
    ...target,
    state: tooEarly ? 'waiting' : 'rework',
    rework: { reason, by: person.id, at: now },
    crew: [],
    handOver: null,
    startedAt: null,
    finishedAt: null,
    finishedBy: null,
    dryUntil: null,
    passedAt: null,
    passedBy: null,
    flags: [],
  };
  const later = traveller
    .filter((other) => other.position > target.position && other.state !== 'waiting')
    .map((other): Step => ({
      ...other,
      state: 'waiting',
      crew: [],
      handOver: null,
      startedAt: null,
      finishedAt: null,
      finishedBy: null,
      dryUntil: null,
      passedAt: null,
      passedBy: null,
      flags: [],
    }));
  return done([reopened, ...later], 'step.sent-to-rework');
}

function hold({ step, person, now }: World, reason: string): Decision {
  if (step.held) return no('STEP_HELD', { ...step.held });
  if (step.state === 'passed') return no('STEP_STATE', { state: step.state });
  return done([{ ...step, held: { reason, by: person.id, at: now } }], 'step.held');
}

function release({ step }: World): Decision {
  if (!step.held) return no('STEP_NOT_HELD');
  return done([{ ...step, held: null }], 'step.released');
}
