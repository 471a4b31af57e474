import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { SITE_ROLES, type SiteRole } from '../../../shared/accounts';
import { inviteSchema, type AccountView } from '../../../shared/contracts/accounts';
import { Action } from '../../components/ui/action';
import { OptionStruts } from '../../components/ui/choices';
import { Field } from '../../components/ui/field';
import { Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { checkInput } from '../../lib/check-input';
import { useForm } from '../../lib/use-form';
import { ACCOUNTS_KEY } from './accounts-list';

const ROLES: Record<SiteRole, string> = {
  admin: 'everything on this site, accounts too',
  organiser: 'may start installations',
  member: 'takes part in installations that an organiser adds them to',
};

/** Sends a letter with a link; the person chooses the password. */
export function InviteForm({ roles }: { roles: readonly SiteRole[] }) {
  const client = useQueryClient();
  const [email, setEmail] = useState('');
  const [name, setName] = useState('');
  const [siteRole, setSiteRole] = useState<SiteRole>('member');
  const [invited, setInvited] = useState<AccountView | null>(null);
  const form = useForm<AccountView>({
    request: () => {
      const checked = checkInput(inviteSchema, { email, name, siteRole });
      return 'problems' in checked ? checked : { method: 'POST', path: '/accounts', body: checked.body };
    },
    onDone: async (account) => {
      setInvited(account);
      setEmail('');
      setName('');
      setSiteRole('member');
      await client.invalidateQueries({ queryKey: ACCOUNTS_KEY });
    },
  });
  return (
    <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
      {invited && (
        <Note kind="done" title={`${invited.name} is invited.`}>
          The letter to {invited.email} carries a link that works once, for 3 days. Invite again to send a new
          one.
        </Note>
      )}
      <Refusal error={form.error} unplaced={form.unplaced} />
      <Field
        label="name"
        autoComplete="off"
        value={name}
        onChange={(event) => setName(event.target.value)}
        error={form.problem('name')}
      />
      <Field
        label="e-mail"
        type="email"
        inputMode="email"
        autoComplete="off"
        autoCapitalize="none"
        value={email}
        onChange={(event) => setEmail(event.target.value)}
        error={form.problem('email')}
      />
      <OptionStruts<SiteRole>
        legend="role on the site"
        value={siteRole}
        onChange={setSiteRole}
        error={form.problem('siteRole')}
        options={SITE_ROLES.filter((role) => roles.includes(role)).map((role) => ({
          value: role,
          label: role,
          detail: ROLES[role],
        }))}
      />
      <div>
        <Action type="submit" look="main" busy={form.busy}>
          Send the invitation
        </Action>
      </div>
    </form>
  );
}
