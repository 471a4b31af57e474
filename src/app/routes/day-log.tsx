import { useParams } from 'react-router-dom';
import { PageHead } from '../../components/ui/heads';
import { DayLogList } from '../../features/planning/day-log-list';
import { useLive } from '../../lib/live';
import { useMay } from '../../lib/session';
import { useInstallation } from '../day';
import { NothingHere } from '../nothing-here';

/** The record of the day. */
export function Component() {
  const { installationId = '' } = useParams();
  const may = useMay(installationId);
  const installation = useInstallation(installationId);
  const records = useLive(installationId, (state) => state.records);
  if (!may('day-log.read')) return <NothingHere />;
  if (!installation || !records) return null;
  return (
    <>
      <PageHead title="Day log" summary="Every change, in order; nothing in it is ever edited" />
      <DayLogList installationId={installationId} zone={installation.timeZone} records={records} />
    </>
  );
}
