import { useParams } from 'react-router-dom';
import { MusterDesk } from '../../features/muster/muster-desk';
import { useMay } from '../../lib/session';
import { NothingHere } from '../nothing-here';

/** Muster: the desk at the door. */
export function Component() {
  const { installationId = '' } = useParams();
  const may = useMay(installationId);
  if (!may('person.confirm')) return <NothingHere />;
  return <MusterDesk installationId={installationId} />;
}
