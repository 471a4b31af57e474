import { useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { PageHead } from '../../components/ui/heads';
import { NewInstallationForm } from '../../features/installations/new-installation-form';
import { SESSION_KEY } from '../../lib/session-key';
import { SiteFrame } from '../site-frame';

/** Start an installation. */
export function Component() {
  const navigate = useNavigate();
  const client = useQueryClient();
  const goOn = async (id: string) => {
    // The session lists what one takes part in, and the new place has to be there before its pages open.
    await client.refetchQueries({ queryKey: SESSION_KEY });
    await navigate(`/i/${id}/plan`);
  };
  return (
    <SiteFrame needs={['installation.create']}>
      <PageHead
        title="A new installation"
        summary="A draft: nobody sees it until you publish it. You are its organiser."
      />
      <NewInstallationForm onMade={goOn} />
    </SiteFrame>
  );
}
