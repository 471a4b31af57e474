import { useState } from 'react';
import { AGE_BAND_LABELS } from '../../../shared/safety/hazards';
import { Action } from '../../components/ui/action';
import { EmptyNote } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { Sheet } from '../../components/ui/sheet';
import { StateWord } from '../../components/ui/strut-glyph';
import { adultHere } from './desk-words';
import { useQuestions } from './queries';
import { Signature } from './signature';
import { questionsRight, type SignOffLine } from './sign-off-lists';
import { allowedFor, countersignOffer, type Desk } from './use-desk';
import { useOnce } from './use-once';

/** Who has signed and waits; each is countersigned by itself, by somebody who was there. */
export function WaitingList({ desk }: { desk: Desk }) {
  const { waiting, signedOff } = desk.lists;
  // Whoever was countersigned keeps the row until it is cleared: rows must not move up under a finger.
  const [kept, setKept] = useState<ReadonlySet<string>>(new Set());
  const fresh = waiting.filter(({ signOff }) => !kept.has(signOff.id));
  if (fresh.length > 0) setKept(new Set([...kept, ...fresh.map(({ signOff }) => signOff.id)]));
  const done = signedOff.filter(({ signOff }) => kept.has(signOff.id));
  const lines = [...waiting, ...done].sort((a, b) => (a.signOff.signedAt ?? 0) - (b.signOff.signedAt ?? 0));
  const questionsOf = useQuestions(desk.installationId, lines);
  if (lines.length === 0)
    return (
      <EmptyNote title="Nobody waits for a countersign.">
        Who has passed the questions and signed appears here at once.
      </EmptyNote>
    );
  return (
    <>
      <Sheet caption="Signed, waiting for a countersign" className="countersign-sheet">
        <thead>
          <tr>
            <th scope="col">signed by</th>
            <th scope="col">age band, adult</th>
            <th scope="col">questions</th>
            <th scope="col">signature</th>
            <th scope="col">then allowed</th>
            <th scope="col">
              <span className="sr-only">countersign</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {lines.map((line) => (
            <WaitingRow
              key={line.signOff.id}
              desk={desk}
              line={line}
              questions={questionsOf(line.briefing.key, line.signOff.version)?.size}
            />
          ))}
        </tbody>
      </Sheet>
      {done.length > 0 && (
        <Action look="words" onClick={() => setKept(new Set(waiting.map(({ signOff }) => signOff.id)))}>
          Clear who is countersigned
        </Action>
      )}
    </>
  );
}

function WaitingRow({
  desk,
  line,
  questions,
}: {
  desk: Desk;
  line: SignOffLine;
  questions: number | undefined;
}) {
  const { person, briefing, signOff } = line;
  const { me, at, installationId } = desk;
  const allowed = allowedFor(desk, line);
  const offer = countersignOffer(desk, line);
  const done = signOff.countersignedAt !== null;
  const right = questions === undefined ? null : questionsRight(signOff, questions);
  return (
    <tr data-off={!done && offer?.ok === false ? '' : undefined}>
      <th scope="row">{person.name}</th>
      <td data-label="age">
        <Age desk={desk} line={line} />
        {person.id === me?.id && ', you'}
        {!person.onSite && <span className="block text-pencil">not on site now</span>}
      </td>
      <td className="whitespace-nowrap" data-label="questions right">
        {right === null ? '' : `${right} of ${questions}`}
      </td>
      <td>
        {desk.may('briefing.countersign') ? (
          <Signature installationId={installationId} signOffId={signOff.id} name={person.name} />
        ) : (
          <span className="text-pencil">for who countersigns</span>
        )}
      </td>
      <td>
        {!done && offer?.ok === false ? (
          offer.why
        ) : (
          <span className={allowed?.nothing ? 'text-held font-semibold' : undefined}>
            {allowed?.words ?? 'as the age band allows'}
          </span>
        )}
        <span className="block text-pencil">
          {briefing.title} {signOff.version}, signed{' '}
          {signOff.signedAt === null ? '' : at.time(signOff.signedAt)}
        </span>
      </td>
      <td className="countersign-act">
        {done ? (
          <span className="whitespace-nowrap" role="status">
            <StateWord state="passed">
              countersigned {signOff.countersignedAt === null ? '' : at.time(signOff.countersignedAt)}
            </StateWord>
          </span>
        ) : (
          offer?.ok && <Countersign desk={desk} line={line} as={offer.as} />
        )}
      </td>
    </tr>
  );
}

function Age({ desk, line: { person } }: { desk: Desk; line: SignOffLine }) {
  if (!person.details) return null;
  const { ageBand, adultName } = person.details;
  if (ageBand === '18+') return <>adult</>;
  const here = adultHere(adultName, desk.people.values());
  return (
    <>
      {AGE_BAND_LABELS[ageBand]}
      <span className={here ? 'block text-pencil' : 'block text-held'}>
        {adultName === null ? 'no adult named' : `with ${adultName}, ${here ? 'on site' : 'not on site'}`}
      </span>
    </>
  );
}

function Countersign({ desk, line, as }: { desk: Desk; line: SignOffLine; as: 'safety lead' | 'organiser' }) {
  const { person, signOff } = line;
  const { press, busy, error } = useOnce();
  return (
    <>
      <Action
        size="phone"
        busy={busy}
        label={`Countersign ${person.name}${as === 'organiser' ? ' as organiser' : ''}`}
        detail={as === 'organiser' ? 'as organiser, logged' : undefined}
        onClick={() =>
          press({
            method: 'POST',
            path: `/installations/${desk.installationId}/sign-offs/${signOff.id}/countersign`,
          })
        }
      >
        Countersign
      </Action>
      <Refusal error={error} />
    </>
  );
}
