import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { displayTokenSchema, type DisplayTokenView } from '../../../shared/contracts/installations';
import type { InstallationRecord } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { Field } from '../../components/ui/field';
import { DimensionHead } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { Sheet } from '../../components/ui/sheet';
import { get } from '../../lib/api';
import { checkInput } from '../../lib/check-input';
import { formatDay, formatTime } from '../../lib/formats';
import { useForm } from '../../lib/use-form';
import { CopyLine } from './copy-line';

/** Addresses for projectors: each is shown once, and can be closed. */
export function DisplaysSection({ installation }: { installation: InstallationRecord }) {
  const { id, timeZone, status } = installation;
  const client = useQueryClient();
  const [label, setLabel] = useState('');
  const [made, setMade] = useState<DisplayTokenView | null>(null);
  const path = `/installations/${id}/displays`;
  const key = ['displays', id];
  const displays = useQuery({ queryKey: key, queryFn: () => get<DisplayTokenView[]>(path) });
  const reload = () => client.invalidateQueries({ queryKey: key });
  const form = useForm<DisplayTokenView>({
    request: () => {
      const checked = checkInput(displayTokenSchema, { label });
      return 'problems' in checked ? checked : { method: 'POST', path, body: checked.body };
    },
    onDone: (view) => {
      setMade(view);
      setLabel('');
      return reload();
    },
  });
  return (
    <section className="grid gap-4" aria-labelledby="displays">
      <DimensionHead id="displays">Projectors</DimensionHead>
      <p className="max-w-words">
        A projector signs in with an address of its own. It shows the installation and can change nothing.
      </p>
      {made?.url && (
        <Note
          kind="done"
          title={`The address for ${made.label}. It is shown only now.`}
          actions={
            <Action look="words" onClick={() => setMade(null)}>
              I have it
            </Action>
          }
        >
          <div className="grid gap-3">
            <p>Open it on the machine at the projector. Whoever has it sees what the hall sees.</p>
            <CopyLine label="address" text={made.url} />
          </div>
        </Note>
      )}
      <Refusal error={displays.error} />
      {(displays.data?.length ?? 0) > 0 && (
        <Sheet caption="Projectors">
          <thead>
            <tr>
              <th scope="col">projector</th>
              <th scope="col">made</th>
              <th scope="col">state</th>
              <th scope="col">
                <span className="sr-only">what you can do</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {displays.data?.map((display) => (
              <tr key={display.id}>
                <th scope="row">{display.label}</th>
                <td data-label="made">
                  {formatDay(display.createdAt, timeZone)}, {formatTime(display.createdAt, timeZone)}
                </td>
                <td data-label="state">{display.closed ? 'closed' : 'open'}</td>
                <td>
                  {!display.closed && (
                    <span className="flex desk:justify-end">
                      <ConfirmAction
                        words="Close"
                        look="words"
                        label={`Close ${display.label}`}
                        title={`Close the address of ${display.label}?`}
                        confirm="Close it"
                        wish={{ method: 'DELETE', path: `${path}/${display.id}` }}
                        onDone={() => {
                          if (made?.id === display.id) setMade(null);
                          return reload();
                        }}
                      >
                        <p>
                          The projector that uses it goes dark at once. Make a new address to show it again.
                        </p>
                      </ConfirmAction>
                    </span>
                  )}
                </td>
              </tr>
            ))}
          </tbody>
        </Sheet>
      )}
      {status !== 'closed' && (
        <form className="grid gap-3" noValidate onSubmit={form.onSubmit}>
          <Refusal error={form.error} unplaced={form.unplaced} />
          <div className="flex flex-wrap items-start gap-x-6 gap-y-3">
            <Field
              className="w-64 max-w-full"
              label="which projector"
              value={label}
              placeholder="north wall"
              onChange={(event) => setLabel(event.target.value)}
              error={form.problem('label')}
            />
            <span className="pt-4">
              <Action type="submit" busy={form.busy}>
                Make an address
              </Action>
            </span>
          </div>
        </form>
      )}
    </section>
  );
}
