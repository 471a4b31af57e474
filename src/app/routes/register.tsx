import { useParams } from 'react-router-dom';
import { RegisterPage } from '../../features/safety-desk/register-page';

/** Register: every sign-off and what became of it, chained. */
export function Component() {
  const { installationId = '' } = useParams();
  return <RegisterPage installationId={installationId} />;
}
