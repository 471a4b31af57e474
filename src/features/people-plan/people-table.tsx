import { useState } from 'react';
import type { PersonRecord } from '../../../shared/contracts/live';
import { AGE_BAND_LABELS } from '../../../shared/safety';
import { CheckField } from '../../components/ui/choices';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { Field } from '../../components/ui/field';
import { Figures } from '../../components/ui/figures';
import { ChoiceRow } from '../../components/ui/heads';
import { EmptyNote, Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { Sheet } from '../../components/ui/sheet';
import { counted, listed } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import { useSend } from '../../lib/use-send';
import { GIVEN_DUTIES, type GivenDuty } from './duty-words';

type Shown = 'all' | 'duties' | 'waiting';

const whereabouts = (person: PersonRecord): string => {
  if (person.onSite) return 'on site';
  if (person.details?.leftAt) return 'has left';
  return person.confirmed ? 'not on site' : 'to be confirmed';
};

/** What a person holds just now, for the words of taking them out. */
function useHeld(installationId: string) {
  const steps = useLiveMap(installationId, 'steps');
  const checkouts = useLiveMap(installationId, 'checkouts');
  const tools = useLiveMap(installationId, 'tools');
  return (personId: string) => ({
    steps: [...steps.values()].filter(
      (step) => !step.removed && step.crew.some((member) => member.personId === personId),
    ).length,
    tools: [...checkouts.values()]
      .filter((out) => out.backAt === null && out.personId === personId)
      .map((out) => tools.get(out.toolId)?.number ?? 'a tool'),
  });
}

/** Everybody of the installation and the duties they have. */
export function PeopleTable({
  installationId,
  ownId,
  closed,
}: {
  installationId: string;
  ownId: string | null;
  closed: boolean;
}) {
  const people = [...useLiveMap(installationId, 'people').values()]
    .filter((person) => !person.removed)
    .sort((a, b) => a.number - b.number);
  const [shown, setShown] = useState<Shown>('all');
  const [wanted, setWanted] = useState('');
  const change = useSend();
  const pending = change.isPending ? change.variables.path : null;
  const leads = people.filter((person) => person.duties.includes('safety lead'));
  const rows = people.filter(
    (person) =>
      person.name.toLowerCase().includes(wanted.trim().toLowerCase()) &&
      (shown === 'all' ||
        (shown === 'duties' ? person.duties.some((duty) => duty !== 'volunteer') : !person.confirmed)),
  );
  const give = (person: PersonRecord, duty: GivenDuty, on: boolean) =>
    change.mutate({
      method: 'PUT',
      path: `/installations/${installationId}/people/${person.id}/duties`,
      body: { duty, on },
    });
  return (
    <div className="grid gap-4">
      <SafetyLeads names={leads.map(({ name }) => name)} />
      <div className="flex flex-wrap items-end justify-between gap-x-8 gap-y-3">
        <ChoiceRow<Shown>
          label="who is shown"
          value={shown}
          onChange={setShown}
          choices={[
            { value: 'all', label: 'Everybody' },
            { value: 'duties', label: 'With a duty' },
            { value: 'waiting', label: 'To be confirmed' },
          ]}
        />
        <Field
          className="w-56 max-w-full"
          label="name"
          value={wanted}
          onChange={(event) => setWanted(event.target.value)}
        />
      </div>
      <Refusal error={change.error} />
      {rows.length === 0 ? (
        <EmptyNote title="Nobody here with that name or duty." />
      ) : (
        <Sheet caption="People and their duties" className="people-sheet">
          <thead>
            <tr>
              <th scope="col">number</th>
              <th scope="col">name</th>
              {GIVEN_DUTIES.map(({ duty }) => (
                <th key={duty} scope="col" className="duty-head">
                  {duty}
                </th>
              ))}
              <th scope="col">where</th>
              <th scope="col">
                <span className="sr-only">what you can do</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map((person) => (
              <PersonRow
                key={person.id}
                person={person}
                path={`/installations/${installationId}/people/${person.id}`}
                isSelf={person.id === ownId}
                closed={closed}
                busy={pending?.includes(person.id) ?? false}
                onGive={(duty, on) => give(person, duty, on)}
                installationId={installationId}
              />
            ))}
          </tbody>
        </Sheet>
      )}
    </div>
  );
}

/** Publishing asks for two, and so does every later change. */
function SafetyLeads({ names }: { names: readonly string[] }) {
  if (names.length >= 2)
    return (
      <p>
        {counted(names.length, 'safety lead')}: {listed(names)}.
      </p>
    );
  return (
    <Note
      kind="ask"
      announce={false}
      title={names.length === 1 ? `${names[0] ?? ''} is the only safety lead.` : 'There is no safety lead.'}
    >
      Publishing asks for two: one cannot countersign their own briefing, and one may have to leave the hall.
    </Note>
  );
}

function PersonRow({
  person,
  path,
  isSelf,
  closed,
  busy,
  onGive,
  installationId,
}: {
  person: PersonRecord;
  path: string;
  isSelf: boolean;
  closed: boolean;
  busy: boolean;
  onGive: (duty: GivenDuty, on: boolean) => void;
  installationId: string;
}) {
  const band = person.details?.ageBand;
  return (
    <tr>
      <td data-label="number">
        <Figures>{person.number}</Figures>
      </td>
      <th scope="row">
        {person.name}
        {isSelf && <span className="font-normal text-pencil">, you</span>}
        {band && band !== '18+' && (
          <span className="block text-small font-normal text-pencil">{AGE_BAND_LABELS[band]}</span>
        )}
      </th>
      {GIVEN_DUTIES.map(({ duty }) => (
        <td key={duty} className="duty-cell">
          <CheckField
            checked={person.duties.includes(duty)}
            disabled={busy || closed}
            onChange={(event) => onGive(duty, event.target.checked)}
          >
            <span className="sr-only">{person.name}: </span>
            <span className="duty-word">{duty}</span>
          </CheckField>
        </td>
      ))}
      <td data-label="where">{whereabouts(person)}</td>
      <td>
        <span className="flex flex-wrap gap-x-4 desk:justify-end">
          {!closed && !isSelf && <TakeOut person={person} path={path} installationId={installationId} />}
          {!isSelf && <Erase person={person} path={path} installationId={installationId} />}
        </span>
      </td>
    </tr>
  );
}

function heldWords(name: string, held: { steps: number; tools: string[] }): string {
  const steps =
    held.steps === 0
      ? ''
      : `${counted(held.steps, 'step')} in hand ${held.steps === 1 ? 'is' : 'are'} given back.`;
  const tools = held.tools.length === 0 ? '' : `${name} still has ${listed(held.tools)}.`;
  return [steps, tools].filter(Boolean).join(' ') || `${name} has nothing in hand and no tool out.`;
}

type RowAction = { person: PersonRecord; path: string; installationId: string };

function TakeOut({ person, path, installationId }: RowAction) {
  const held = useHeld(installationId)(person.id);
  return (
    <ConfirmAction
      words="Take out"
      look="words"
      label={`Take out ${person.name}`}
      title={`Take ${person.name} out of this installation?`}
      confirm="Take them out"
      wish={{ method: 'DELETE', path }}
    >
      <p>{heldWords(person.name, held)}</p>
      <p>
        They are signed out of it at once and lose their duties here. Their name stays in the day log and
        their sign-offs in the register. They can join again with the code.
      </p>
    </ConfirmAction>
  );
}

function Erase({ person, path, installationId }: RowAction) {
  const held = useHeld(installationId)(person.id);
  return (
    <ConfirmAction
      words="Erase"
      look="words"
      label={`Erase ${person.name}`}
      title={`Erase ${person.name} for good?`}
      confirm="Erase them"
      wish={{ method: 'POST', path: `${path}/erase` }}
    >
      <p>{heldWords(person.name, held)}</p>
      <p>
        Name, e-mail, age and signatures are gone and cannot be brought back. What they did stays, under
        number {person.number}; the register still verifies.
      </p>
      {held.tools.length > 0 && (
        <p>Take {listed(held.tools)} back first, so that nothing is lost track of.</p>
      )}
    </ConfirmAction>
  );
}
