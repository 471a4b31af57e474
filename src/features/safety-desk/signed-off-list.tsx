import { useState } from 'react';
import type { WorkInHand } from '../../../shared/contracts/safety';
import { AGE_BAND_LABELS } from '../../../shared/safety/hazards';
import { Action } from '../../components/ui/action';
import { Field } from '../../components/ui/field';
import { EmptyNote, Note } from '../../components/ui/note';
import { Sheet } from '../../components/ui/sheet';
import { ReasonAction } from './reason-dialog';
import type { SignOffLine } from './sign-off-lists';
import type { Desk } from './use-desk';
import { WorkInHandWords } from './work-in-hand';

/** So many rows need no search. */
const FEW = 12;

/** Everybody whose sign-off counts, until when, and the way to revoke it. */
export function SignedOffList({ desk }: { desk: Desk }) {
  const { signedOff } = desk.lists;
  const [typed, setTyped] = useState('');
  const [revoked, setRevoked] = useState<{ name: string; work: readonly WorkInHand[] } | null>(null);
  const wanted = typed.trim().toLowerCase();
  const shown = signedOff.filter(
    ({ person }) => person.name.toLowerCase().includes(wanted) || String(person.number).startsWith(wanted),
  );
  return (
    <>
      {revoked && (
        <div className="pt-4">
          <Note
            kind="done"
            title={`The sign-off of ${revoked.name} is revoked.`}
            actions={
              <Action look="words" onClick={() => setRevoked(null)}>
                Close
              </Action>
            }
          >
            <WorkInHandWords desk={desk} work={revoked.work} />
          </Note>
        </div>
      )}
      {signedOff.length > FEW && (
        <div className="muster-find">
          <Field
            label="name or number"
            type="search"
            autoComplete="off"
            value={typed}
            onChange={(event) => setTyped(event.target.value)}
          />
        </div>
      )}
      {shown.length === 0 ? (
        <EmptyNote
          title={signedOff.length === 0 ? 'Nobody is signed off yet.' : 'Nobody here has this name.'}
        />
      ) : (
        <Sheet caption="Signed off" rows="fixed" className="signed-off-sheet">
          <thead>
            <tr>
              <th scope="col">name</th>
              <th scope="col">briefing</th>
              <th scope="col">age band</th>
              <th scope="col">countersigned</th>
              <th scope="col">until</th>
              <th scope="col">
                <span className="sr-only">revoke</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {shown.map((line) => (
              <SignedOffRow key={line.signOff.id} desk={desk} line={line} onRevoked={setRevoked} />
            ))}
          </tbody>
        </Sheet>
      )}
    </>
  );
}

function SignedOffRow({
  desk,
  line: { person, briefing, signOff, validity },
  onRevoked,
}: {
  desk: Desk;
  line: SignOffLine;
  onRevoked: (revoked: { name: string; work: readonly WorkInHand[] }) => void;
}) {
  const { at, nameOf, may, installationId } = desk;
  const by = signOff.countersignedBy === null ? '' : nameOf(signOff.countersignedBy);
  return (
    <tr>
      <th scope="row">{person.name}</th>
      <td>
        {briefing.title} {signOff.version}
        {validity === 'AGE_NOT_CONFIRMED' && <span className="text-held">, waits for the muster desk</span>}
      </td>
      <td>{person.details ? AGE_BAND_LABELS[person.details.ageBand] : ''}</td>
      <td data-label="countersigned">
        {signOff.countersignedAt === null ? '' : at.time(signOff.countersignedAt)} by {by}
        {signOff.countersignedAs === 'organiser' ? ', organiser' : ''}
      </td>
      <td data-label="until">{signOff.expiresAt === null ? '' : at.date(signOff.expiresAt)}</td>
      <td className="amount">
        {may('briefing.revoke') && (
          <ReasonAction<{ workInHand: WorkInHand[] }>
            words="Revoke"
            label={`Revoke the sign-off of ${person.name}`}
            title={`Revoke the ${briefing.title} sign-off of ${person.name}?`}
            ask="why"
            confirm="Revoke it"
            path={`/installations/${installationId}/sign-offs/${signOff.id}/revoke`}
            onDone={({ workInHand }) => onRevoked({ name: person.name, work: workInHand })}
          >
            <p>
              {person.name} can claim, start and finish nothing that needs it until the briefing is read,
              answered, signed and countersigned again. The reason stands in the register. Work in hand is
              listed for you, not stopped.
            </p>
          </ReasonAction>
        )}
      </td>
    </tr>
  );
}
