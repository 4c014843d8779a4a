/** A dialog: a question that names the thing, what will be in the book afterwards, a quiet way back. */
import type { ReactNode } from 'react';
import { useEffect, useId, useRef } from 'react';
import { Button } from './button.tsx';

interface DialogProps {
  readonly title: string;
  readonly open: boolean;
  /** The quiet button's words: "Keep it". */
  readonly keep: string;
  readonly onClose: () => void;
  readonly children: ReactNode;
  readonly action: ReactNode;
}

export function Dialog({ title, open, keep, onClose, children, action }: DialogProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const heading = useId();
  useEffect(() => {
    const element = dialog.current;
    if (element === null) return;
    if (open && !element.open) {
      element.showModal();
      element.querySelector<HTMLElement>('input, select, textarea')?.focus();
    }
    if (!open && element.open) element.close();
  }, [open]);
  return (
    <dialog ref={dialog} className="sheet-dialog" aria-labelledby={heading} onClose={onClose}>
      <div className="sheet-dialog-paper">
        <h2 id={heading}>{title}</h2>
        {children}
        <div className="dialog-actions">
          <Button onPress={onClose}>{keep}</Button>
          {action}
        </div>
      </div>
    </dialog>
  );
}
