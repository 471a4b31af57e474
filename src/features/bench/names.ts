import type { StepRecord } from '../../../shared/contracts/live';
import type { Step } from '../../../shared/travellers/step';
import type { LiveState } from '../../lib/live-state';
import type { Messages } from '../../lib/messages';
import { refusalText, type AnyRefusal } from '../../lib/refusal-words';

/** Words for the ids of the live state. */
export interface BenchNames {
  zone: string;
  unit: 'mm' | 'inch';
  codeOf(step: Pick<Step, 'subAssemblyId'>): string;
  frameOf(step: Pick<Step, 'subAssemblyId'>): string;
  stationOf(step: Pick<Step, 'stationId'>): string;
  personName(id: string): string;
  /** `V-14 lay out`. */
  whatOf(step: Step): string;
  whatOfId(stepId: string): string;
  /** Why not, and the way to change it. */
  refusal(refusal: AnyRefusal, step: Step): string;
  stepById(stepId: string): StepRecord | undefined;
}

/** Names from one state of the installation. */
export function benchNames({ records }: LiveState, messages: Messages): BenchNames {
  const [installation] = [...records.installation.values()];
  const zone = installation?.timeZone ?? 'UTC';
  const personName = (id: string) => records.people.get(id)?.name ?? messages.common.someone;
  const codeOf = (step: Pick<Step, 'subAssemblyId'>) =>
    records.subAssemblies.get(step.subAssemblyId)?.code ?? '';
  const whatOf = (step: Step) => `${codeOf(step)} ${step.name}`;
  return {
    zone,
    unit: installation?.unit ?? 'mm',
    codeOf,
    frameOf: (step) => records.subAssemblies.get(step.subAssemblyId)?.frameId ?? '',
    stationOf: (step) => records.stations.get(step.stationId)?.name ?? '',
    personName,
    whatOf,
    whatOfId: (id) => {
      const step = records.steps.get(id);
      return step ? whatOf(step) : '';
    },
    refusal: (refusal, step) =>
      refusalText(refusal, { messages, zone, what: whatOf(step), step, nameOf: personName }),
    stepById: (id) => records.steps.get(id),
  };
}
