import { counted } from '../formats';

export const common = {
  states: {
    waiting: 'waiting',
    ready: 'ready',
    'in hand': 'in hand',
    drying: 'drying',
    'to check': 'to check',
    passed: 'passed',
    rework: 'rework',
    held: 'held',
  },
  hazards: {
    'hot-glue': 'hot glue',
    cutting: 'cutting',
    'solvent-spray': 'solvent spray',
    ladder: 'ladder',
    overhead: 'overhead work',
  },
  ageBands: {
    '18+': '18 and over',
    '16-17': '16 to 17',
    '13-15': '13 to 15',
    '9-12': '9 to 12',
    'under-9': 'under 9',
  },
  /** What somebody may do instead, as it stands in a sentence. */
  activities: {
    'lay-out': 'laying out',
    clean: 'cleaning',
    'low-temperature-gun': 'gluing with a low-temperature gun, beside your adult',
    'hand-cutting': 'cutting by hand',
    'low-ladder': 'the low ladder',
    'high-temperature-gun': 'gluing with a high-temperature gun',
    'powered-saw': 'the powered saw',
    'high-ladder': 'the high ladder',
    'solvent-spray': 'spraying',
    overhead: 'overhead work',
  },
  screens: {
    bench: 'My bench',
    briefings: 'Briefings',
    travellers: 'Travellers',
    crib: 'Crib',
    call: 'Call',
  },
  screensLabel: 'Screens',
  skip: 'Go to the content',
  pending: 'One moment',
  back: 'Back',
  close: 'Close',
  cancel: 'Leave it',
  link: {
    live: (time: string) => `live, ${time}`,
    broken: 'no network',
  },
  places: (count: number) => counted(count, 'place'),
  minutes: (count: number) => `${count} min`,
  someone: 'somebody',
  /** When no better words are known: what happened, what it means, what to do. */
  failed: 'That did not work. Nothing was changed. Try again, or ask the muster desk.',
};
