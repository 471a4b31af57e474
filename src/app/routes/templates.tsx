import { useParams } from 'react-router-dom';
import { PageHead } from '../../components/ui/heads';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { useFrameList } from '../../features/frames/frame-list-query';
import { TemplatesDesk } from '../../features/planning/templates-desk';
import { useMay } from '../../lib/session';
import { useInstallation } from '../day';
import { NothingHere } from '../nothing-here';

/** Templates of travellers. */
export function Component() {
  const { installationId = '' } = useParams();
  const may = useMay(installationId);
  const installation = useInstallation(installationId);
  const frames = useFrameList(installationId);
  if (!may('template.edit')) return <NothingHere />;
  return (
    <>
      <PageHead title="Templates" summary="The steps a piece goes through, from the first cut to hanging" />
      <Refusal error={frames.error} />
      {frames.isPending && <Pending />}
      {frames.data && (
        <TemplatesDesk
          installationId={installationId}
          frames={frames.data}
          closed={installation?.status === 'closed'}
        />
      )}
    </>
  );
}
