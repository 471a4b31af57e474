import { useParams } from 'react-router-dom';
import { PageHead } from '../../components/ui/heads';
import { SheetPage } from '../../features/split/sheet-page';
import { useLiveMap } from '../../lib/live';
import { useMay } from '../../lib/session';
import { useInstallation } from '../day';
import { NothingHere } from '../nothing-here';

/** The sheet of one piece. */
export function Component() {
  const { installationId = '', subAssemblyId = '' } = useParams();
  const may = useMay(installationId);
  const installation = useInstallation(installationId);
  const pieces = useLiveMap(installationId, 'subAssemblies');
  const piece = pieces.get(subAssemblyId);
  if (!may('frame.read') || !piece || piece.removed) return <NothingHere />;
  if (!installation) return null;
  return (
    <>
      <PageHead title={`${piece.code} ${piece.name}`} summary={installation.name} />
      <SheetPage installationId={installationId} subAssemblyId={subAssemblyId} unit={installation.unit} />
    </>
  );
}
