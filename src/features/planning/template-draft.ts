import type { FieldProblem } from '../../../shared/contracts/errors';
import { templateSchema, type TemplateStep, type TemplateView } from '../../../shared/contracts/travellers';
import { newId } from '../../../shared/kernel/ids';
import type { Hazard } from '../../../shared/safety';
import type { Minutes } from '../../../shared/travellers/minutes';
import type { Clocks, Operation } from '../../../shared/travellers/step';
import { checkInput, typedNumber } from '../../lib/check-input';

/** Clocks of a coat in the order in which they run out, as they are asked for. */
export const CLOCKS: readonly { key: keyof Clocks; label: string; hint: string }[] = [
  { key: 'touchDry', label: 'touch-dry after', hint: 'The step dries until then.' },
  { key: 'recoatFrom', label: 'next coat from', hint: '' },
  { key: 'recoatUntil', label: 'next coat until', hint: 'Later it is allowed with a warning.' },
  { key: 'handleFrom', label: 'carry from', hint: '' },
  { key: 'hangFrom', label: 'hang from', hint: '' },
];

/** A step while it is typed; figures as texts, clocks in minutes. */
export interface DraftStep {
  /** Stays with the step when it moves. */
  key: string;
  operation: Operation;
  name: string;
  stationId: string;
  hazards: readonly Hazard[];
  /** Kinds of tool, parted by commas. */
  tools: string;
  crewMin: string;
  crewMax: string;
  fixed: string;
  perCut: string;
  perJoint: string;
  dries: boolean;
  clocks: Readonly<Record<keyof Clocks, string>>;
  needsCheck: boolean;
}

export interface TemplateDraft {
  name: string;
  steps: readonly DraftStep[];
  revision: number | undefined;
}

const NO_CLOCKS: DraftStep['clocks'] = {
  touchDry: '',
  recoatFrom: '',
  recoatUntil: '',
  handleFrom: '',
  hangFrom: '',
};

const inMinutes = (seconds: number | undefined): string =>
  seconds === undefined ? '' : String(Number((seconds / 60).toFixed(2)));

/** A step of a template as it is typed. */
export function draftStep(step: TemplateStep): DraftStep {
  const { clocks, minutes, crewMin, crewMax, toolKinds, operation, name, stationId, hazards, needsCheck } =
    step;
  return {
    key: newId(),
    operation,
    name,
    stationId,
    hazards,
    needsCheck,
    tools: toolKinds.join(', '),
    crewMin: String(crewMin),
    crewMax: String(crewMax),
    fixed: String(minutes.fixed),
    perCut: String(minutes.perCut),
    perJoint: String(minutes.perJoint),
    dries: clocks !== null,
    clocks: clocks
      ? {
          touchDry: inMinutes(clocks.touchDry),
          recoatFrom: inMinutes(clocks.recoatFrom),
          recoatUntil: inMinutes(clocks.recoatUntil),
          handleFrom: inMinutes(clocks.handleFrom),
          hangFrom: inMinutes(clocks.hangFrom),
        }
      : NO_CLOCKS,
  };
}

/** A new step at the end. */
export const blankStep = (stationId: string): DraftStep => ({
  key: newId(),
  operation: 'other',
  name: '',
  stationId,
  hazards: [],
  tools: '',
  crewMin: '1',
  crewMax: '1',
  fixed: '5',
  perCut: '0',
  perJoint: '0',
  dries: false,
  clocks: NO_CLOCKS,
  needsCheck: false,
});

/** A template that is there, as it is typed. */
export const draftTemplate = ({ name, steps, revision }: TemplateView): TemplateDraft => ({
  name,
  steps: steps.map(draftStep),
  revision,
});

const MOST_MINUTES = 14 * 24 * 60;

/** Clocks in seconds, and those that are no minutes. */
function readClocks(
  step: DraftStep,
  index: number,
): { clocks: Record<string, number> | null; own: FieldProblem[] } {
  if (!step.dries) return { clocks: null, own: [] };
  const clocks: Record<string, number> = {};
  const own: FieldProblem[] = [];
  for (const { key } of CLOCKS) {
    const minutes = typedNumber(step.clocks[key]);
    if (minutes === undefined) continue;
    if (minutes > 0 && minutes <= MOST_MINUTES) clocks[key] = Math.max(1, Math.round(minutes * 60));
    else
      own.push({
        path: `steps.${index}.clocks.${key}`,
        code: 'minutes',
        message: `Minutes, more than 0 and at most ${MOST_MINUTES.toLocaleString('en-GB')} (14 days).`,
      });
  }
  return { clocks, own };
}

/** The body that keeps the template, or every problem beside its field; a station that is gone counts as none. */
export function checkTemplate(draft: TemplateDraft, stationIds: ReadonlySet<string>) {
  const own: FieldProblem[] = [];
  const steps = draft.steps.map((step, index) => {
    const read = readClocks(step, index);
    own.push(...read.own);
    return {
      operation: step.operation,
      name: step.name,
      stationId: stationIds.has(step.stationId) ? step.stationId : '',
      hazards: step.hazards,
      toolKinds: step.tools
        .split(',')
        .map((kind) => kind.trim())
        .filter(Boolean),
      crewMin: typedNumber(step.crewMin),
      crewMax: typedNumber(step.crewMax),
      minutes: {
        fixed: typedNumber(step.fixed),
        perCut: typedNumber(step.perCut),
        perJoint: typedNumber(step.perJoint),
      },
      clocks: read.clocks,
      needsCheck: step.needsCheck,
    };
  });
  return checkInput(templateSchema, { name: draft.name, steps, revision: draft.revision }, own);
}

/** Minutes that a step would take, as far as they are typed; null while one of them is no number. */
export function minutesOf(step: DraftStep): Minutes | null {
  const minutes = {
    fixed: typedNumber(step.fixed) ?? 0,
    perCut: typedNumber(step.perCut) ?? 0,
    perJoint: typedNumber(step.perJoint) ?? 0,
  };
  return Object.values(minutes).every((value) => Number.isFinite(value) && value >= 0) ? minutes : null;
}

/** A list with one entry moved by one place; the same list when there is no such place. */
export function movedStep<T>(list: readonly T[], from: number, by: 1 | -1): readonly T[] {
  const to = from + by;
  const [here, there] = [list[from], list[to]];
  if (here === undefined || there === undefined) return list;
  return list.map((entry, i) => (i === from ? there : i === to ? here : entry));
}
