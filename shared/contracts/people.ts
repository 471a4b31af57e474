import { z } from 'zod';
import { DUTIES } from '../accounts';
import { AGE_BANDS } from '../safety';

export const JOIN_CODE_LENGTH = 6;
const firstName = z.string().trim().min(1, 'Please fill this in.').max(40);
const initial = z
  .string()
  .trim()
  .regex(/^\p{L}?$/u, 'One letter.')
  .transform((letter) => letter.toUpperCase());

/** Join by the poster's code: a name and an age band, no password. */
export const joinSchema = z
  .strictObject({
    code: z.string().min(1, 'Please fill this in.').max(20),
    firstName,
    initial,
    ageBand: z.enum(AGE_BANDS, { error: 'Please choose your age.' }),
    adultName: z.string().trim().max(60).optional(),
    email: z
      .union([z.literal(''), z.email('This is no e-mail address. Leave it empty if you like.').max(254)])
      .optional(),
  })
  .superRefine((input, context) => {
    if (input.ageBand !== '18+' && !input.adultName) {
      context.addIssue({
        code: 'custom',
        path: ['adultName'],
        message: 'Which adult is here with you? Their first name and initial.',
      });
    }
  });
/** The desk confirms the person and the age band it saw; for a minor who named no adult, it also writes who that is. */
export const confirmSchema = z.strictObject({
  ageBand: z.enum(AGE_BANDS),
  adultName: z.string().trim().max(60).optional(),
});
/** A duty given to or taken from a person who is in the installation already. */
export const dutySchema = z.strictObject({ duty: z.enum(DUTIES).exclude(['volunteer']), on: z.boolean() });
/** An account gets a place and duties in the installation. */
export const addMemberSchema = z.strictObject({
  email: z.preprocess(
    (value) => (typeof value === 'string' ? value.trim().toLowerCase() : value),
    z.email('This is no e-mail address. It looks like name@place.example.').max(254),
  ),
  firstName,
  initial,
  duties: z.array(z.enum(DUTIES).exclude(['volunteer'])).max(DUTIES.length),
});

export type JoinInput = z.input<typeof joinSchema>;
export type Join = z.infer<typeof joinSchema>;
export type Confirm = z.infer<typeof confirmSchema>;
export type AddMember = z.infer<typeof addMemberSchema>;

/** What a poster's code opens, before joining. */
export interface CodeView {
  installationId: string;
  name: string;
  venue: string;
  onSite: number;
}

/** What a person who leaves, or is removed, leaves behind. */
export interface LeavingView {
  personId: string;
  /** Steps whose places were given back. */
  givenBack: string[];
  /** Tools that are still out with this person. */
  toolsOut: { id: string; number: string; name: string }[];
}
