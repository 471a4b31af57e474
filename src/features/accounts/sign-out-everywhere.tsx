import { useState } from 'react';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { Note } from '../../components/ui/note';

/** Ends every other session of one's account. */
export function SignOutEverywhere() {
  const [done, setDone] = useState(false);
  return (
    <div className="grid gap-3">
      <p className="max-w-words">
        For a phone or laptop you no longer have at hand. Here you stay signed in; to leave here too, sign out
        at the foot of the screens.
      </p>
      {done && <Note kind="done" title="You are signed out everywhere else." />}
      <div>
        <ConfirmAction
          words="Sign out everywhere else"
          look="crossed"
          title="Sign out everywhere else?"
          confirm="Sign out there"
          wish={{ method: 'POST', path: '/account/end-sessions', body: {} }}
          onDone={() => setDone(true)}
        >
          <p>Every other phone and computer asks for your password again. Work in hand stays yours.</p>
        </ConfirmAction>
      </div>
    </div>
  );
}
