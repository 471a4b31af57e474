import { useParams } from 'react-router-dom';
import { PageHead } from '../../components/ui/heads';
import { PlanSections } from '../../features/installations/plan-sections';
import { useMay } from '../../lib/session';
import { useInstallation } from '../day';
import { NothingHere } from '../nothing-here';

/** The plan of an installation. */
export function Component() {
  const { installationId = '' } = useParams();
  const may = useMay(installationId);
  const installation = useInstallation(installationId);
  if (!may('installation.edit')) return <NothingHere />;
  if (!installation) return null;
  return (
    <>
      <PageHead title="Plan" summary={[installation.name, installation.venue].filter(Boolean).join(', ')} />
      <PlanSections installation={installation} />
    </>
  );
}
