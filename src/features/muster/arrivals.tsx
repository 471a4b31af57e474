import { useEffect, useId, useRef, useState } from 'react';
import type { PersonRecord } from '../../../shared/contracts/live';
import { AGE_BAND_LABELS, AGE_BANDS, type AgeBand } from '../../../shared/safety/hazards';
import { Action } from '../../components/ui/action';
import { Field } from '../../components/ui/field';
import { EmptyNote } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { StateWord } from '../../components/ui/strut-glyph';
import { ApiError } from '../../lib/api';
import { formatDuration, formatTime } from '../../lib/formats';
import { useSend } from '../../lib/use-send';
import { adultOnSite } from './presence';

export interface ArrivalsProps {
  installationId: string;
  waiting: readonly PersonRecord[];
  present: readonly PersonRecord[];
  zone: string;
  now: number;
  /** The hall's limit is reached: nobody more can be confirmed. */
  full: boolean;
}

/** Whoever has joined and stands at the desk: one press confirms the person and the age that was seen. */
export function Arrivals({ installationId, waiting, present, zone, now, full }: ArrivalsProps) {
  // Whoever was confirmed keeps the row until it is cleared: rows must not move up under a finger.
  const [seen, setSeen] = useState<ReadonlySet<string>>(new Set(waiting.map(({ id }) => id)));
  const fresh = waiting.filter(({ id }) => !seen.has(id));
  if (fresh.length > 0) setSeen(new Set([...seen, ...fresh.map(({ id }) => id)]));
  const done = present.filter(({ id }) => seen.has(id));
  const rows = [...waiting, ...done].sort(
    (a, b) => (a.details?.joinedAt ?? 0) - (b.details?.joinedAt ?? 0) || a.number - b.number,
  );
  if (rows.length === 0)
    return (
      <EmptyNote title="Nobody waits at the desk.">
        Who joins with the code on the poster appears here at once.
      </EmptyNote>
    );
  return (
    <>
      <ul className="arrivals">
        {rows.map((person) =>
          person.onSite ? (
            <Confirmed key={person.id} person={person} zone={zone} />
          ) : (
            <Arrival key={person.id} {...{ installationId, person, present, now, full }} />
          ),
        )}
      </ul>
      {done.length > 0 && (
        <Action look="words" onClick={() => setSeen(new Set(waiting.map(({ id }) => id)))}>
          Clear who is confirmed
        </Action>
      )}
    </>
  );
}

/** Somebody who was confirmed while this page was open. */
function Confirmed({ person, zone }: { person: PersonRecord; zone: string }) {
  const { details } = person;
  return (
    <li
      className="arrival"
      data-minor={details && details.ageBand !== '18+' ? '' : undefined}
      aria-label={person.name}
    >
      <div className="arrival-who">
        <p className="arrival-name">{person.name}</p>
        <p className="text-pencil">number {person.number}</p>
      </div>
      <p className="arrival-done" role="status">
        <StateWord state="passed">
          in{details?.confirmedAt ? ` since ${formatTime(details.confirmedAt, zone)}` : ''}
          {details ? `, ${AGE_BAND_LABELS[details.ageBand]}` : ''}
          {details?.adultName ? `, with ${details.adultName}` : ''}
        </StateWord>
      </p>
    </li>
  );
}

interface ArrivalProps extends Omit<ArrivalsProps, 'waiting' | 'zone'> {
  person: PersonRecord;
}

function Arrival({ installationId, person, present, now, full }: ArrivalProps) {
  const said = person.details?.ageBand ?? '18+';
  const named = person.details?.adultName ?? '';
  const [adultName, setAdultName] = useState(named);
  const [pressed, setPressed] = useState<AgeBand | null>(null);
  const confirm = useSend();
  const sending = useRef(false);
  const adultId = useId();
  const problem =
    confirm.error instanceof ApiError
      ? confirm.error.fields.find(({ path }) => path === 'adultName')?.message
      : undefined;
  const asksAdult = said !== '18+' || problem !== undefined;
  const adult = adultOnSite(adultName, present);
  const press = (ageBand: AgeBand) => {
    // Once it is accepted the row waits for the live state to say so: a second press would be refused.
    if (sending.current) return;
    sending.current = true;
    setPressed(ageBand);
    confirm.mutate(
      {
        method: 'POST',
        path: `/installations/${installationId}/people/${person.id}/confirm`,
        body: { ageBand, ...(ageBand === '18+' || adultName.trim() === '' ? {} : { adultName }) },
      },
      {
        onError: () => {
          sending.current = false;
        },
      },
    );
  };
  useEffect(() => {
    if (problem !== undefined) document.getElementById(adultId)?.focus();
  }, [problem, adultId]);
  const since = person.details ? (now - person.details.joinedAt) / 1000 : 0;
  return (
    <li className="arrival" aria-label={person.name}>
      <div className="arrival-who">
        <p className="arrival-name">{person.name}</p>
        <p className="text-pencil">
          number {person.number}, waits {formatDuration(Math.max(0, since))}
        </p>
        <p>
          says {AGE_BAND_LABELS[said]}
          {said !== '18+' && named !== '' && (
            <span className={adult ? undefined : 'text-held'}>
              , with {named}, {adult ? 'who is on site' : 'who is not on site'}
            </span>
          )}
        </p>
      </div>
      <div className="arrival-confirm">
        {asksAdult && (
          <Field
            id={adultId}
            label="the adult with them, first name and initial"
            value={adultName}
            list={`adults-${person.id}`}
            autoComplete="off"
            onChange={(event) => setAdultName(event.target.value)}
            error={problem}
            hint={
              adultName.trim() !== '' && !adult
                ? `Nobody on site has this name. Confirm ${adultName.trim()} first, or write down who is here.`
                : undefined
            }
          />
        )}
        {asksAdult && (
          <datalist id={`adults-${person.id}`}>
            {present
              .filter(({ details }) => details?.ageBand === '18+')
              .map(({ id, name }) => (
                <option key={id} value={name} />
              ))}
          </datalist>
        )}
        <div className="arrival-bands" role="group" aria-label={`Confirm ${person.name} as`}>
          {AGE_BANDS.map((band) => (
            <Action
              key={band}
              size="phone"
              look={band === said ? 'main' : 'plain'}
              label={`${AGE_BAND_LABELS[band]}: confirm ${person.name}`}
              busy={(confirm.isPending || confirm.isSuccess) && pressed === band}
              disabled={full}
              onClick={() => press(band)}
            >
              {AGE_BAND_LABELS[band]}
            </Action>
          ))}
        </div>
        {problem === undefined && <Refusal error={confirm.error} />}
      </div>
    </li>
  );
}
