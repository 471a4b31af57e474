import fc from 'fast-check';
import { DEFAULT_AGE_RULES, type Hazard, type StopScope } from '../../../shared/safety';
import { decide, type Command, type PersonFacts, type Step, type World } from '../../../shared/travellers';
import { NOW, personOf, stepOf } from '../../unit/travellers/fixtures';

/** One step at a time: with one open step on each of two pieces a higher limit would never be met. */
export const LIMIT = 1;

/** Who is in the hall: two who may do everything, one unbriefed, one of fifteen, one whom the desk has not confirmed. */
export const PEOPLE: Readonly<Record<string, PersonFacts>> = {
  ann: personOf({ id: 'ann' }),
  bo: personOf({ id: 'bo' }),
  cy: personOf({
    id: 'cy',
    duties: ['volunteer'],
    missing: { 'hot-glue': 'NOT_READ', overhead: 'NOT_READ' },
  }),
  dee: personOf({ id: 'dee', ageBand: '13-15', duties: ['volunteer', 'checker'] }),
  eli: personOf({ id: 'eli', confirmed: false }),
};
export const NAMES = Object.keys(PEOPLE);
/** Who comes after the day with free hands: two who may do everything, and a checker. */
const FRESH: Readonly<Record<string, PersonFacts>> = {
  fay: personOf({ id: 'fay', duties: ['volunteer'] }),
  gil: personOf({ id: 'gil', duties: ['volunteer'] }),
  hal: personOf({ id: 'hal', duties: ['volunteer', 'checker'] }),
};

/** Two pieces under way. */
export interface Hall {
  now: number;
  steps: readonly Step[];
  stops: readonly StopScope[];
}

const piece = (id: string): Step[] => {
  const glue = { hazards: ['hot-glue' as Hazard], toolKinds: ['hot-glue gun'] };
  const kinds: Partial<Step>[] = [
    { crewMax: 1 },
    { ...glue, crewMin: 2, crewMax: 3, needsCheck: true },
    { operation: 'coat', stationId: 'bay', clocks: { touchDry: 300, handleFrom: 600 }, needsCheck: true },
    { operation: 'coat', stationId: 'bay', clocks: { touchDry: 300, recoatFrom: 600 } },
    { operation: 'hang', hazards: ['overhead'], crewMax: 2 },
  ];
  return kinds.map((kind, at) =>
    stepOf({
      id: `${id}${at}`,
      subAssemblyId: id,
      position: at + 1,
      name: `step ${at}`,
      state: at === 0 ? 'ready' : 'waiting',
      ...kind,
    }),
  );
};
export const emptyHall = (): Hall => ({ now: NOW, steps: [...piece('v'), ...piece('w')], stops: [] });

export const travellerOf = ({ steps }: Hall, step: Step): Step[] =>
  steps.filter((other) => other.subAssemblyId === step.subAssemblyId);
export const inHandOf = ({ steps }: Hall, who: string): number =>
  steps.filter((step) => step.crew.some(({ personId }) => personId === who)).length;

export function worldOf(hall: Hall, stepId: string, who: string): World {
  const step = hall.steps.find(({ id }) => id === stepId) as Step;
  return {
    now: hall.now,
    step,
    traveller: travellerOf(hall, step),
    station: hall.steps.filter((other) => other.stationId === step.stationId && other.state === 'drying'),
    person: { ...((PEOPLE[who] ?? FRESH[who]) as PersonFacts), inHand: inHandOf(hall, who) },
    stops: hall.stops,
    settings: { maxInHand: LIMIT, ageRules: DEFAULT_AGE_RULES },
  };
}

/** One thing asked of one step by one person. */
export interface Ask {
  stepId: string;
  who: string;
  command: Command;
}

/** The hall after it; null when it was refused. */
export function play(hall: Hall, { stepId, who, command }: Ask): Hall | null {
  const decision = decide(worldOf(hall, stepId, who), command);
  if (!decision.ok) return null;
  const changed = new Map(decision.value.steps.map((step) => [step.id, step]));
  return { ...hall, steps: hall.steps.map((step) => changed.get(step.id) ?? step) };
}

/** Everything somebody could ask of a step, what drives the work on first. */
function commandsFor(hall: Hall, step: Step, { to, target }: Move): Command[] {
  return [
    { type: 'claim' },
    { type: 'accept' },
    { type: 'start' },
    { type: 'finish' },
    { type: 'pass' },
    { type: 'clock-ended' },
    { type: 'offer', to },
    { type: 'rework', reason: 'loose', targetId: `${step.subAssemblyId}${target}` },
    { type: 'still-wet', seconds: 600 },
    { type: 'release', note: 'looked' },
    { type: 'give-back' },
    { type: 'withdraw' },
    { type: 'end-drying', reason: 'touched it' },
    { type: 'hold', reason: 'look' },
    { type: 'finish', happenedAt: hall.now - 30_000 },
    { type: 'record', crew: [to], happenedAt: hall.now - 60_000 },
  ];
}

export interface Move {
  step: number;
  who: string;
  /** Whom a hand-over or a paper names. */
  to: string;
  /** Which step of the traveller is sent back. */
  target: number;
  /** What is asked: something that is allowed now, something that drives the work on, or anything. */
  kind: 'allowed' | 'on' | 'any';
  pick: number;
  /** Whether it is something that stops the work or tells of it late. */
  seldom: boolean;
  later: number;
  stop: number;
}

const people = fc.constantFrom('ann', 'ann', 'bo', 'bo', ...NAMES);

/** Moves of a day. Half of the time passes in seconds, half in minutes; a stop comes or goes now and then. */
export const moves: fc.Arbitrary<Move[]> = fc.array(
  fc.record({
    step: fc.nat(9),
    who: people,
    to: people,
    target: fc.nat(4),
    kind: fc.constantFrom<Move['kind']>('on', 'on', 'on', 'allowed', 'any'),
    pick: fc.nat(1000),
    seldom: fc.nat(9).map((roll) => roll === 0),
    later: fc.oneof(fc.nat(20), fc.nat(900)),
    stop: fc.nat(60),
  }),
  { minLength: 60, maxLength: 120 },
);

/** One accepted step of the day, or a refusal of what was asked. */
export interface Turn {
  before: Hall;
  ask: Ask;
  after: Hall | null;
}

/** What stops the work or tells of it late: seldom, or nothing would ever be built. */
const SELDOM = new Set<Command['type']>(['hold', 'record']);
const isSeldom = (command: Command) =>
  SELDOM.has(command.type) || (command.type === 'finish' && command.happenedAt !== undefined);

/** The step a move is about: most often the one its piece is at. */
function stepFor(hall: Hall, { step, kind }: Move): Step {
  const any = hall.steps[step] as Step;
  const due = travellerOf(hall, any).find(({ state }) => state !== 'passed');
  return kind === 'on' && due ? due : any;
}

/** Whoever was offered a place looks at it soon, whoever has one goes on, and finished work finds its checker. */
function whoFor({ state, handOver, crew }: Step, { who, kind, pick }: Move): string {
  if (kind !== 'on' || pick % 3 === 0) return who;
  if (state === 'to check') return 'dee';
  return handOver?.to ?? crew[pick % (crew.length || 1)]?.personId ?? who;
}

function turnOf(from: Hall, move: Move): Turn {
  const before: Hall = {
    ...from,
    now: from.now + move.later * 1000,
    stops: stopsAfter(from.stops, move.stop),
  };
  const step = stepFor(before, move);
  const who = whoFor(step, move);
  const world = worldOf(before, step.id, who);
  const all = commandsFor(before, step, move).filter((command) => move.seldom === isSeldom(command));
  const allowed = move.kind === 'any' ? [] : all.filter((command) => decide(world, command).ok);
  const among =
    allowed.length === 0 ? all : move.kind === 'on' ? allowed.slice(0, move.pick % 5 === 0 ? 2 : 1) : allowed;
  const ask = { stepId: step.id, who, command: among[move.pick % among.length] as Command };
  return { before, ask, after: play(before, ask) };
}

function stopsAfter(stops: readonly StopScope[], roll: number): readonly StopScope[] {
  if (roll < 4) return [];
  if (roll === 4) return [{ scope: 'hot-tools', stationId: null }];
  if (roll === 5) return [{ scope: 'area', stationId: 'glue' }];
  if (roll === 6) return [{ scope: 'everything', stationId: null }];
  return stops;
}

/** Play a whole day and look at every turn. */
export function playDay(list: readonly Move[], look: (turn: Turn) => void): Hall {
  let hall = emptyHall();
  for (const move of list) {
    const turn = turnOf(hall, move);
    look(turn);
    hall = turn.after ?? turn.before;
  }
  return hall;
}
