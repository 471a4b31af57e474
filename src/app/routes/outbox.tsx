import { PageHead } from '../../components/ui/heads';
import { OutboxList } from '../../features/accounts/outbox-list';
import { SiteFrame } from '../site-frame';

/** Letters that were written and not sent on, in the demo. */
export function Component() {
  return (
    <SiteFrame needs={['outbox.read']}>
      <PageHead title="Outbox" summary="Letters written here; none of them leaves this machine" />
      <OutboxList />
    </SiteFrame>
  );
}
