import { useParams } from 'react-router-dom';
import { PageHead } from '../../components/ui/heads';
import { FramesDesk } from '../../features/frames/frames-desk';
import { useMay } from '../../lib/session';
import { useInstallation } from '../day';
import { NothingHere } from '../nothing-here';

/** The frames of an installation. */
export function Component() {
  const { installationId = '' } = useParams();
  const may = useMay(installationId);
  const installation = useInstallation(installationId);
  if (!may('frame.read')) return <NothingHere />;
  if (!installation) return null;
  return (
    <>
      <PageHead
        title="Drawing"
        summary="Every shape of the installation, with its joints, struts and lengths"
      />
      <FramesDesk
        installationId={installationId}
        unit={installation.unit}
        mayEdit={may('frame.edit') && installation.status !== 'closed'}
      />
    </>
  );
}
