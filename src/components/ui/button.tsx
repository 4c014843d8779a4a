/** Buttons: verb and object. One primary per screen; one that is not possible yet can be focused and says why. */
import type { ReactNode } from 'react';
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
  /** Why it is not possible yet. */
  readonly notYet?: string | null;
  readonly pressed?: boolean;
}

const look = ({ kind = 'plain', counter = false }: Look) => `btn ${kind} ${counter ? 'counter' : ''}`;

export function Button(props: ButtonProps) {
  const { children, icon, onPress, submit = false, busy = false, notYet = null } = props;
  const still = busy !== false || notYet !== null;
  return (
    <button
      type={submit ? 'submit' : 'button'}
      className={look(props)}
      aria-disabled={still || undefined}
      title={notYet ?? undefined}
      onClick={(event) => {
        if (still) event.preventDefault();
        else onPress?.();
      }}
    >
      {icon === undefined ? null : <Icon name={icon} size={20} />}
      {busy === false ? children : busy}
    </button>
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
