import { useState } from 'react';
import { Action } from '../../components/ui/action';
import { Field } from '../../components/ui/field';
import { Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { useForm } from '../../lib/use-form';

/** Asks for a letter with a link. The answer is the same whether there is such an account or not. */
export function AskResetForm() {
  const [email, setEmail] = useState('');
  const [asked, setAsked] = useState<string | null>(null);
  const form = useForm({
    request: () => ({ method: 'POST', path: '/reset', body: { email } }),
    onDone: () => setAsked(email.trim()),
  });
  if (asked !== null)
    return (
      <Note
        kind="done"
        title="Look into your mail."
        actions={
          <Action look="words" onClick={() => setAsked(null)}>
            Use another address
          </Action>
        }
      >
        If {asked} has an account here, a letter with a link is on its way. The link works once and for one
        hour. At most 3 letters go out in an hour.
      </Note>
    );
  return (
    <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
      <Refusal error={form.error} unplaced={form.unplaced} />
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
      <Action type="submit" look="main" size="phone" wide busy={form.busy}>
        Send me a link
      </Action>
    </form>
  );
}
