import { useState, type ReactNode } from 'react';
import { useSend, type Wish } from '../../lib/use-send';
import { Action, type ActionProps } from './action';
import { Dialog } from './dialog';
import { Refusal } from './refusal';

export type ConfirmActionProps<R> = Pick<ActionProps, 'look' | 'size' | 'reason' | 'label' | 'disabled'> & {
  /** On the action that asks. */
  words: ReactNode;
  /** The question. */
  title: ReactNode;
  /** What happens then, with the numbers. */
  children: ReactNode;
  /** On the action that does it. */
  confirm: ReactNode;
  wish: Wish;
  onDone?: (reply: R) => unknown;
};

/** Something that cannot simply be undone: asked once more, with what it does. */
export function ConfirmAction<R = unknown>(props: ConfirmActionProps<R>) {
  const { words, title, children, confirm, wish, onDone, look = 'plain', ...action } = props;
  const [open, setOpen] = useState(false);
  const change = useSend<R>(async (reply) => {
    await onDone?.(reply);
    setOpen(false);
  });
  const shut = () => {
    setOpen(false);
    change.reset();
  };
  return (
    <>
      <Action {...action} look={look} onClick={() => setOpen(true)}>
        {words}
      </Action>
      <Dialog
        open={open}
        onClose={shut}
        title={title}
        actions={
          <>
            <Action onClick={shut} look="plain">
              Leave it
            </Action>
            <Action look="main" busy={change.isPending} onClick={() => change.mutate(wish)}>
              {confirm}
            </Action>
          </>
        }
      >
        <div className="grid gap-2">{children}</div>
        <Refusal error={change.error} />
      </Dialog>
    </>
  );
}
