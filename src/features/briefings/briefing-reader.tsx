import { useQuery } from '@tanstack/react-query';
import type { BriefingTextView } from '../../../shared/contracts/safety';
import { bestSignOff, signOffProgress, type SignOffProgress } from '../../../shared/safety/sign-off';
import { MarkedStick } from '../../components/ui/marked-stick';
import { Note } from '../../components/ui/note';
import { Pending } from '../../components/ui/pending';
import { useWidth } from '../../components/ui/use-width';
import { ApiError, get } from '../../lib/api';
import { formatDate, formatTime, listed } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import { useMessages } from '../../lib/messages';
import { useServerNow } from '../../lib/server-clock';
import { BriefingText } from './briefing-text';
import { QuestionSheet } from './question-sheet';
import { SignForm } from './sign-form';

interface Props {
  installationId: string;
  personId: string;
  briefingKey: string;
}

/** Read, answer, sign; then a safety lead countersigns. */
export function BriefingReader({ installationId, personId, briefingKey }: Props) {
  const { briefing: words, common } = useMessages();
  const now = useServerNow(30_000);
  const record = [...useLiveMap(installationId, 'briefings').values()].find((one) => one.key === briefingKey);
  const people = useLiveMap(installationId, 'people');
  const zone = useLiveMap(installationId, 'installation').get(installationId)?.timeZone ?? 'UTC';
  const signOffs = [...useLiveMap(installationId, 'signOffs').values()].filter(
    (signOff) => signOff.personId === personId && signOff.briefingKey === briefingKey,
  );
  // A new version is another text: it is fetched under a key of its own.
  const newest = record?.versions.at(-1)?.version ?? 0;
  const text = useQuery({
    queryKey: ['briefing', installationId, briefingKey, newest],
    queryFn: () => get<BriefingTextView>(`/installations/${installationId}/briefings/${briefingKey}`),
    staleTime: Infinity,
  });
  if (text.error) {
    return (
      <Note kind="refused" title={text.error instanceof ApiError ? text.error.message : common.failed} />
    );
  }
  if (!text.data || !record) return <Pending />;
  const view = text.data;
  const context = { versions: record.versions, now, ageConfirmed: people.get(personId)?.confirmed ?? false };
  const { signOff, validity } = bestSignOff(signOffs, context);
  const { steps } = signOffProgress(signOff, context);
  const current = signOffs.find((one) => one.version === view.version);
  const leads = [...people.values()]
    .filter((person) => person.onSite && person.duties.includes('safety lead') && person.id !== personId)
    .map((person) => person.name);
  const me = people.get(personId)?.name ?? '';
  const open = validity !== 'valid' && validity !== 'NOT_COUNTERSIGNED' && validity !== 'AGE_NOT_CONFIRMED';
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-7">
      <Progress code={view.title} steps={steps} />
      {validity === 'valid' && (
        <Note
          kind="done"
          title={words.done(
            record.hazards.map((hazard) => common.hazards[hazard]),
            formatDate(signOff?.expiresAt ?? now, zone),
          )}
        />
      )}
      {validity === 'NOT_COUNTERSIGNED' && (
        <Note kind="ask" title={words.waiting.title}>
          <p>{words.waiting.text(leads)}</p>
        </Note>
      )}
      {validity === 'REVOKED' && (
        <Note kind="refused" title={words.status.REVOKED}>
          {signOff?.revokeReason}
        </Note>
      )}
      <BriefingText
        view={view}
        since={`${formatDate(view.effectiveFrom, zone)}, ${formatTime(view.effectiveFrom, zone)}`}
      />
      {open && current?.passedAt == null && (
        <QuestionSheet
          key={view.version}
          installationId={installationId}
          view={view}
          talkNeeded={validity === 'TALK_NEEDED'}
          leads={leads}
        />
      )}
      {open && current?.passedAt != null && current.signedAt === null && (
        <SignForm installationId={installationId} view={view} name={me} leads={leads} />
      )}
      <p className="text-pencil">{words.local}</p>
      <span className="sr-only" role="status">
        {validity === 'valid'
          ? words.done(
              record.hazards.map((hazard) => common.hazards[hazard]),
              '',
            )
          : listed(leads)}
      </span>
    </div>
  );
}

/** How far the sign-off is: read, answer, sign, countersigned along one stick as wide as the page. */
function Progress({ code, steps }: { code: string; steps: SignOffProgress['steps'] }) {
  const { briefing: words } = useMessages();
  const [ref, width] = useWidth<HTMLDivElement>(350);
  const pitch = Math.min(160, Math.floor((width - 16) / steps.length));
  return (
    <div ref={ref} className="min-w-0" role="group" aria-label={words.title}>
      <MarkedStick
        code={code}
        pitch={pitch}
        steps={steps.map(({ step, state }) => ({ name: words.parts[step], state }))}
      />
      <div className="flex flex-wrap justify-between gap-x-3" aria-hidden="true">
        {steps.map(({ step, state }) => (
          <span key={step} className={state === 'in hand' ? 'font-semibold' : 'text-pencil'}>
            {words.parts[step]}
          </span>
        ))}
      </div>
    </div>
  );
}
