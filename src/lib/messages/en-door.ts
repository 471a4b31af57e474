import { counted } from '../formats';

export const door = {
  title: 'Join',
  quick: 'under a minute',
  code: 'code on the poster',
  codeHint: 'Six letters and figures. There is no letter O, I, B, D or P in it.',
  today: (installation: string, onSite: number) =>
    `${installation}, today, ${counted(onSite, 'person', 'people')} on site`,
  codeUnknown:
    'No build day has this code. Look at the poster again, letter by letter; it may have been renewed, so ask at the muster desk if it still fails.',
  tooMany: (minutes: number) =>
    `Too many wrong codes from this phone. Wait ${counted(minutes, 'minute')}, or let the muster desk put you on the list.`,
  closed: (installation: string) =>
    `${installation} is closed: nobody can join any more. Ask at the muster desk whether there is another day.`,
  firstName: 'first name',
  initial: 'initial',
  ageBand: 'age',
  ageWhy: 'The muster desk looks at you and confirms it. It decides which tools you may use.',
  adult: {
    title: 'Which adult is with you?',
    text: 'They have to be on site. They say yes on their own phone or at the muster desk.',
    label: 'adult, first name and initial',
  },
  email: 'e-mail, if you want the photos',
  comeIn: 'Come in',
  noPassword: 'No password today. The wall and the board show your first name and initial, nothing else.',
  signIn: 'I have an account',
  waiting: {
    title: 'Go to the muster desk.',
    text: (name: string) =>
      `Say your name, ${name}. They see you and your age, and then you can take work. You can read and answer the briefings meanwhile.`,
    number: (number: string) => `You are number ${number} on their list.`,
    read: 'Read a briefing',
  },
  confirmed: (name: string) => `Welcome, ${name}. You can take work now.`,
};
