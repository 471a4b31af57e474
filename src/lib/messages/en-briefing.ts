import { counted, listed } from '../formats';

export const briefing = {
  title: 'Briefing',
  list: 'Briefings',
  none: 'There is no briefing here yet.',
  open: 'Read and sign',
  firstAid: 'If somebody is hurt',
  parts: { read: 'read', answer: 'answer', sign: 'sign', countersigned: 'countersigned' },
  version: (version: number, time: string) => `version ${version}, from ${time}`,
  changed: (what: string) => `New: ${what}`,
  minutes: (minutes: number) => `about ${counted(minutes, 'minute')} to read, answer and sign`,
  questions: 'Question sheet',
  rightOf: (right: number, all: number) => `${right} of ${all} right`,
  hand: 'Hand in',
  answerAll: 'Answer every question first.',
  missed: (wrong: number) =>
    `${counted(wrong, 'answer')} ${wrong === 1 ? 'is' : 'are'} not right yet. Read the text again and change ${wrong === 1 ? 'it' : 'them'}.`,
  talk: {
    title: 'Talk to a safety lead.',
    text: (leads: readonly string[]) =>
      `Two tries went wrong, so somebody explains it to you: ${leads.length > 0 ? listed(leads) : 'any safety lead'}. Then you answer once more.`,
  },
  sign: 'Sign',
  declaration: (version: number, questions: number, name: string) =>
    `I have read version ${version}, answered its ${counted(questions, 'question')}, and will do as it says. ${name}.`,
  draw: 'Draw your name here',
  clear: 'Clear',
  typeInstead: 'Type your full name instead',
  drawInstead: 'Draw it instead',
  fullName: 'your full name',
  signatureMissing: 'Draw or type your name first.',
  thenCountersign: (leads: readonly string[]) =>
    `then a safety lead countersigns${leads.length > 0 ? `, ${listed(leads)}` : ''}`,
  waiting: {
    title: 'Signed. Now find a safety lead.',
    text: (leads: readonly string[]) =>
      `${leads.length > 0 ? listed(leads) : 'A safety lead'} countersigns it on their own screen. You can take such steps at once then.`,
  },
  done: (hazards: readonly string[], until: string) => `Signed off for ${listed(hazards)} until ${until}.`,
  status: {
    NOT_READ: 'not read yet',
    NOT_PASSED: 'answer again',
    TALK_NEEDED: 'talk to a safety lead',
    NOT_SIGNED: 'sign it',
    NOT_COUNTERSIGNED: 'waits for a safety lead',
    AGE_NOT_CONFIRMED: 'go to the muster desk',
    valid: (until: string) => `signed off until ${until}`,
    EXPIRED: 'run out, do it again',
    REVOKED: 'taken back by a safety lead',
    VOIDED_BY_CHANGE: 'changed, read what is new',
  },
  local: 'Local codes and the advice of competent people come before this page.',
};
