import { OpenFrame } from '../../components/layout/open-frame';
import { Action } from '../../components/ui/action';
import { AskResetForm } from '../../features/accounts/ask-reset-form';

/** Ask for a new password. */
export function Component() {
  return (
    <OpenFrame title="A new password" lead="We send you a link. With it you choose a new password.">
      <AskResetForm />
      <p>
        <Action look="words" to="/sign-in">
          Back to signing in
        </Action>
      </p>
    </OpenFrame>
  );
}
