import { talkNeeded } from '../../../shared/safety/sign-off';
import { Action } from '../../components/ui/action';
import { Refusal } from '../../components/ui/refusal';
import type { QuestionsOf } from './queries';
import type { SignOffLine } from './sign-off-lists';
import type { Desk } from './use-desk';
import { useOnce } from './use-once';

/** Who missed a question twice, and which one: a lead talks with them, then they answer again. */
export function TalksList({ desk, questionsOf }: { desk: Desk; questionsOf: QuestionsOf }) {
  return (
    <ul>
      {desk.lists.talks.map((line) => (
        <Talk key={line.signOff.id} desk={desk} line={line} questionsOf={questionsOf} />
      ))}
    </ul>
  );
}

function Talk({ desk, line, questionsOf }: { desk: Desk; line: SignOffLine; questionsOf: QuestionsOf }) {
  const { person, briefing, signOff } = line;
  const { press, busy, error } = useOnce();
  const texts = questionsOf(briefing.key, signOff.version);
  return (
    <li className="desk-line" aria-label={person.name}>
      <div>
        <p className="font-semibold">{person.name}</p>
        <p className="text-small text-pencil">{briefing.title}, missed twice:</p>
        <ul className="text-small">
          {talkNeeded(signOff).map((id) => (
            <li key={id}>{texts?.get(id) ?? 'a question'}</li>
          ))}
        </ul>
      </div>
      {desk.may('briefing.talk') &&
        (person.id === desk.me?.id ? (
          <p className="text-small text-pencil">Your own sheet: another safety lead talks with you.</p>
        ) : (
          <Action
            size="phone"
            look="plain"
            busy={busy}
            label={`I talked with them: ${person.name}`}
            onClick={() =>
              press({
                method: 'POST',
                path: `/installations/${desk.installationId}/sign-offs/${signOff.id}/talk`,
              })
            }
          >
            I talked with them
          </Action>
        ))}
      <Refusal error={error} />
    </li>
  );
}
