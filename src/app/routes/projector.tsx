import { Pending } from '../../components/ui/pending';
import { ProjectorDoor } from '../../features/projector/projector-door';
import { ProjectorWall } from '../../features/projector/projector-wall';
import { useLive } from '../../lib/live';
import { useRealtime } from '../realtime';

/** The projector: `/projector#token`. */
export function Component() {
  return (
    <ProjectorDoor>{(installationId) => <Live key={installationId} {...{ installationId }} />}</ProjectorDoor>
  );
}

function Live({ installationId }: { installationId: string }) {
  useRealtime(installationId);
  const known = useLive(installationId, (state) => state.audience);
  if (known === undefined) return <Pending />;
  return <ProjectorWall installationId={installationId} />;
}
