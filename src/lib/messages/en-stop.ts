export const stop = {
  word: 'Stop',
  scopes: {
    'hot-tools': 'hot tools',
    area: (station: string) => station,
    everything: 'everything',
  },
  since: (time: string) => `since ${time}`,
  what: (reason: string, name: string, scope: string) => `${reason} ${name} stopped ${scope}.`,
  /** How to make safe, one thing each. */
  makeSafe: {
    'hot-tools': ['Gun in its stand', 'Pull the plug', 'Step back from the bench'],
    area: ['Put tools down', 'Guns in their stands, plugs out', 'Leave the area'],
    everything: ['Put tools down', 'Lower or tie off every load', 'Go to the nearest exit and wait'],
  },
  otherWork: 'Other work goes on. Only a safety lead lifts this.',
  allWork: 'Only a safety lead lifts this.',
  iSaw: 'I have seen it',
  seen: (seen: number, all: number) => `${seen} of ${all} have seen it.`,
  shout: 'Leads: shout it as well. Not everybody looks at a screen.',
  raise: {
    action: 'Stop',
    title: 'What has to stop?',
    area: 'one area',
    whichArea: 'which area',
    choose: 'Choose an area',
    reason: 'What is wrong?',
    reasonHint: 'A few words: smoke at glue 2.',
    now: 'Stop it now',
    failedOffline: 'There is no network: this stop has not gone out. Shout, and run to a safety lead.',
  },
  lift: {
    action: 'Lift the stop',
    note: 'what was done about it',
  },
  lifted: (name: string, time: string, note: string) => `${name} lifted the stop at ${time}: ${note}`,
};
