import { useQuery, useQueryClient } from '@tanstack/react-query';
import { SITE_ROLES, type SiteRole } from '../../../shared/accounts';
import type { AccountView } from '../../../shared/contracts/accounts';
import { Action } from '../../components/ui/action';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { SelectField } from '../../components/ui/field';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { Sheet } from '../../components/ui/sheet';
import { get } from '../../lib/api';
import { useSend } from '../../lib/use-send';

export const ACCOUNTS_KEY = ['accounts'] as const;

const stateOf = ({ pending, disabled }: AccountView): string =>
  disabled ? 'disabled' : pending ? 'invited, not yet in' : 'can sign in';

/** Everybody with an account, for an administrator. */
export function AccountsList({ ownId }: { ownId: string }) {
  const client = useQueryClient();
  const accounts = useQuery({ queryKey: ACCOUNTS_KEY, queryFn: () => get<AccountView[]>('/accounts') });
  const reload = () => client.invalidateQueries({ queryKey: ACCOUNTS_KEY });
  const change = useSend(reload);
  if (accounts.error) return <Refusal error={accounts.error} />;
  if (!accounts.data) return <Pending />;
  return (
    <div className="grid gap-3">
      <Refusal error={change.error} />
      <Sheet caption="Accounts">
        <thead>
          <tr>
            <th scope="col">name</th>
            <th scope="col">e-mail</th>
            <th scope="col">role on the site</th>
            <th scope="col">state</th>
            <th scope="col">
              <span className="sr-only">what you can do</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {accounts.data.map((account) => (
            <tr key={account.id}>
              <th scope="row">
                {account.name}
                {account.id === ownId && <span className="font-normal text-pencil">, you</span>}
              </th>
              <td data-label="e-mail">{account.email}</td>
              <td>
                <SelectField
                  label={<span className="sr-only">role of {account.name}</span>}
                  value={account.siteRole}
                  disabled={change.isPending}
                  onChange={(event) =>
                    change.mutate({
                      method: 'PATCH',
                      path: `/accounts/${account.id}/role`,
                      body: { siteRole: event.target.value as SiteRole },
                    })
                  }
                >
                  {SITE_ROLES.map((role) => (
                    <option key={role}>{role}</option>
                  ))}
                </SelectField>
              </td>
              <td data-label="state">{stateOf(account)}</td>
              <td>
                <Access account={account} busy={change.isPending} onChange={change.mutate} onDone={reload} />
              </td>
            </tr>
          ))}
        </tbody>
      </Sheet>
    </div>
  );
}

function Access({
  account,
  busy,
  onChange,
  onDone,
}: {
  account: AccountView;
  busy: boolean;
  onChange: ReturnType<typeof useSend>['mutate'];
  onDone: () => unknown;
}) {
  const path = `/accounts/${account.id}/disabled`;
  if (account.disabled)
    return (
      <Action
        look="plain"
        busy={busy}
        label={`Let in again: ${account.name}`}
        onClick={() => onChange({ method: 'PATCH', path, body: { disabled: false } })}
      >
        Let in again
      </Action>
    );
  return (
    <ConfirmAction
      words="Disable"
      label={`Disable ${account.name}`}
      title={`Disable ${account.name}?`}
      confirm="Disable"
      wish={{ method: 'PATCH', path, body: { disabled: true } }}
      onDone={onDone}
    >
      <p>
        {account.name} is signed out everywhere at once and cannot sign in until you let them in again. Links
        in letters to {account.email} stop working. What they did stays in the day logs.
      </p>
    </ConfirmAction>
  );
}
