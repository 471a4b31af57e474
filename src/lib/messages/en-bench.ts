import { counted, listed } from '../formats';

export const bench = {
  title: 'My bench',
  inHand: 'In hand',
  nothingInHand: 'Nothing in hand.',
  nothingInHandText: 'Take something from the list below.',
  place: (station: string, others: readonly string[]) =>
    others.length > 0 ? `${station}, with ${listed(others)}` : station,
  since: (time: string) => `since ${time}`,
  minutesLeft: (minutes: number) => `about ${minutes} min left`,
  longerThanPlanned: 'It takes longer than planned. That is fine; call if you are stuck.',
  takenNotStarted: (minutes: number) => `Taken, not started. About ${minutes} min.`,
  handsMissing: (missing: number) => `${counted(missing, 'hand')} more wanted before you can start.`,
  start: 'Start',
  finished: 'Finished',
  someoneChecks: 'somebody else checks it',
  thenDries: (minutes: number) => `then it dries for ${minutes} min`,
  giveBack: 'Give back',
  handOver: {
    action: 'Hand over',
    title: 'Who takes it over?',
    text: 'They say yes on their own phone. Until then it stays yours.',
    to: 'on site now',
    choose: 'Choose a person',
    offeredTo: (name: string) => `Offered to ${name}. Still yours until they say yes.`,
    takeBack: 'Take the offer back',
    offered: 'Offered to you',
    from: (name: string) => `${name} wants to hand this to you.`,
    accept: 'Take it over',
    decline: 'No, thank you',
  },
  drying: 'Drying',
  noHands: 'no hands needed',
  left: (time: string) => `${time} left`,
  dryAt: 'dry at',
  touchTest: {
    title: (code: string) => `Touch ${code} where nobody sees it.`,
    dry: 'Dry',
    wet: (minutes: number) => `Still wet, ${minutes} minutes more`,
  },
  next: 'You can take next',
  nothingNext: 'Nothing to take just now.',
  nothingNextText:
    'It comes up by itself when a piece is ready. The bench lead knows where a hand is welcome.',
  take: 'Take',
  takeThis: (code: string, step: string) => `Take ${code} ${step}`,
  stationPlaces: (station: string, places: number) => `${station}, ${counted(places, 'place')}`,
  why: {
    first: 'First, because most work still waits behind it.',
    behind: (steps: number) =>
      steps === 0
        ? 'The last step of its piece.'
        : `${counted(steps, 'step')} ${steps === 1 ? 'waits' : 'wait'} behind it.`,
    handsWanted: (hands: number) => `${counted(hands, 'hand')} wanted to start.`,
    rework: (reason: string) => `To do again: ${reason}`,
  },
  notYet: 'Not yet',
  notYetCount: (count: number) => counted(count, 'step'),
  andMore: (count: number) => `and ${counted(count, 'more step')}`,
  showAll: (count: number) => `Show all ${count}`,
  handsWanted: 'Hands wanted nearby',
  youMay: 'What you may do',
  mayNot: (activity: string) => `Not yet: ${activity}.`,
  lengths: 'Lengths to cut',
  ofLength: (count: number, length: string) => `${count} of ${length}`,
  counts: (joints: number, struts: number) => `${counted(joints, 'joint')}, ${counted(struts, 'strut')}`,
  nobody: {
    title: 'You have no bench here.',
    text: 'You look after this installation without being one of its people. An organiser can add you under People.',
  },
  goHome: {
    action: 'I am going home',
    title: 'Going home?',
    text: 'What you have in hand is given back, and the head count is right. Bring tools back to the crib first.',
  },
  took: (code: string, step: string, station: string) => `${code} ${step} is yours. Go to ${station}.`,
  gaveBack: (code: string, step: string) => `${code} ${step} is free again.`,
  finishedNow: {
    toCheck: (code: string) => `Done. ${code} waits for a second person to check it.`,
    drying: (code: string, time: string) => `Done. ${code} dries until ${time}.`,
    dries: (code: string) => `Done. ${code} dries now, no hands needed.`,
    passed: (code: string) => `Done. ${code} goes on to its next step.`,
  },
  lost: {
    title: (name: string) => `${name} was first.`,
    text: (what: string, places: number, name: string, time: string) =>
      `${what} has ${counted(places, 'place')}. ${name} took it at ${time}, before you.`,
    still: (mine: readonly string[]) =>
      mine.length > 0 ? `You still have ${listed(mine)}.` : 'Take something else from the list.',
    has: (name: string) => `${name} has it`,
  },
  offline: {
    title: (time: string) => `No network since ${time}.`,
    waits: (count: number) =>
      count === 0
        ? 'Nothing of yours waits. Keep working.'
        : `${counted(count, 'action')} ${count === 1 ? 'waits' : 'wait'} on this phone. It is sent, once, as soon as the network is back. Keep working.`,
    waiting: 'Waits on this phone',
    waitingStep: (what: string, code: string, step: string, time: string) =>
      `${what}, ${code} ${step}, ${time}`,
    notYours: 'not yours yet',
    takeBack: 'Take this back, I am not finished',
    drop: 'Take this back',
    asItWas: (time: string) => `as it was at ${time}`,
    takingNeeds:
      'Taking needs the network: a place goes to whoever asks first. Or go to the muster desk, they can take it for you.',
  },
};
