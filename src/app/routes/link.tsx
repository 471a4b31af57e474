import { useLocation, useNavigate } from 'react-router-dom';
import { OpenFrame } from '../../components/layout/open-frame';
import { Action } from '../../components/ui/action';
import { UseLink } from '../../features/accounts/link-form';

/** A one-time link: first administrator, invitation, new password. Its secret stands behind the #. */
export function Component() {
  const { hash } = useLocation();
  const navigate = useNavigate();
  const secret = hash.replace(/^#/, '');
  return (
    <OpenFrame title="Choose your password">
      <UseLink key={secret} secret={secret} onSignedIn={() => void navigate('/', { replace: true })} />
      <p>
        <Action look="words" to="/sign-in">
          Sign in with a password you have
        </Action>
      </p>
    </OpenFrame>
  );
}
