import { useParams } from 'react-router-dom';
import { EmptyNote } from '../../components/ui/note';
import { BriefingReader } from '../../features/briefings/briefing-reader';
import { useMessages } from '../../lib/messages';
import { membershipIn, useSession } from '../../lib/session';

/** One briefing: read, answer, sign. */
export function Component() {
  const { installationId = '', key = '' } = useParams();
  const { bench } = useMessages();
  const { data } = useSession();
  const personId = membershipIn(data, installationId)?.personId;
  if (!personId) return <EmptyNote title={bench.nobody.title}>{bench.nobody.text}</EmptyNote>;
  return <BriefingReader installationId={installationId} personId={personId} briefingKey={key} />;
}
