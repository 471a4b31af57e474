import type { Action } from '../../../shared/accounts';
import { decide, type Command } from '../../../shared/travellers/decide';
import type { Refusal, World } from '../../../shared/travellers/gates';

/** What a person may be offered to do with a step. */
export type Deed = Exclude<Command['type'], 'clock-ended'>;

/** One deed, and why not when it is refused. */
export interface Offer {
  deed: Deed;
  refusal: Refusal | null;
}

/** The permission that goes with each deed. */
const PERMISSION: Record<Deed, Action> = {
  claim: 'step.claim',
  'give-back': 'step.give-back',
  offer: 'step.hand-over',
  accept: 'step.hand-over',
  withdraw: 'step.hand-over',
  start: 'step.start',
  finish: 'step.finish',
  record: 'step.record',
  'end-drying': 'step.end-drying',
  'still-wet': 'step.still-wet',
  pass: 'step.check',
  rework: 'step.rework',
  hold: 'step.hold',
  release: 'step.release',
};

/** A command as it might be, for asking whether it would be refused; what is typed into its form decides nothing. */
function sample(deed: Deed, world: World): Command {
  const reason = '';
  switch (deed) {
    case 'offer':
      return { type: deed, to: '' };
    case 'record':
      return { type: deed, crew: [world.person.id], happenedAt: world.now };
    case 'end-drying':
    case 'hold':
      return { type: deed, reason };
    case 'still-wet':
      return { type: deed, seconds: 60 };
    case 'rework':
      return { type: deed, reason, targetId: world.step.id };
    case 'release':
      return { type: deed, note: reason };
    default:
      return { type: deed };
  }
}

/** Deeds that come into question for a step as it is, whoever asks; the first is the one most people come for. */
function deedsFor({ step, person }: World): Deed[] {
  const mine = step.crew.some((member) => member.personId === person.id);
  const deeds: Deed[] = [];
  if (step.handOver?.to === person.id) deeds.push('accept', 'withdraw');
  if (mine) {
    deeds.push(step.startedAt === null ? 'start' : 'finish', 'give-back');
    deeds.push(step.handOver?.from === person.id ? 'withdraw' : 'offer');
  } else if (step.state === 'ready' || step.state === 'rework' || step.state === 'in hand') {
    deeds.push('claim');
  }
  if (step.state === 'to check') deeds.push('pass', 'rework');
  if (step.state === 'drying') deeds.push('still-wet', 'end-drying');
  else if (step.clocks && step.finishedAt !== null) deeds.push('still-wet');
  if (step.held) deeds.push('release');
  else if (step.state !== 'passed') deeds.push('hold');
  if (step.state !== 'passed' && step.state !== 'to check') deeds.push('record');
  return deeds;
}

/** Refusals that only say that the time for it has gone: then it is not offered at all. */
const SILENT = new Set<Refusal['code']>(['STEP_STATE']);

/**
 * What a person may do with a step now, and what is refused for a reason worth reading.
 * @param world of this person and step
 * @param may the permission table's answer; a deed of somebody else's duty is left out
 * @returns in the order shown; of several deeds refused for the same reason the first stands for all
 */
export function offersFor(world: World, may: (action: Action) => boolean): Offer[] {
  const said = new Set<string>();
  return deedsFor(world)
    .filter((deed) => may(PERMISSION[deed]))
    .flatMap((deed): Offer[] => {
      const decision = decide(world, sample(deed, world));
      if (decision.ok) return [{ deed, refusal: null }];
      const { refusal } = decision;
      if (SILENT.has(refusal.code) || said.has(refusal.code)) return [];
      said.add(refusal.code);
      return [{ deed, refusal }];
    });
}
