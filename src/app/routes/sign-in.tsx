import { Navigate, useLocation, useNavigate } from 'react-router-dom';
import { OpenFrame } from '../../components/layout/open-frame';
import { Action } from '../../components/ui/action';
import { DimensionHead } from '../../components/ui/heads';
import { CanopyDrawing } from '../../features/accounts/canopy-drawing';
import { SignInForm } from '../../features/accounts/sign-in-form';
import { useSession } from '../../lib/session';

/** Where somebody was on the way to, when that is a page of ours. */
function wayOn(state: unknown): string {
  const from = typeof state === 'object' && state !== null && 'from' in state ? state.from : null;
  return typeof from === 'string' && from.startsWith('/') && !from.startsWith('//') ? from : '/';
}

/** Sign in, or go on to the door. */
export function Component() {
  const session = useSession();
  const navigate = useNavigate();
  const location = useLocation();
  const to = wayOn(location.state);
  if (session.data?.principal) return <Navigate to={to} replace />;
  return (
    <OpenFrame
      title="Strutbee"
      lead="One large thing, made by many hands in a day."
      drawing={<CanopyDrawing />}
    >
      <SignInForm onSignedIn={() => void navigate(to, { replace: true })} />
      <p>
        <Action look="words" to="/reset">
          I forgot my password
        </Action>
      </p>
      <div className="grid gap-1 border-t border-rule pt-4">
        <p>Here to help today?</p>
        <p>
          <Action look="words" to="/join">
            Join with the code on the poster
          </Action>
        </p>
      </div>
      {session.data?.demo && (
        <section className="grid gap-2" aria-labelledby="demo">
          <DimensionHead id="demo">This is the demo</DimensionHead>
          <p>Its sign-ins stand on the console where it was started.</p>
        </section>
      )}
    </OpenFrame>
  );
}
