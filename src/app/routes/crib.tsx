import { useParams } from 'react-router-dom';
import { CribDesk } from '../../features/crib/crib-desk';
import { useMay } from '../../lib/session';
import { NothingHere } from '../nothing-here';

/** Crib: the tool store. */
export function Component() {
  const { installationId = '' } = useParams();
  const may = useMay(installationId);
  if (!(may('tool.take-back') || may('tool.edit'))) return <NothingHere />;
  return <CribDesk installationId={installationId} />;
}
