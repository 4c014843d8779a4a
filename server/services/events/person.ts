/** Somebody signed in, as the services know them. */
import type { Role } from '../../../shared/permissions.ts';

export interface PersonInWorkshop {
  readonly workshop_id: string;
  readonly person_id: string;
  readonly role: Role;
}
