/** Roles that may do nothing here before they have a second factor; the proprietor's own choice. */
import { ROLES } from '../../../shared/permissions.ts';
import type { Role } from '../../../shared/permissions.ts';
import { CheckBox } from '../../components/ui/choice.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { words } from '../../lib/formats.ts';
import { useSession } from '../../queries/session.ts';
import { useWrite } from '../../queries/writes.ts';

export function SecondFactorRoles() {
  const { workshop } = useSession();
  const { problem, write } = useWrite();
  const demanded = workshop.second_factor_roles;
  const set = (role: Role, on: boolean) => {
    const roles = ROLES.filter((one) => (one === role ? on : demanded.includes(one)));
    void write('PUT', '/workshop/second-factor-roles', { roles });
  };
  return (
    <>
      {problem === null ? null : <Notice severity="fault" what={problem} />}
      {ROLES.map((role) => (
        <CheckBox
          key={role}
          label={`Every ${words(role).toLowerCase()} needs a second factor`}
          checked={demanded.includes(role)}
          onChange={(on) => set(role, on)}
        />
      ))}
    </>
  );
}
