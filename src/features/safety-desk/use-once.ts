import { useRef } from 'react';
import { useSend, type Wish } from '../../lib/use-send';

/** A change by one press: a second press before the answer, or after it was accepted, sends nothing. */
export function useOnce<R = unknown>(onDone?: (reply: R) => unknown) {
  const sent = useRef(false);
  const change = useSend<R>(onDone);
  const press = (wish: Wish) => {
    if (sent.current) return;
    sent.current = true;
    change.mutate(wish, {
      onError: () => {
        sent.current = false;
      },
    });
  };
  return { press, busy: change.isPending || change.isSuccess, error: change.error };
}
