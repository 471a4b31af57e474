import { useEffect, useRef, useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { VersionOutcome } from '../../../shared/contracts/safety';
import { Action } from '../../components/ui/action';
import { DimensionHead, PageHead } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';
import { Pending } from '../../components/ui/pending';
import { counted } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import { BriefingVersions, type Writing } from './briefing-versions';
import { NotYetList } from './not-yet-list';
import { useQuestions } from './queries';
import { SignedOffList } from './signed-off-list';
import { StillWorking } from './still-working-list';
import { TalksList } from './talks-list';
import { useDesk, type Desk } from './use-desk';
import { WaitingList } from './waiting-list';
import { WorkInHandWords } from './work-in-hand';
import { WriteVersion } from './write-version';

/** The safety lead's desk: who has signed and waits, who is signed off, the versions of the briefings. */
export function CountersignDesk({ installationId }: { installationId: string }) {
  const desk = useDesk(installationId);
  const briefings = [...useLiveMap(installationId, 'briefings').values()].sort((a, b) =>
    a.title.localeCompare(b.title),
  );
  const [query, setQuery] = useSearchParams();
  const [outcome, setOutcome] = useState<(VersionOutcome & { key: string }) | null>(null);
  const isWriting = query.has('write');
  const wasWriting = useRef(isWriting);
  useEffect(() => {
    // Back from the editor, the page begins at its head again.
    if (wasWriting.current && !isWriting) document.querySelector<HTMLElement>('.page-title')?.focus();
    wasWriting.current = isWriting;
  }, [isWriting]);
  if (!desk) return <Pending />;
  const written = briefings.find(({ key }) => key === query.get('write'));
  const write = (writing: Writing | null) => {
    setQuery(writing ? { write: writing.key, kind: writing.kind } : {});
  };
  if (written && desk.may('briefing.edit'))
    return (
      <WriteVersion
        desk={desk}
        briefing={written}
        kind={query.get('kind') === 'correction' ? 'correction' : 'change'}
        onDone={(reply) => {
          setOutcome({ ...reply, key: written.key });
          write(null);
        }}
        onClose={() => write(null)}
      />
    );
  const { waiting, signedOff } = desk.lists;
  // What waited for a second lead and has been published since needs no word any more.
  const isPast = briefings.some(
    ({ key, versions }) =>
      outcome?.status === 'proposed' &&
      key === outcome.key &&
      versions.some(({ version }) => version === outcome.version),
  );
  return (
    <>
      <PageHead
        title="Countersign"
        summary={`${counted(waiting.length, 'waits', 'wait')} for a countersign, ${signedOff.length} signed off.`}
      />
      <div className="countersign">
        <div className="countersign-main">
          {outcome && !isPast && <Outcome desk={desk} outcome={outcome} onClose={() => setOutcome(null)} />}
          <Open desk={desk} />
        </div>
        <aside className="countersign-side">
          <StillWorking desk={desk} />
          <BriefingVersions desk={desk} briefings={briefings} onWrite={write} />
          {desk.may('register.read') && (
            <section className="grid gap-2" aria-labelledby="countersign-register">
              <DimensionHead id="countersign-register">The register</DimensionHead>
              <p className="text-small">
                Every sign-off, countersign and revocation is a row, chained to the one before.
              </p>
              <div>
                <Action look="words" to={`/i/${installationId}/register`}>
                  Open the register
                </Action>
              </div>
            </section>
          )}
        </aside>
        <SignedOff desk={desk} />
      </div>
    </>
  );
}

/** What somebody has to do something about. */
function Open({ desk }: { desk: Desk }) {
  const { waiting, talks, notYet, notBegun } = desk.lists;
  const questionsOf = useQuestions(desk.installationId, [...talks, ...notYet]);
  const begun = notBegun.reduce((sum, { people }) => sum + people.length, 0);
  return (
    <>
      <section aria-labelledby="countersign-waiting">
        <DimensionHead id="countersign-waiting" right={counted(waiting.length, 'person', 'people')}>
          Waiting for a countersign
        </DimensionHead>
        {desk.me && desk.may('briefing.countersign') && waiting.length > 0 && (
          <p className="py-2">
            Countersign one by one, and only whom you, {desk.me.name}, saw answer and sign. What it allows is
            open to them at once.
          </p>
        )}
        <WaitingList desk={desk} />
      </section>
      {talks.length > 0 && (
        <section aria-labelledby="countersign-talks">
          <DimensionHead id="countersign-talks" right={counted(talks.length, 'person', 'people')}>
            A talk is needed
          </DimensionHead>
          <TalksList desk={desk} questionsOf={questionsOf} />
        </section>
      )}
      {notYet.length + begun > 0 && (
        <section aria-labelledby="countersign-not-yet">
          <DimensionHead id="countersign-not-yet" right={counted(notYet.length + begun, 'person', 'people')}>
            Not passed or not signed yet
          </DimensionHead>
          <NotYetList desk={desk} questionsOf={questionsOf} />
        </section>
      )}
    </>
  );
}

/** Everybody whose sign-off counts. It is long, so it comes last on a phone. */
function SignedOff({ desk }: { desk: Desk }) {
  return (
    <section className="countersign-last" aria-labelledby="countersign-signed-off">
      <DimensionHead
        id="countersign-signed-off"
        right={counted(desk.lists.signedOff.length, 'person', 'people')}
      >
        Signed off
      </DimensionHead>
      <SignedOffList desk={desk} />
      <p className="pt-4 text-small text-pencil">
        Local codes and the advice of competent people come before this list.
      </p>
    </section>
  );
}

function Outcome({ desk, outcome, onClose }: { desk: Desk; outcome: VersionOutcome; onClose: () => void }) {
  const { version, status, workInHand } = outcome;
  const close = (
    <Action look="words" onClick={onClose}>
      Close
    </Action>
  );
  if (status === 'proposed')
    return (
      <Note kind="done" title={`Correction ${version} is proposed.`} actions={close}>
        It stands when a second safety lead has read it. Until then everybody reads version {version - 1}.
      </Note>
    );
  return (
    <Note kind="done" title={`Version ${version} is published.`} actions={close}>
      <WorkInHandWords desk={desk} work={workInHand} />
    </Note>
  );
}
