import { isValid, parseISO } from 'date-fns';
import { z } from 'zod';

const TIME = /^([01]\d|2[0-3]):[0-5]\d$/;
const timeOfDay = z.string().regex(TIME, 'A time of day such as 09:30.');

/** Whether the runtime knows an IANA zone of this name. */
export function isTimeZone(name: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: name });
    return true;
  } catch {
    return false;
  }
}

const installationFields = {
  name: z.string().trim().min(1, 'Please fill this in.').max(80),
  venue: z.string().trim().max(120),
  timeZone: z.string().refine(isTimeZone, 'A time zone such as Europe/Lisbon.'),
  unit: z.enum(['mm', 'inch']),
  hallLimit: z
    .number({ error: 'How many people the hall may hold, as posted at its door.' })
    .int()
    .min(1)
    .max(5000),
};
export const createInstallationSchema = z.strictObject(installationFields);
/** Edit; `revision` is the one the form was filled from, so that a stale page is told and nobody's change is lost. */
export const editInstallationSchema = z.strictObject({
  ...installationFields,
  maxInHand: z.number().int().min(1).max(10),
  ageChanges: z.array(z.strictObject({ key: z.string().max(60), value: z.string().max(60) })).max(50),
  revision: z.number().int().min(0),
});

const isTime = (value: unknown): value is string => typeof value === 'string' && TIME.test(value);

/** Whether a value has the parts whose order is looked at; what is wrong inside them was said already. */
const hasTimes = (value: unknown): boolean =>
  typeof value === 'object' &&
  value !== null &&
  'breaks' in value &&
  Array.isArray(value.breaks) &&
  value.breaks.every((pause: unknown) => typeof pause === 'object' && pause !== null);

/** A dated session. Every problem of the order of its times is named at its own field. */
export const buildDaySchema = z
  .strictObject({
    date: z
      .string()
      .regex(/^\d{4}-\d{2}-\d{2}$/, 'A date such as 2027-06-14.')
      .refine((date) => isValid(parseISO(date)), 'There is no such day.'),
    doors: timeOfDay,
    start: timeOfDay,
    clearUp: timeOfDay,
    end: timeOfDay,
    breaks: z
      .array(
        z.strictObject({
          from: timeOfDay,
          to: timeOfDay,
          label: z.string().trim().min(1, 'Please fill this in.').max(30),
        }),
      )
      .max(12),
  })
  .superRefine(checkOrder, { when: ({ value }) => hasTimes(value) });

/** Times that are none are left out: their own field says so. */
function checkOrder(
  day: { [key in 'doors' | 'start' | 'clearUp' | 'end']: string } & {
    breaks: { from: string; to: string }[];
  },
  context: z.RefinementCtx,
): void {
  const order = [
    ['doors', 'start', 'The start comes after the doors open.'],
    ['start', 'clearUp', 'Clear-up comes after the start.'],
    ['clearUp', 'end', 'The end comes after clear-up begins.'],
  ] as const;
  for (const [before, after, message] of order) {
    if (!isTime(day[before]) || !isTime(day[after])) continue;
    const late =
      after === 'end' || after === 'clearUp' ? day[after] <= day[before] : day[after] < day[before];
    if (late) context.addIssue({ code: 'custom', path: [after], message });
  }
  day.breaks.forEach((pause, index) => {
    if (!isTime(pause.from) || !isTime(pause.to)) return;
    if (pause.to <= pause.from)
      context.addIssue({
        code: 'custom',
        path: ['breaks', index, 'to'],
        message: 'A break ends after it begins.',
      });
    if ((isTime(day.start) && pause.from < day.start) || (isTime(day.end) && pause.to > day.end))
      context.addIssue({
        code: 'custom',
        path: ['breaks', index, 'from'],
        message: 'A break lies between start and end.',
      });
  });
}

export const STATION_KINDS = ['saw', 'bench', 'glue', 'paint bay', 'hanging zone', 'other'] as const;
export const stationSchema = z.strictObject({
  name: z.string().trim().min(1, 'Please fill this in.').max(30),
  kind: z.enum(STATION_KINDS),
  places: z.number().int().min(1).max(200),
});
export const displayTokenSchema = z.strictObject({
  label: z.string().trim().min(1, 'Please fill this in.').max(40),
});
export const displaySignInSchema = z.strictObject({ token: z.string().min(10).max(200) });

export type CreateInstallation = z.infer<typeof createInstallationSchema>;
export type EditInstallation = z.infer<typeof editInstallationSchema>;
export type BuildDayInput = z.infer<typeof buildDaySchema>;
export type StationInput = z.infer<typeof stationSchema>;

export interface InstallationListItem {
  id: string;
  name: string;
  venue: string;
  status: 'draft' | 'published' | 'closed';
  firstDate: string | null;
  subAssemblies: number;
  people: number;
  duties: string[];
}
export interface JoinCodeView {
  joinCode: string;
  joinUrl: string;
  renewedAt: number;
}
/** A new token is shown once; the list names only its label. */
export interface DisplayTokenView {
  id: string;
  label: string;
  createdAt: number;
  closed: boolean;
  /** Only in the answer to making it. */
  url?: string;
}
/** What publishing still needs, each with words and the screen where it is done. */
export interface PublishCheck {
  key: 'build-day' | 'station' | 'sub-assembly' | 'safety-leads' | 'briefings';
  done: boolean;
  message: string;
}
