import { useParams } from 'react-router-dom';
import { CribDesk } from '../../features/crib/crib-desk';

/** Crib: the tool store. */
export function Component() {
  const { installationId = '' } = useParams();
  return <CribDesk installationId={installationId} />;
}
