import type { PersonRecord } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { Note } from '../../components/ui/note';
import type { LiveState } from '../../lib/live-state';
import { useMessages } from '../../lib/messages';

interface Props {
  installationId: string;
  me: PersonRecord | undefined;
  state: LiveState;
}

/** Joined, not confirmed yet (or gone home): the desk comes first; briefings can be read meanwhile. */
export function AtTheDoor({ installationId, me, state }: Props) {
  const { door, refusals } = useMessages();
  const gone = me?.details?.leftAt != null;
  const name = me?.name ?? '';
  const briefings = [...state.records.briefings.values()];
  return (
    <div className="grid gap-6">
      <Note kind="ask" title={door.waiting.title}>
        <p>{gone ? refusals.PERSON_NOT_ON_SITE : door.waiting.text(name)}</p>
        {me && <p className="mt-2 bench-code">{door.waiting.number(String(me.number))}</p>}
      </Note>
      {briefings.map((briefing) => (
        <Action
          key={briefing.id}
          wide
          size="glove"
          look="main"
          to={`/i/${installationId}/briefings/${briefing.key}`}
          detail={briefing.title}
        >
          {door.waiting.read}
        </Action>
      ))}
    </div>
  );
}
