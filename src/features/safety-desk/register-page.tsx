import { useState } from 'react';
import type { RegisterRowView, RegisterView } from '../../../shared/contracts/safety';
import { Action } from '../../components/ui/action';
import { DimensionHead, PageHead } from '../../components/ui/heads';
import { Figures } from '../../components/ui/figures';
import { EmptyNote, Note } from '../../components/ui/note';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { Sheet } from '../../components/ui/sheet';
import { StateWord } from '../../components/ui/strut-glyph';
import { counted, formatDay, formatSecond } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import { useMay } from '../../lib/session';
import { useServerNow } from '../../lib/server-clock';
import { momentIn } from './desk-words';
import { useRegister } from './queries';
import { detailOf, faultWords, KIND_WORDS, whoOf } from './register-words';

/** Rows shown at a time. */
const PAGE = 100;

/** The sign-off register, newest row first. */
export function RegisterPage({ installationId }: { installationId: string }) {
  const may = useMay(installationId);
  if (!may('register.read'))
    return (
      <>
        <PageHead title="Register" />
        <EmptyNote title="The register is for organisers and safety leads.">
          Ask one of them for an extract.
        </EmptyNote>
      </>
    );
  return <Register installationId={installationId} />;
}

function Register({ installationId }: { installationId: string }) {
  const register = useRegister(installationId);
  const { data } = register;
  return (
    <>
      <PageHead
        title="Register"
        summary={data && `${counted(data.count, 'row')}, each chained to the one before.`}
      />
      {register.isPending && <Pending />}
      <Refusal error={register.error} />
      {data && (
        <div className="countersign">
          <div className="countersign-main">
            <Verified register={data} />
            <Rows installationId={installationId} rows={data.rows} />
          </div>
          <aside className="countersign-side">
            <Extract installationId={installationId} register={data} />
          </aside>
        </div>
      )}
    </>
  );
}

function Verified({ register: { verified, count } }: { register: RegisterView }) {
  if (verified.ok)
    return (
      <p role="status">
        <StateWord state="passed">
          {count === 0 ? 'No row yet.' : count === 1 ? 'The one row holds.' : `All ${count} rows hold.`}
        </StateWord>
      </p>
    );
  return (
    <Note kind="refused" title={`Row ${verified.seq} does not hold: ${faultWords(verified.why)}.`}>
      The rows from there on prove nothing any more. Somebody was at the database: keep a copy of it as it is,
      compare it with the last printed extract, and tell the organisers.
    </Note>
  );
}

function Rows({ installationId, rows }: { installationId: string; rows: readonly RegisterRowView[] }) {
  const people = useLiveMap(installationId, 'people');
  const zone = useLiveMap(installationId, 'installation').get(installationId)?.timeZone ?? 'UTC';
  const at = momentIn(zone, useServerNow(60_000));
  const [most, setMost] = useState(PAGE);
  const newest = [...rows].reverse();
  const briefings = useLiveMap(installationId, 'briefings');
  const names = {
    person: (id: string) => people.get(id)?.name ?? 'erased',
    briefing: (key: string) => [...briefings.values()].find((one) => one.key === key)?.title ?? key,
  };
  if (rows.length === 0) return <EmptyNote title="Nothing is in the register yet." />;
  return (
    <>
      <Sheet caption="Register, newest row first" className="register-sheet">
        <thead>
          <tr>
            <th scope="col" className="amount">
              row
            </th>
            <th scope="col">time</th>
            <th scope="col">what</th>
            <th scope="col">who</th>
            <th scope="col">about</th>
            <th scope="col">hash</th>
          </tr>
        </thead>
        <tbody>
          {newest.slice(0, most).map((row) => (
            <tr key={row.seq}>
              <th scope="row" className="amount">
                <Figures>{row.seq}</Figures>
              </th>
              <td className="register-time">
                {formatDay(row.at, zone)} <Figures>{formatSecond(row.at, zone)}</Figures>
              </td>
              <td>{KIND_WORDS[row.kind] ?? row.kind}</td>
              <td className={row.personal === null ? 'text-pencil' : 'font-semibold'}>{whoOf(row)}</td>
              <td>{detailOf(row, names, at)}</td>
              <td className="register-mark text-pencil" data-label="hash" title={row.hash}>
                {row.hash.slice(0, 12)}
              </td>
            </tr>
          ))}
        </tbody>
      </Sheet>
      {rows.length > most && (
        <Action look="words" onClick={() => setMost(most + PAGE)}>
          Show {Math.min(PAGE, rows.length - most)} older rows
        </Action>
      )}
    </>
  );
}

function Extract({
  installationId,
  register: { count, headHash },
}: {
  installationId: string;
  register: RegisterView;
}) {
  return (
    <>
      <section className="grid gap-3" aria-labelledby="register-head">
        <DimensionHead id="register-head" right={counted(count, 'row')}>
          Head hash
        </DimensionHead>
        <p className="head-hash">{headHash}</p>
        <p className="text-small">
          A chain shows that no row was changed or taken from the middle. Rows cut off its end show only
          against a printed extract: print one at the end of the day and keep it away from the computer.
        </p>
        <div>
          <Action href={`/api/installations/${installationId}/register/extract`} download>
            An extract to print
          </Action>
        </div>
      </section>
      <section className="grid gap-2" aria-labelledby="register-verify">
        <DimensionHead id="register-verify">Verify it yourself</DimensionHead>
        <p className="text-small">
          On the computer that serves Strutbee, with count and head hash from a printed extract:
        </p>
        <pre className="register-command" tabIndex={0}>
          <code>
            npm run verify:register -- <Flag>--installation</Flag> {installationId} <Flag>--count</Flag>{' '}
            {count} <Flag>--head</Flag> {headHash}
          </code>
        </pre>
        <p className="text-small text-pencil">
          When a person is erased, the names go and the rows still hold: only a salted commitment to them is
          in the hash.
        </p>
      </section>
    </>
  );
}

/** An option of a command: never broken at its hyphens. */
const Flag = ({ children }: { children: string }) => <span className="whitespace-nowrap">{children}</span>;
