import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { LinkView } from '../../../shared/contracts/accounts';
import type { SessionView } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { Field } from '../../components/ui/field';
import { Note } from '../../components/ui/note';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { ApiError, send } from '../../lib/api';
import { useChangeSession } from '../../lib/session';
import { useForm } from '../../lib/use-form';
import { PasswordField } from './password-field';

const LEAST = 15;

const WORDS: Record<LinkView['kind'], { lead: (email: string) => string; action: string }> = {
  'first-admin': {
    lead: () => 'You are the first one here. This makes you the administrator of this Strutbee.',
    action: 'Make my account',
  },
  invite: { lead: (email) => `You are invited. You will sign in as ${email}.`, action: 'Come in' },
  reset: { lead: (email) => `A new password for ${email}.`, action: 'Keep this password' },
};

/** What a one-time link is good for, and the way to use it. */
export function UseLink({ secret, onSignedIn }: { secret: string; onSignedIn: () => void }) {
  const look = useQuery({
    queryKey: ['link', secret],
    queryFn: () => send<LinkView>('POST', '/links/look-up', { secret }),
    enabled: secret !== '',
    staleTime: Infinity,
    gcTime: 0,
  });
  if (secret === '')
    return (
      <Note kind="refused" title="This address is not whole." actions={<AskAgain />}>
        Open the link from your letter again, or copy it with everything after the sign #.
      </Note>
    );
  if (look.error) {
    const spent = look.error instanceof ApiError && look.error.code === 'LINK_SPENT';
    return <Refusal error={look.error} actions={spent ? <AskAgain /> : undefined} />;
  }
  if (!look.data) return <Pending />;
  return <LinkForm secret={secret} link={look.data} onSignedIn={onSignedIn} />;
}

const AskAgain = () => <Action to="/reset">Ask for a new link</Action>;

function LinkForm({ secret, link, onSignedIn }: { secret: string; link: LinkView; onSignedIn: () => void }) {
  const [name, setName] = useState(link.name ?? '');
  const [email, setEmail] = useState('');
  const [password, setPassword] = useState('');
  const changeSession = useChangeSession();
  const isFirst = link.kind === 'first-admin';
  const asksName = link.kind !== 'reset';
  const form = useForm<SessionView>({
    request: () => ({
      method: 'POST',
      path: '/links/accept',
      body: { secret, password, ...(asksName ? { name } : {}), ...(isFirst ? { email } : {}) },
    }),
    onDone: async (view) => {
      await changeSession(view);
      onSignedIn();
    },
  });
  const words = WORDS[link.kind];
  const spent = form.error instanceof ApiError && form.error.code === 'LINK_SPENT';
  return (
    <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
      <p>{words.lead(link.email ?? '')}</p>
      <Refusal error={form.error} unplaced={form.unplaced} actions={spent ? <AskAgain /> : undefined} />
      {asksName && (
        <Field
          label="your name"
          hint="First name first; the hall sees it with the initial of your last name."
          autoComplete="name"
          value={name}
          onChange={(event) => setName(event.target.value)}
          error={form.problem('name')}
        />
      )}
      {isFirst ? (
        <Field
          label="e-mail"
          type="email"
          inputMode="email"
          autoComplete="username"
          autoCapitalize="none"
          value={email}
          onChange={(event) => setEmail(event.target.value)}
          error={form.problem('email')}
        />
      ) : (
        // For the device's password store, which keeps the password under this name.
        <input type="hidden" autoComplete="username" value={link.email ?? ''} readOnly />
      )}
      <PasswordField
        label="new password"
        autoComplete="new-password"
        least={LEAST}
        value={password}
        onChange={setPassword}
        error={form.problem('password')}
      />
      <Action type="submit" look="main" size="phone" wide busy={form.busy}>
        {words.action}
      </Action>
    </form>
  );
}
