import { useId, useState, type ReactNode } from 'react';
import { revokeSchema } from '../../../shared/contracts/safety';
import { Action } from '../../components/ui/action';
import { Dialog } from '../../components/ui/dialog';
import { TextArea } from '../../components/ui/field';
import { Refusal } from '../../components/ui/refusal';
import { checkInput } from '../../lib/check-input';
import { useForm } from '../../lib/use-form';

export interface ReasonActionProps<R> {
  /** On the action that asks, and for those who do not see its row. */
  words: string;
  label: string;
  title: string;
  /** What happens then. */
  children: ReactNode;
  /** Above the field. */
  ask: string;
  confirm: string;
  /** Where the reason is posted. */
  path: string;
  onDone?: (reply: R) => unknown;
}

/** Something that needs a reason with it. */
export function ReasonAction<R = unknown>(props: ReasonActionProps<R>) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Action look="words" label={props.label} onClick={() => setOpen(true)}>
        {props.words}
      </Action>
      {open && <ReasonDialog {...props} onClose={() => setOpen(false)} />}
    </>
  );
}

function ReasonDialog<R>(props: ReasonActionProps<R> & { onClose: () => void }) {
  const { title, children, ask, confirm, path, onDone, onClose } = props;
  const [reason, setReason] = useState('');
  const formId = useId();
  const form = useForm<R>({
    request: () => {
      const checked = checkInput(revokeSchema, { reason });
      return 'problems' in checked ? checked : { method: 'POST', path, body: checked.body };
    },
    onDone: async (reply) => {
      await onDone?.(reply);
      onClose();
    },
  });
  return (
    <Dialog
      open
      onClose={onClose}
      title={title}
      actions={
        <>
          <Action type="submit" form={formId} look="main" busy={form.busy}>
            {confirm}
          </Action>
          <Action look="words" onClick={onClose}>
            Leave it
          </Action>
        </>
      }
    >
      <form id={formId} className="grid gap-3" noValidate onSubmit={form.onSubmit}>
        {children}
        <TextArea
          label={ask}
          rows={2}
          autoFocus
          value={reason}
          onChange={(event) => setReason(event.target.value)}
          error={form.problem('reason')}
        />
        <Refusal error={form.error} unplaced={form.unplaced} />
      </form>
    </Dialog>
  );
}
