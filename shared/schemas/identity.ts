/** Sign-up, sign-in, invitations, resets and the session: one schema each for form and server. */
import { ROLES } from '../permissions.ts';
import { businessDate, id, shortText } from './primitives.ts';
import { z } from './zod.ts';

export const email = z
  .string('Enter an e-mail address.')
  .transform((text) => text.trim().toLowerCase())
  .pipe(z.email('That is not an e-mail address. Look at it again.').max(254));

/** Any characters; how long and how good is checked where it is set. */
const password = z
  .string('Enter a password.')
  .min(1, 'Enter a password.')
  .max(256, 'A password has at most 256 characters.');
const secret = z.string().min(20).max(100);

const timeZone = z
  .string()
  .refine(
    (zone) => Intl.supportedValuesOf('timeZone').includes(zone) || zone === 'UTC',
    'Choose a time zone from the list.',
  );

export const signUpBody = z.strictObject({
  workshop_name: shortText,
  time_zone: timeZone,
  currency: z.string().regex(/^[A-Z]{3}$/, 'A currency is three letters, such as EUR.'),
  name: shortText,
  email,
  password,
});
export type SignUpBody = z.output<typeof signUpBody>;

/** Six figures of the authenticator, or one of the recovery codes. */
const code = z.string('Enter the code.').trim().min(1, 'Enter the code.').max(40, 'That is no code.');

/** The code is asked for where the account has a second factor. */
export const signInBody = z.strictObject({ email, password, code: code.nullable().default(null) });

export const invitationBody = z.strictObject({
  email,
  name: shortText,
  role: z.enum(ROLES),
  /** Last day of the access; asked for auditors. */
  until: businessDate.nullable().default(null),
});
export type InvitationBody = z.output<typeof invitationBody>;

export const invitationTokenBody = z.strictObject({ token: secret });
export const invitationInfo = z.object({
  email: z.string(),
  name: z.string(),
  role: z.enum(ROLES),
  workshop_name: z.string(),
  /** Whether there is an account of that address: then its password is asked for, else a new one is set. */
  has_account: z.boolean(),
});
/** The code is asked for where the address has an account with a second factor. */
export const acceptInvitationBody = z.strictObject({
  token: secret,
  password,
  code: code.nullable().default(null),
});

export const resetBody = z.strictObject({ email });
export const completeResetBody = z.strictObject({ token: secret, password });
export const changePasswordBody = z.strictObject({ current: password, password });
export const setPinBody = z.strictObject({
  password,
  pin: z.string().regex(/^\d{4,8}$/, 'A PIN is four to eight figures.'),
});
export const beginSecondFactorBody = z.strictObject({ password });
/** What an authenticator is told: by the picture, or typed. `setup` goes back with the first code, within ten minutes. */
export const secondFactorSetup = z.object({ setup: z.string(), secret: z.string(), qr: z.string() });
export const turnOnSecondFactorBody = z.strictObject({ setup: z.string().min(20).max(1000), code });
export const provenByCodeBody = z.strictObject({ password, code });
/** Shown once; each signs in once in place of the authenticator. */
export const recoveryCodes = z.object({ recovery_codes: z.array(z.string()) });
export const secondFactorRolesBody = z.strictObject({ roles: z.array(z.enum(ROLES)).max(ROLES.length) });
export const enterWorkshopBody = z.strictObject({ workshop_id: id });
export const roleBody = z.strictObject({ role: z.enum(ROLES), until: businessDate.nullable().default(null) });

export const sessionJson = z.object({
  user: z.object({ id: z.string(), email: z.string(), name: z.string(), second_factor: z.boolean() }),
  person: z.object({ id: z.string(), name: z.string(), role: z.enum(ROLES), has_pin: z.boolean() }),
  workshop: z.object({
    id: z.string(),
    name: z.string(),
    currency: z.string(),
    time_zone: z.string(),
    mass_unit: z.string(),
    /** Roles that may do nothing here before they have a second factor. */
    second_factor_roles: z.array(z.enum(ROLES)),
  }),
  workshops: z.array(z.object({ id: z.string(), name: z.string(), role: z.enum(ROLES) })),
  may: z.array(z.string()),
  today: z.string(),
  book: z.object({ sequence: z.string(), balanced: z.boolean() }),
});
export type SessionJson = z.output<typeof sessionJson>;

export const memberJson = z.object({
  id: z.string(),
  name: z.string(),
  role: z.enum(ROLES),
  active: z.boolean(),
  until: z.string().nullable(),
  signs_in: z.boolean(),
});
export type MemberJson = z.output<typeof memberJson>;
