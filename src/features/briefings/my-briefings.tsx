import { bestSignOff } from '../../../shared/safety/sign-off';
import type { BriefingRecord } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { EmptyNote } from '../../components/ui/note';
import { formatDate } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import { useMessages } from '../../lib/messages';
import { useServerNow } from '../../lib/server-clock';

interface Props {
  installationId: string;
  personId: string;
}

/** Every briefing of the installation and how far this person is with it. */
export function MyBriefings({ installationId, personId }: Props) {
  const { briefing: words } = useMessages();
  const briefings = [...useLiveMap(installationId, 'briefings').values()].sort((a, b) =>
    a.title.localeCompare(b.title),
  );
  if (briefings.length === 0) return <EmptyNote title={words.none} />;
  return (
    <ul>
      {briefings.map((briefing) => (
        <Row key={briefing.id} briefing={briefing} installationId={installationId} personId={personId} />
      ))}
    </ul>
  );
}

function Row({ briefing, installationId, personId }: Props & { briefing: BriefingRecord }) {
  const { briefing: words, common } = useMessages();
  const status = useStatus(briefing, installationId, personId);
  return (
    <li className="grid gap-2 border-b border-rule py-5">
      <h2 className="bench-code">{briefing.title}</h2>
      <p>{briefing.hazards.map((hazard) => common.hazards[hazard]).join(', ')}</p>
      <p className="text-pencil">{status.words}</p>
      <Action
        size="phone"
        look={status.valid ? 'plain' : 'main'}
        wide
        to={`/i/${installationId}/briefings/${briefing.key}`}
        label={`${words.open}: ${briefing.title}`}
      >
        {words.open}
      </Action>
    </li>
  );
}

/** How far this person is with a briefing, in a word. */
function useStatus(
  briefing: BriefingRecord,
  installationId: string,
  personId: string,
): { valid: boolean; words: string } {
  const { briefing: words } = useMessages();
  const now = useServerNow(30_000);
  const signOffs = [...useLiveMap(installationId, 'signOffs').values()].filter(
    (signOff) => signOff.personId === personId && signOff.briefingKey === briefing.key,
  );
  const me = useLiveMap(installationId, 'people').get(personId);
  const zone = useLiveMap(installationId, 'installation').get(installationId)?.timeZone ?? 'UTC';
  const { signOff, validity } = bestSignOff(signOffs, {
    versions: briefing.versions,
    now,
    ageConfirmed: me?.confirmed ?? false,
  });
  if (validity === 'valid')
    return { valid: true, words: words.status.valid(formatDate(signOff?.expiresAt ?? now, zone)) };
  return { valid: false, words: words.status[validity] };
}
