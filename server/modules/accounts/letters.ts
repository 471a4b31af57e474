import type { WriteScope } from '../../db/write';

type Letter = Parameters<WriteScope['mail']>[0];

const greeting = (name: string) => (name ? `Hello ${name},` : 'Hello,');

/** The letter with an invitation's link. */
export const inviteLetter = (to: string, name: string, inviter: string, url: string): Letter => ({
  to,
  subject: 'Your sign-in for Strutbee',
  text: [
    greeting(name),
    '',
    `${inviter} invites you to help run a community build on Strutbee.`,
    'Open this link within 72 hours and choose a password:',
    '',
    url,
    '',
    'The link works once. If you did not expect this letter, do nothing.',
  ].join('\n'),
});

/** The letter with a link to choose a new password. */
export const resetLetter = (to: string, name: string, url: string): Letter => ({
  to,
  subject: 'Choose a new password for Strutbee',
  text: [
    greeting(name),
    '',
    'Somebody, most likely you, asked for a new password for Strutbee.',
    'Open this link within one hour and choose one; you will be signed out everywhere else:',
    '',
    url,
    '',
    'The link works once. If it was not you, do nothing: your password stays as it is.',
  ].join('\n'),
});

/** Told after every change of a password (ASVS 5.0 6.3.7). */
export const passwordChangedLetter = (to: string, name: string): Letter => ({
  to,
  subject: 'Your password for Strutbee was changed',
  text: [
    greeting(name),
    '',
    'Your password for Strutbee was changed just now, and you were signed out everywhere else.',
    'If it was not you, ask an administrator to disable your account at once.',
  ].join('\n'),
});
