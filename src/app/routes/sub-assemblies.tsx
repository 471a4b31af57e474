import { useParams } from 'react-router-dom';
import { PageHead } from '../../components/ui/heads';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { useFrameList } from '../../features/frames/frame-list-query';
import { PiecesDesk } from '../../features/planning/pieces-desk';
import { useMay } from '../../lib/session';
import { useInstallation } from '../day';
import { NothingHere } from '../nothing-here';

/** What crews claim, build and carry. */
export function Component() {
  const { installationId = '' } = useParams();
  const may = useMay(installationId);
  const installation = useInstallation(installationId);
  const frames = useFrameList(installationId);
  if (!may('sub-assembly.edit')) return <NothingHere />;
  return (
    <>
      <PageHead
        title="Sub-assemblies"
        summary="What a crew claims, builds and carries, each with its traveller"
      />
      <Refusal error={frames.error} />
      {frames.isPending && <Pending />}
      {frames.data && (
        <PiecesDesk
          installationId={installationId}
          frames={frames.data}
          closed={installation?.status === 'closed'}
        />
      )}
    </>
  );
}
