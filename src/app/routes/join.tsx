import { useNavigate, useParams } from 'react-router-dom';
import { PhoneFrame } from '../../components/layout/phone-frame';
import { Action } from '../../components/ui/action';
import { JoinForm } from '../../features/door/join-form';
import { useMessages } from '../../lib/messages';

/** The door: join by the poster's code. */
export function Component() {
  const { door, common } = useMessages();
  const { code = '' } = useParams();
  const navigate = useNavigate();
  return (
    <PhoneFrame
      title={door.title}
      aside={<span className="text-pencil">{door.quick}</span>}
      skipWords={common.skip}
    >
      <JoinForm initialCode={code} onJoined={(place) => void navigate(`/i/${place.installationId}/bench`)} />
      <p className="mt-6">
        <Action look="words" to="/sign-in">
          {door.signIn}
        </Action>
      </p>
    </PhoneFrame>
  );
}
