/** Says what was posted, with its number, and offers to open it. Never the only place of a message, never for faults. */
import type { ReactNode } from 'react';
import { createContext, useCallback, useContext, useEffect, useState } from 'react';
import { Link } from 'react-router-dom';
import { Icon } from './icon.tsx';

interface Toast {
  readonly words: string;
  readonly to: string | null;
}

const ToastContext = createContext<(toast: Toast) => void>(() => undefined);

/** Shows a toast: `show({words: 'Voucher 4 813 posted.', to: '/…'})`. */
export const useToast = () => useContext(ToastContext);

const STAYS_MS = 8_000;

export function ToastProvider({ children }: { readonly children: ReactNode }) {
  const [toast, setToast] = useState<Toast | null>(null);
  const [held, setHeld] = useState(false);
  const show = useCallback((next: Toast) => setToast(next), []);
  useEffect(() => {
    if (toast === null || held) return undefined;
    const timer = setTimeout(() => setToast(null), STAYS_MS);
    return () => clearTimeout(timer);
  }, [toast, held]);
  return (
    <ToastContext value={show}>
      {children}
      <div role="status" aria-live="polite">
        {toast === null ? null : (
          <div
            className="toast on-dark"
            onMouseEnter={() => setHeld(true)}
            onMouseLeave={() => setHeld(false)}
            onFocus={() => setHeld(true)}
            onBlur={() => setHeld(false)}
          >
            <Icon name="ok" size={20} />
            {toast.words}
            {toast.to === null ? null : <Link to={toast.to}>Open</Link>}
          </div>
        )}
      </div>
    </ToastContext>
  );
}
