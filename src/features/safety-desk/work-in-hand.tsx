import type { WorkInHand } from '../../../shared/contracts/safety';
import { counted, listed } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import type { Desk } from './use-desk';

/** Places in hand that are without a sign-off now, as the server listed them. */
export function WorkInHandWords({ desk, work }: { desk: Desk; work: readonly WorkInHand[] }) {
  const steps = useLiveMap(desk.installationId, 'steps');
  const pieces = useLiveMap(desk.installationId, 'subAssemblies');
  if (work.length === 0) return <p>No work that needs it is in hand.</p>;
  const places = work.map(({ stepId, personId }) => {
    const step = steps.get(stepId);
    const code = pieces.get(step?.subAssemblyId ?? '')?.code ?? '';
    return `${code} ${step?.name ?? 'a step'} (${desk.nameOf(personId)})`;
  });
  return (
    <p>
      {counted(work.length, 'place')} in hand without a sign-off: {listed(places)}. Not stopped: brief them
      where they stand, or hold the step.
    </p>
  );
}
