import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import { Action } from '../../components/ui/action';
import { OptionStruts } from '../../components/ui/choices';
import { Dialog } from '../../components/ui/dialog';
import { Field, SelectField } from '../../components/ui/field';
import { Note } from '../../components/ui/note';
import { ApiError, NetworkError, send } from '../../lib/api';
import { useLiveMap } from '../../lib/live';
import { useMessages } from '../../lib/messages';
import { useMay } from '../../lib/session';

type Scope = 'hot-tools' | 'area' | 'everything';

/** The way to stop hot tools, an area or everything, for anyone confirmed on site. */
export function RaiseStop({ installationId, size }: { installationId: string; size?: 'desk' | 'phone' }) {
  const { stop: words } = useMessages();
  const may = useMay(installationId);
  const [open, setOpen] = useState(false);
  if (!may('stop.raise')) return null;
  return (
    <>
      <Action className="action-stop" size={size} onClick={() => setOpen(true)}>
        {words.raise.action}
      </Action>
      {open && <StopDialog installationId={installationId} onClose={() => setOpen(false)} />}
    </>
  );
}

function StopDialog({ installationId, onClose }: { installationId: string; onClose: () => void }) {
  const { stop: words, common } = useMessages();
  const [scope, setScope] = useState<Scope | null>(null);
  const [stationId, setStationId] = useState('');
  const [reason, setReason] = useState('');
  const stations = [...useLiveMap(installationId, 'stations').values()]
    .filter((station) => !station.removed)
    .sort((a, b) => a.position - b.position);
  const raise = useMutation({
    mutationFn: () =>
      send('POST', `/installations/${installationId}/stops`, {
        scope,
        reason,
        ...(scope === 'area' ? { stationId } : {}),
      }),
    onSuccess: onClose,
  });
  const { error } = raise;
  const fields = error instanceof ApiError ? error.fields : [];
  const problem = (path: string) => fields.find((field) => field.path === path)?.message;
  return (
    <Dialog open title={words.raise.title} onClose={onClose}>
      <form
        className="grid gap-5"
        onSubmit={(event) => {
          event.preventDefault();
          raise.mutate();
        }}
      >
        {error && fields.length === 0 && (
          <Note
            kind="refused"
            title={error instanceof NetworkError ? words.raise.failedOffline : error.message}
          />
        )}
        <OptionStruts<Scope>
          legend={words.raise.title}
          value={scope}
          onChange={setScope}
          error={problem('scope')}
          options={[
            { value: 'hot-tools', label: words.scopes['hot-tools'] },
            { value: 'area', label: words.raise.area },
            { value: 'everything', label: words.scopes.everything },
          ]}
        />
        {scope === 'area' && (
          <SelectField
            label={words.raise.whichArea}
            size="phone"
            value={stationId}
            onChange={(event) => setStationId(event.target.value)}
            error={problem('stationId')}
          >
            <option value="">{words.raise.choose}</option>
            {stations.map((station) => (
              <option key={station.id} value={station.id}>
                {station.name}
              </option>
            ))}
          </SelectField>
        )}
        <Field
          label={words.raise.reason}
          hint={words.raise.reasonHint}
          size="phone"
          value={reason}
          onChange={(event) => setReason(event.target.value)}
          error={problem('reason')}
        />
        <div className="flex flex-wrap items-center gap-5">
          <Action type="submit" size="phone" look="main" busy={raise.isPending} className="action-stop">
            {words.raise.now}
          </Action>
          <Action look="words" onClick={onClose}>
            {common.cancel}
          </Action>
        </div>
      </form>
    </Dialog>
  );
}
