import { useState } from 'react';
import type { PersonRecord } from '../../../shared/contracts/live';
import type { LeavingView } from '../../../shared/contracts/people';
import { AGE_BAND_LABELS } from '../../../shared/safety/hazards';
import { Action } from '../../components/ui/action';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { Field } from '../../components/ui/field';
import { EmptyNote, Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { Sheet } from '../../components/ui/sheet';
import { counted, formatTime, listed } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import { useSend } from '../../lib/use-send';
import { adultOnSite, found } from './presence';

interface ListProps {
  installationId: string;
  zone: string;
  maySignOut: boolean;
}

/** Everybody in the hall, to be found by name or number and signed out. */
export function OnSite({
  present,
  installationId,
  zone,
  maySignOut,
}: ListProps & { present: readonly PersonRecord[] }) {
  const [typed, setTyped] = useState('');
  const [left, setLeft] = useState<{ name: string; view: LeavingView } | null>(null);
  const shown = found(present, typed);
  return (
    <>
      <div className="muster-find">
        <Field
          label="name or number"
          type="search"
          autoComplete="off"
          value={typed}
          onChange={(event) => setTyped(event.target.value)}
        />
        <p className="text-pencil" role="status">
          {typed.trim() === '' ? '' : `${shown.length} of ${counted(present.length, 'person', 'people')}`}
        </p>
      </div>
      {left && <Left {...left} onClose={() => setLeft(null)} />}
      {shown.length === 0 ? (
        <EmptyNote title={present.length === 0 ? 'Nobody is on site yet.' : 'Nobody here has this name.'} />
      ) : (
        <Sheet caption="People on site" rows="fixed" className="flowing">
          <thead>
            <tr>
              <th scope="col">number</th>
              <th scope="col">name</th>
              <th scope="col">age band, adult</th>
              <th scope="col">duties</th>
              <th scope="col">since</th>
              {maySignOut && (
                <th scope="col" className="amount">
                  out
                </th>
              )}
            </tr>
          </thead>
          <tbody>
            {shown.map((person) => (
              <tr key={person.id}>
                <td>{person.number}</td>
                <th scope="row">{person.name}</th>
                <td>
                  <Band person={person} present={present} />
                </td>
                <td>{person.duties.filter((duty) => duty !== 'volunteer').join(', ')}</td>
                <td data-label="since">
                  {person.details?.confirmedAt ? formatTime(person.details.confirmedAt, zone) : ''}
                </td>
                {maySignOut && (
                  <td className="amount beside">
                    <SignOut
                      installationId={installationId}
                      person={person}
                      present={present}
                      onDone={(view) => {
                        setTyped('');
                        setLeft({ name: person.name, view });
                      }}
                    />
                  </td>
                )}
              </tr>
            ))}
          </tbody>
        </Sheet>
      )}
    </>
  );
}

function Band({ person, present }: { person: PersonRecord; present: readonly PersonRecord[] }) {
  const { details } = person;
  if (!details) return null;
  if (details.ageBand === '18+') return AGE_BAND_LABELS['18+'];
  const adult = adultOnSite(details.adultName, present);
  return (
    <>
      {AGE_BAND_LABELS[details.ageBand]}, with {details.adultName ?? 'nobody named'}
      {!adult && <span className="text-held"> (not on site)</span>}
    </>
  );
}

interface SignOutProps {
  installationId: string;
  person: PersonRecord;
  present: readonly PersonRecord[];
  onDone: (view: LeavingView) => void;
}

function SignOut({ installationId, person, present, onDone }: SignOutProps) {
  const steps = useLiveMap(installationId, 'steps');
  const pieces = useLiveMap(installationId, 'subAssemblies');
  const checkouts = useLiveMap(installationId, 'checkouts');
  const tools = useLiveMap(installationId, 'tools');
  const held = () =>
    [...steps.values()]
      .filter((step) => !step.removed && step.crew.some(({ personId }) => personId === person.id))
      .map((step) => `${pieces.get(step.subAssemblyId)?.code ?? ''} ${step.name}`);
  const out = () =>
    [...checkouts.values()]
      .filter((checkout) => checkout.backAt === null && checkout.personId === person.id)
      .map((checkout) => tools.get(checkout.toolId)?.number ?? 'a tool');
  const minors = () =>
    present.filter((other) => adultOnSite(other.details?.adultName, present)?.id === person.id);
  return (
    <ConfirmAction<LeavingView>
      words="Sign out"
      look="words"
      label={`Sign out ${person.name}`}
      title={`Sign out ${person.name}?`}
      confirm="Sign out"
      wish={{ method: 'POST', path: `/installations/${installationId}/people/${person.id}/sign-out` }}
      onDone={onDone}
    >
      <Consequences held={held()} out={out()} minors={minors().map(({ name }) => name)} />
    </ConfirmAction>
  );
}

function Consequences({ held, out, minors }: { held: string[]; out: string[]; minors: string[] }) {
  return (
    <>
      <p>
        {held.length === 0
          ? 'They have no step in hand.'
          : `They have ${listed(held)} in hand; ${held.length === 1 ? 'it is' : 'these are'} given back.`}
      </p>
      {out.length > 0 && <p className="text-held">They still have {listed(out)}. Take that back first.</p>}
      {minors.length > 0 && (
        <p className="text-held">
          {listed(minors)} {minors.length === 1 ? 'is' : 'are'} here with them. Ask who looks after{' '}
          {minors.length === 1 ? 'that person' : 'them'} now, or sign them out too.
        </p>
      )}
    </>
  );
}

/** What somebody left behind. */
function Left({ name, view, onClose }: { name: string; view: LeavingView; onClose: () => void }) {
  const { toolsOut, givenBack } = view;
  return (
    <Note
      kind={toolsOut.length > 0 ? 'ask' : 'done'}
      title={`${name} is signed out.`}
      actions={
        <Action look="words" onClick={onClose}>
          Close
        </Action>
      }
    >
      {givenBack.length > 0 && <p>{counted(givenBack.length, 'step')} given back.</p>}
      {toolsOut.length > 0 && (
        <p>
          Still out with them: {listed(toolsOut.map((tool) => `${tool.number} ${tool.name}`))}. Ask for it
          before they go.
        </p>
      )}
    </Note>
  );
}

/** Who has left today and may come back. */
export function Gone({
  gone,
  installationId,
  zone,
  full,
}: Omit<ListProps, 'maySignOut'> & { gone: readonly PersonRecord[]; full: boolean }) {
  return (
    <ul className="gone">
      {gone.map((person) => (
        <li key={person.id}>
          <span>
            <strong>{person.name}</strong>, {person.number}
          </span>
          <span className="text-pencil">
            left {person.details?.leftAt ? formatTime(person.details.leftAt, zone) : ''}
          </span>
          <ComeBack {...{ installationId, person, full }} />
        </li>
      ))}
    </ul>
  );
}

function ComeBack({
  installationId,
  person,
  full,
}: {
  installationId: string;
  person: PersonRecord;
  full: boolean;
}) {
  const confirm = useSend();
  const ageBand = person.details?.ageBand ?? '18+';
  return (
    <>
      <Action
        look="words"
        disabled={full}
        busy={confirm.isPending}
        label={`In again: ${person.name}`}
        onClick={() =>
          confirm.mutate({
            method: 'POST',
            path: `/installations/${installationId}/people/${person.id}/confirm`,
            body: { ageBand },
          })
        }
      >
        In again
      </Action>
      <Refusal error={confirm.error} />
    </>
  );
}
