import { useState } from 'react';
import { Action } from '../../components/ui/action';
import { Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { useForm } from '../../lib/use-form';
import { PasswordField } from './password-field';

/** A new password in place of the one somebody has. */
export function ChangePasswordForm({ email }: { email: string }) {
  const [current, setCurrent] = useState('');
  const [next, setNext] = useState('');
  const [done, setDone] = useState(false);
  const form = useForm({
    request: () => ({ method: 'POST', path: '/account/password', body: { current, next } }),
    onDone: () => {
      setCurrent('');
      setNext('');
      setDone(true);
    },
  });
  return (
    <form className="grid max-w-[26rem] gap-5" noValidate onSubmit={form.onSubmit}>
      {done && (
        <Note kind="done" title="Your password is changed.">
          Everywhere else you were signed out; here you stay in.
        </Note>
      )}
      <Refusal error={form.error} unplaced={form.unplaced} />
      <input type="hidden" autoComplete="username" value={email} readOnly />
      <PasswordField
        label="password you have now"
        autoComplete="current-password"
        value={current}
        onChange={setCurrent}
        error={form.problem('current')}
      />
      <PasswordField
        label="new password"
        autoComplete="new-password"
        least={15}
        value={next}
        onChange={setNext}
        error={form.problem('next')}
      />
      <div>
        <Action type="submit" look="main" busy={form.busy}>
          Change it
        </Action>
      </div>
    </form>
  );
}
