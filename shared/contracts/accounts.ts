import { z } from 'zod';
import { SITE_ROLES } from '../accounts';

/** ASVS 5.0 6.2.1 and NIST SP 800-63B-4: 15 characters where the password is the only factor; any characters; no make-up rules. */
export const PASSWORD_MIN = 15;
export const PASSWORD_MAX = 256;

/** Characters as people count them: Unicode code points, each one character (NIST SP 800-63B-4, 3.1.1.2). */
const characters = (text: string) => Array.from(text).length;
/** A code point takes up to two units of a string's length. */
const TYPED_MAX = PASSWORD_MAX * 2;

const email = z.preprocess(
  (value) => (typeof value === 'string' ? value.trim().toLowerCase() : value),
  z.email('This is no e-mail address. It looks like name@place.example.').max(254),
);
export const nameSchema = z.string().trim().min(1, 'Please fill this in.').max(80);

/** Sign in; wrong e-mail and wrong password get the same answer. */
export const signInSchema = z.strictObject({
  email,
  password: z.string().min(1, 'Please fill this in.').max(TYPED_MAX),
});
/** A new password; whether it is a common one is checked on the server. */
export const newPasswordSchema = z
  .string()
  .refine(
    (password) => characters(password) >= PASSWORD_MIN,
    `At least ${PASSWORD_MIN} characters. A short sentence is easy to remember.`,
  )
  .refine((password) => characters(password) <= PASSWORD_MAX, `At most ${PASSWORD_MAX} characters.`);
/** Use a one-time link: first administrator (with e-mail and name), invitation (with name) or reset. */
export const acceptLinkSchema = z.strictObject({
  secret: z.string().min(10).max(200),
  password: newPasswordSchema,
  name: nameSchema.optional(),
  email: email.optional(),
});
export const askResetSchema = z.strictObject({ email });
export const changePasswordSchema = z.strictObject({
  current: z.string().min(1, 'Please fill this in.').max(TYPED_MAX),
  next: newPasswordSchema,
});
export const inviteSchema = z.strictObject({ email, name: nameSchema, siteRole: z.enum(SITE_ROLES) });
export const changeRoleSchema = z.strictObject({ siteRole: z.enum(SITE_ROLES) });
export const disableSchema = z.strictObject({ disabled: z.boolean() });

export type SignIn = z.infer<typeof signInSchema>;
export type AcceptLink = z.infer<typeof acceptLinkSchema>;
export type Invite = z.infer<typeof inviteSchema>;

/** What a link is good for, before it is used. */
export interface LinkView {
  kind: 'first-admin' | 'invite' | 'reset';
  email: string | null;
  name: string | null;
}
export interface AccountView {
  id: string;
  email: string;
  name: string;
  siteRole: (typeof SITE_ROLES)[number];
  /** Invited and not yet accepted. */
  pending: boolean;
  disabled: boolean;
}
export interface OutboxLetter {
  id: string;
  from: string;
  to: string;
  subject: string;
  text: string;
  receivedAt: number;
}
