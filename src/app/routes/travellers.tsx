import { useParams } from 'react-router-dom';
import { TravellersBoard } from '../../features/travellers/travellers-board';

/** Travellers: the live board. */
export function Component() {
  const { installationId = '' } = useParams();
  return <TravellersBoard installationId={installationId} />;
}
