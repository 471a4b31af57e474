import { Sheet } from '../../components/ui/sheet';
import { listed } from '../../lib/formats';
import { notYetWords } from './desk-words';
import type { QuestionsOf } from './queries';
import type { Desk } from './use-desk';

/** Who has something to do before anybody can countersign, in grey; and who has not begun. */
export function NotYetList({ desk, questionsOf }: { desk: Desk; questionsOf: QuestionsOf }) {
  const { notYet, notBegun } = desk.lists;
  return (
    <div className="grid gap-3 py-2 text-pencil">
      {notYet.length > 0 && (
        <Sheet caption="Not passed or not signed yet">
          <thead>
            <tr>
              <th scope="col">name</th>
              <th scope="col">briefing</th>
              <th scope="col">where they are</th>
            </tr>
          </thead>
          <tbody>
            {notYet.map((line) => (
              <tr key={line.signOff.id}>
                <th scope="row">{line.person.name}</th>
                <td>
                  {line.briefing.title} {line.signOff.version}
                </td>
                <td>
                  {notYetWords(
                    line,
                    questionsOf(line.briefing.key, line.signOff.version)?.size ?? 0,
                    desk.at,
                  )}
                </td>
              </tr>
            ))}
          </tbody>
        </Sheet>
      )}
      {notBegun
        .filter(({ people }) => people.length > 0)
        .map(({ briefing, people }) => (
          <p key={briefing.id} className="text-small">
            On site and not begun with {briefing.title}: {listed(people.map(({ name }) => name))}.
          </p>
        ))}
    </div>
  );
}
