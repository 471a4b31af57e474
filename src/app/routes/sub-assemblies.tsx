import { useParams, useSearchParams } from 'react-router-dom';
import { ChoiceRow, PageHead } from '../../components/ui/heads';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { useFrameList } from '../../features/frames/frame-list-query';
import { PiecesDesk } from '../../features/planning/pieces-desk';
import { SplitDesk } from '../../features/split/split-desk';
import { useMay } from '../../lib/session';
import { useInstallation } from '../day';
import { NothingHere } from '../nothing-here';

/** What crews claim, build and carry. */
export function Component() {
  const { installationId = '' } = useParams();
  const may = useMay(installationId);
  const installation = useInstallation(installationId);
  const [search, setSearch] = useSearchParams();
  const shown = search.get('show') === 'split' ? 'split' : 'pieces';
  const frames = useFrameList(installationId);
  if (!may('sub-assembly.edit')) return <NothingHere />;
  return (
    <>
      <PageHead
        title="Sub-assemblies"
        summary="What a crew claims, builds and carries, each with its traveller"
      />
      <div className="mb-6">
        <ChoiceRow
          label="what is shown"
          value={shown}
          onChange={(show) => setSearch(show === 'split' ? { show } : {})}
          choices={[
            { value: 'pieces', label: 'Pieces' },
            { value: 'split', label: 'Split the drawing' },
          ]}
        />
      </div>
      {shown === 'split' && installation && may('split.edit') && (
        <SplitDesk installationId={installationId} unit={installation.unit} />
      )}
      <Refusal error={frames.error} />
      {frames.isPending && <Pending />}
      {shown === 'pieces' && frames.data && (
        <PiecesDesk
          installationId={installationId}
          frames={frames.data}
          closed={installation?.status === 'closed'}
        />
      )}
    </>
  );
}
