import { useEffect, useId, useRef } from 'react';
import type { ReactNode } from 'react';

export type DialogProps = {
  open: boolean;
  /** The person wants it closed: Escape or the way back on an action. Set `open` to false here. */
  onClose: () => void;
  title: ReactNode;
  children: ReactNode;
  /** The ways on; the first one that can be used has the focus unless a field is above it. */
  actions?: ReactNode;
};

/** A question over the page. The rest waits meanwhile, and the focus goes back to where it came from. */
export function Dialog({ open, onClose, title, children, actions }: DialogProps) {
  const ref = useRef<HTMLDialogElement>(null);
  const titleId = useId();
  useEffect(() => {
    const dialog = ref.current;
    if (!open || !dialog) return;
    const before = document.activeElement;
    dialog.showModal();
    return () => {
      dialog.close();
      if (before instanceof HTMLElement && before.isConnected) before.focus();
    };
  }, [open]);
  if (!open) return null;
  return (
    <dialog
      ref={ref}
      className="dialog"
      aria-labelledby={titleId}
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
    >
      <div className="dialog-sheet">
        <h2 id={titleId} className="dialog-title">
          {title}
        </h2>
        {children}
        {actions !== undefined && <div className="dialog-actions">{actions}</div>}
      </div>
    </dialog>
  );
}
