import type { StepRecord } from '../../../shared/contracts/live';
import { counted } from '../../lib/formats';
import type { BoardRow } from './board-rows';

/** What the words are made from. */
export interface NowContext {
  nameOf(personId: string): string;
  /** Local time of an instant, `14:07`. */
  time(at: number): string;
}

/** What is happening to a traveller now. */
export interface NowWords {
  /** In the colour of the state: `tack held`. */
  head: string;
  /** `by Lena W, gun drips`; empty when there is nothing to say. */
  detail: string;
  crew: string;
}

const handsWanted = (count: number) => `${counted(count, 'hand')} wanted`;

function inHandDetail(step: StepRecord, { time }: NowContext): string {
  const parts: string[] = [];
  const missing = step.crewMin - step.crew.length;
  if (missing > 0) parts.push(handsWanted(missing));
  else if (step.crew.length >= step.crewMax && step.crewMax > 1) parts.push('full crew');
  if (step.startedAt !== null) parts.push(`since ${time(step.startedAt)}`);
  else if (missing <= 0) parts.push('not begun');
  if (step.rework) parts.push(`again: ${step.rework.reason}`);
  if (step.handOver) parts.push('offered on');
  return parts.join(', ');
}

function passedDetail(step: StepRecord, { nameOf, time }: NowContext): string {
  if (step.passedAt === null) return '';
  const done = step.operation === 'hang' ? 'hung ' : '';
  const by = step.passedBy ? `, checked by ${nameOf(step.passedBy)}` : '';
  return `${done}${time(step.passedAt)}${by}`;
}

function detailOf(step: StepRecord, row: BoardRow, context: NowContext): string {
  const { nameOf, time } = context;
  switch (row.state) {
    case 'held':
      return step.held ? `by ${nameOf(step.held.by)}, ${step.held.reason}` : '';
    case 'rework':
      return step.rework?.reason ?? '';
    case 'in hand':
      return inHandDetail(step, context);
    case 'drying':
      return step.dryUntil === null ? '' : `till ${time(step.dryUntil)}`;
    case 'to check':
      return step.flags.length > 0 ? 'a rule was broken, look at it' : 'second person wanted';
    case 'ready':
      return handsWanted(step.crewMin);
    case 'passed':
      return passedDetail(step, context);
    case 'waiting':
      return '';
  }
}

function crewOf(step: StepRecord, row: BoardRow, { nameOf }: NowContext): string {
  if (step.crew.length > 0) return step.crew.map(({ personId }) => nameOf(personId)).join(', ');
  // Nobody stands at it, but this is whom to ask.
  const asks = row.state === 'drying' || row.state === 'to check';
  return asks && step.finishedBy ? nameOf(step.finishedBy) : '';
}

/** The words of the columns now and crew. */
export function nowWords(row: BoardRow, context: NowContext): NowWords {
  const step = row.current;
  if (!step) return { head: 'no steps', detail: '', crew: '' };
  const whole = row.state === 'passed' || row.state === 'waiting';
  return {
    head: whole ? row.state : `${step.name} ${row.state}`,
    detail: detailOf(step, row, context),
    crew: crewOf(step, row, context),
  };
}
