import { useParams } from 'react-router-dom';
import { MusterDesk } from '../../features/muster/muster-desk';

/** Muster: the desk at the door. */
export function Component() {
  const { installationId = '' } = useParams();
  return <MusterDesk installationId={installationId} />;
}
