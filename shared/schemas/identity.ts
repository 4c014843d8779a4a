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

export const signInBody = z.strictObject({ email, password });

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
export const acceptInvitationBody = z.strictObject({ token: secret, password });

export const resetBody = z.strictObject({ email });
export const completeResetBody = z.strictObject({ token: secret, password });
export const changePasswordBody = z.strictObject({ current: password, password });
export const setPinBody = z.strictObject({
  password,
  pin: z.string().regex(/^\d{4,8}$/, 'A PIN is four to eight figures.'),
});
export const enterWorkshopBody = z.strictObject({ workshop_id: id });
export const roleBody = z.strictObject({ role: z.enum(ROLES), until: businessDate.nullable().default(null) });

export const sessionJson = z.object({
  user: z.object({ id: z.string(), email: z.string(), name: z.string() }),
  person: z.object({ id: z.string(), name: z.string(), role: z.enum(ROLES), has_pin: z.boolean() }),
  workshop: z.object({
    id: z.string(),
    name: z.string(),
    currency: z.string(),
    time_zone: z.string(),
    mass_unit: z.string(),
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
