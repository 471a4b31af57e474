import { useParams } from 'react-router-dom';
import { EmptyNote } from '../../components/ui/note';
import { MyBriefings } from '../../features/briefings/my-briefings';
import { useMessages } from '../../lib/messages';
import { membershipIn, useSession } from '../../lib/session';

/** My briefings. */
export function Component() {
  const { installationId = '' } = useParams();
  const { bench } = useMessages();
  const { data } = useSession();
  const personId = membershipIn(data, installationId)?.personId;
  if (!personId) return <EmptyNote title={bench.nobody.title}>{bench.nobody.text}</EmptyNote>;
  return <MyBriefings installationId={installationId} personId={personId} />;
}
