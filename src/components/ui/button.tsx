/** Buttons: verb and object. One primary per screen; one that is not possible yet can be focused and says why. */
import type { ReactNode } from 'react';
import { useId, useState } from 'react';
import { Link } from 'react-router-dom';
import type { IconName } from './icon.tsx';
import { Icon } from './icon.tsx';

interface Look {
  readonly children: ReactNode;
  readonly icon?: IconName;
  readonly kind?: 'primary' | 'plain' | 'danger' | 'quiet';
  readonly counter?: boolean;
}

export interface ButtonProps extends Look {
  readonly onPress?: () => void;
  readonly submit?: boolean;
  /** Words while sending: a second press does nothing. */
  readonly busy?: string | false;
  /** Why it is not possible yet: read out with the button, and shown where it is pressed or focused. */
  readonly notYet?: string | null;
  readonly pressed?: boolean;
}

const look = ({ kind = 'plain', counter = false }: Look) => `btn ${kind} ${counter ? 'counter' : ''}`;

export function Button(props: ButtonProps) {
  const { children, icon, onPress, submit = false, busy = false, notYet = null, pressed } = props;
  const [asked, setAsked] = useState(false);
  const why = useId();
  const still = busy !== false || notYet !== null;
  const button = (
    <button
      type={submit ? 'submit' : 'button'}
      className={look(props)}
      aria-disabled={still || undefined}
      aria-pressed={pressed}
      aria-describedby={notYet === null ? undefined : why}
      onFocus={() => setAsked(true)}
      onBlur={() => setAsked(false)}
      onClick={(event) => {
        if (!still) onPress?.();
        else event.preventDefault();
        setAsked(true);
      }}
    >
      {icon === undefined ? null : <Icon name={icon} size={20} />}
      {busy === false ? children : busy}
    </button>
  );
  if (notYet === null) return button;
  return (
    <span className="not-yet">
      {button}
      <span id={why} className={asked ? 'why' : 'sr-only'}>
        {notYet}
      </span>
    </span>
  );
}

export function LinkButton(props: Look & { readonly to: string }) {
  return (
    <Link to={props.to} className={look(props)}>
      {props.icon === undefined ? null : <Icon name={props.icon} size={20} />}
      {props.children}
    </Link>
  );
}
