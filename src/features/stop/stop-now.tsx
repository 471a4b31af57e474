import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import type { StopRecord } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { TextArea } from '../../components/ui/field';
import { StopBanner } from '../../components/ui/stop-banner';
import { ApiError, send } from '../../lib/api';
import { formatTime } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import { useMessages } from '../../lib/messages';
import { membershipIn, useMay, useSession } from '../../lib/session';

/** Every stop that is raised, over everything else, with what to do. */
export function StopNow({ installationId }: { installationId: string }) {
  const stops = useLiveMap(installationId, 'stops');
  const raised = [...stops.values()]
    .filter((stop) => stop.liftedAt === null)
    .sort((a, b) => a.raisedAt - b.raisedAt);
  return (
    <>
      {raised.map((stop) => (
        <OneStop key={stop.id} installationId={installationId} stop={stop} />
      ))}
    </>
  );
}

function OneStop({ installationId, stop }: { installationId: string; stop: StopRecord }) {
  const { stop: words, common } = useMessages();
  const { data: session } = useSession();
  const people = useLiveMap(installationId, 'people');
  const stations = useLiveMap(installationId, 'stations');
  const zone = useLiveMap(installationId, 'installation').get(installationId)?.timeZone ?? 'UTC';
  const may = useMay(installationId);
  const [lifting, setLifting] = useState(false);
  const personId = membershipIn(session, installationId)?.personId ?? null;
  const seen = useMutation({
    mutationFn: () => send('POST', `/installations/${installationId}/stops/${stop.id}/seen`),
  });
  const station = stations.get(stop.stationId ?? '')?.name ?? '';
  const scope = stop.scope === 'area' ? words.scopes.area(station) : words.scopes[stop.scope];
  const name = people.get(stop.raisedBy)?.name ?? common.someone;
  const onSite = [...people.values()].filter((person) => person.onSite && !person.removed);
  const seenOnSite = onSite.filter((person) => stop.seenBy.includes(person.id)).length;
  const iSaw = personId !== null && (stop.seenBy.includes(personId) || seen.isSuccess);
  return (
    <StopBanner
      word={words.word}
      scope={scope}
      since={words.since(formatTime(stop.raisedAt, zone))}
      what={words.what(stop.reason, name, scope)}
      steps={words.makeSafe[stop.scope]}
      foot={
        <>
          <p>{stop.scope === 'everything' ? words.allWork : words.otherWork}</p>
          {onSite.length > 0 && <p>{words.seen(seenOnSite, onSite.length)}</p>}
          {may('step.hold') && <p>{words.shout}</p>}
        </>
      }
      actions={
        <>
          {personId !== null && !iSaw && (
            <Action size="phone" look="plain" busy={seen.isPending} onClick={() => seen.mutate()}>
              {words.iSaw}
            </Action>
          )}
          {may('stop.lift') && !lifting && (
            <Action size="phone" look="plain" onClick={() => setLifting(true)}>
              {words.lift.action}
            </Action>
          )}
          {lifting && (
            <LiftForm installationId={installationId} stopId={stop.id} onClose={() => setLifting(false)} />
          )}
        </>
      }
    />
  );
}

function LiftForm({
  installationId,
  stopId,
  onClose,
}: {
  installationId: string;
  stopId: string;
  onClose: () => void;
}) {
  const { stop: words, common } = useMessages();
  const [note, setNote] = useState('');
  const lift = useMutation({
    mutationFn: () => send('POST', `/installations/${installationId}/stops/${stopId}/lift`, { note }),
    onSuccess: onClose,
  });
  const { error } = lift;
  const field =
    error instanceof ApiError ? error.fields.find(({ path }) => path === 'note')?.message : undefined;
  return (
    <form
      className="stop-form"
      onSubmit={(event) => {
        event.preventDefault();
        lift.mutate();
      }}
    >
      <TextArea
        label={words.lift.note}
        value={note}
        onChange={(event) => setNote(event.target.value)}
        error={field ?? (error ? error.message : undefined)}
        autoFocus
      />
      <Action type="submit" size="phone" look="main" busy={lift.isPending}>
        {words.lift.action}
      </Action>
      <Action look="words" onClick={onClose}>
        {common.cancel}
      </Action>
    </form>
  );
}
