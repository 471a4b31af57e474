import { useState } from 'react';
import type { SessionView } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { Field } from '../../components/ui/field';
import { Refusal } from '../../components/ui/refusal';
import { useChangeSession } from '../../lib/session';
import { useForm } from '../../lib/use-form';
import { PasswordField } from './password-field';

/** E-mail and password. */
export function SignInForm({ onSignedIn }: { onSignedIn: () => void }) {
  const [email, setEmail] = useState('');
  const [password, setPassword] = useState('');
  const changeSession = useChangeSession();
  const form = useForm<SessionView>({
    request: () => ({ method: 'POST', path: '/session', body: { email, password } }),
    onDone: async (view) => {
      await changeSession(view);
      onSignedIn();
    },
  });
  return (
    <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
      <Refusal error={form.error} unplaced={form.unplaced} />
      <Field
        label="e-mail"
        name="email"
        type="email"
        inputMode="email"
        autoComplete="username"
        autoCapitalize="none"
        value={email}
        onChange={(event) => setEmail(event.target.value)}
        error={form.problem('email')}
      />
      <PasswordField
        label="password"
        name="password"
        autoComplete="current-password"
        value={password}
        onChange={setPassword}
        error={form.problem('password')}
      />
      <Action type="submit" look="main" size="phone" wide busy={form.busy}>
        Sign in
      </Action>
    </form>
  );
}
