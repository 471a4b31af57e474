import { useParams } from 'react-router-dom';
import { CountersignDesk } from '../../features/safety-desk/countersign-desk';

/** Countersign: who has signed and waits, who is signed off, the texts of the briefings. */
export function Component() {
  const { installationId = '' } = useParams();
  return <CountersignDesk installationId={installationId} />;
}
