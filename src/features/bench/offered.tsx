import { useMutation } from '@tanstack/react-query';
import type { Step } from '../../../shared/travellers/step';
import { Action } from '../../components/ui/action';
import { Note } from '../../components/ui/note';
import { ApiError, send } from '../../lib/api';
import { useMessages } from '../../lib/messages';
import type { BenchNames } from './names';

/** A step somebody wants to hand to me. */
export function Offered({
  step,
  installationId,
  names,
}: {
  step: Step;
  installationId: string;
  names: BenchNames;
}) {
  const { bench: words, common } = useMessages();
  const path = `/installations/${installationId}/steps/${step.id}`;
  const accept = useMutation({ mutationFn: () => send('POST', `${path}/accept`) });
  const decline = useMutation({ mutationFn: () => send('POST', `${path}/withdraw`) });
  const from = names.personName(step.handOver?.from ?? '');
  const error = accept.error ?? decline.error;
  return (
    <Note
      kind="ask"
      title={`${names.whatOf(step)}. ${words.handOver.from(from)}`}
      actions={
        <>
          <Action size="phone" look="main" busy={accept.isPending} onClick={() => accept.mutate()}>
            {words.handOver.accept}
          </Action>
          <Action size="phone" look="plain" busy={decline.isPending} onClick={() => decline.mutate()}>
            {words.handOver.decline}
          </Action>
        </>
      }
    >
      <p>{names.stationOf(step)}</p>
      {error && <p role="alert">{error instanceof ApiError ? names.refusal(error, step) : common.failed}</p>}
    </Note>
  );
}
