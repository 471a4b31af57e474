import type { Briefing, BriefingBody, BriefingVersion, SourceNote } from './briefing-schema';

const NO_EDITION = 'no edition given';

const SOURCES: SourceNote[] = [
  {
    id: 'gun-temperatures',
    text:
      'Low about 120 C (250 F), high 190-210 C (about 195 C, 380 F): school pages "Glue Gun" and Makins page; school ' +
      'plant form 130-200 C, third-degree burns possible (DETE Queensland Hot-Glue Gun form).',
    edition: 'Glue Gun, Jan 2018; DETE form V3, Nov 2013',
    status: 'read',
  },
  {
    id: 'touch-limits',
    text:
      'Touch limits for contact under 1 s: metal 70 C, plastic 94 C; IEC 62368-1 Table 42, adopting ISO 13732-1, read ' +
      'in an engineering note.',
    edition: 'ISO 13732-1:2006',
    status: 'read',
  },
  {
    id: 'any-setting-burns',
    text: 'NSTA: "regardless of the temperature setting, glue guns can burn skin".',
    edition: NO_EDITION,
    status: 'read',
  },
  {
    id: 'station-kit',
    text:
      'Cold water at the bench, heat-proof drip mat, stand (never laid on its side), cords to the wall side, never ' +
      'unattended while plugged in or hot, cable inspected first, glasses, long sleeves, closed shoes, no jewellery, hair ' +
      'tied: museum training slides; "Glue Gun"; CAP briefing.',
    edition: 'Glue Gun, Jan 2018; CAP briefing, 2018',
    status: 'read',
  },
  {
    id: 'no-flammables',
    text: 'No flammable gases or liquids in the gluing area; the nozzle melts cords: CAP briefing.',
    edition: '2018',
    status: 'read',
  },
  {
    id: 'electric-shock',
    text: 'A damaged mains cable can kill: general electrical safety, no text cited.',
    edition: NO_EDITION,
    status: 'from memory',
  },
  {
    id: 'cool-20-minutes',
    text:
      'Burn: 20 minutes of cool running water ("Cool, Call, Cover"); useful up to 3 hours after; never ice, cream or ' +
      'butter; remove jewellery and clothing unless stuck; cover loosely with film lengthways; emergency number if larger ' +
      'than the palm, on face, hands, feet or genitals, round a limb, or a child: southashford; tubeacademy. Other pages ' +
      'say 10, 15 or 10 to 30 minutes.',
    edition: 'southashford, 2016',
    status: 'read, conflict',
  },
  {
    id: 'glue-on-skin',
    text:
      'Hot glue on skin: do not pull off while hot; into cold water at once; keep fingers moving so that it does not set ' +
      'as a ring; remove only when cool and loose, else leave it and seek help: museum training slides; adhesives maker note.',
    edition: NO_EDITION,
    status: 'read',
  },
  {
    id: 'open-time',
    text:
      'Glue solidifies in "a few seconds to one minute"; open time 15-60 s for positioning by hand: jiajianglue; ' +
      'adhesives.org.',
    edition: 'jiajianglue, 2025',
    status: 'read',
  },
  {
    id: 'softening',
    text: 'Ordinary hot-melt glue (EVA) softens at about 80 C and creeps as it warms: rhadhesive.',
    edition: NO_EDITION,
    status: 'read',
  },
  {
    id: 'age-table',
    text:
      'Age rule of thumb: under 8 not; 8 and over with direct constant supervision, low temperature; teens after ' +
      'sign-off: craft-safety page. The limits are the age table of this product.',
    edition: NO_EDITION,
    status: 'read',
  },
  {
    id: 'house-rule',
    text: 'Rule of this product, not taken from a published source.',
    edition: 'Strutbee 1',
    status: 'own',
  },
];

/** What the shipped briefing is about; a sign-off holds a year (the most by DETE 2013 is five, with a yearly review). */
export const HOT_GLUE_BRIEFING: Briefing = {
  key: 'hot-glue',
  title: 'Hot glue',
  hazards: ['hot-glue'],
  validityDays: 365,
};

/** The shipped text, for a reader of 13. Each statement names its sources. */
export const HOT_GLUE_BODY: BriefingBody = {
  panels: [
    {
      id: 'high-temperature',
      signalWord: 'WARNING',
      harm: 'could cause death or serious injury',
      headline: 'Burn hazard. A high-temperature gun works at about 195 °C.',
      consequence:
        'The nozzle and the glue can burn deep into the skin. Hot glue sticks and goes on burning while it is there.',
      avoid: [
        'Hold the gun by its handle only.',
        'Keep fingers, yours and your partner’s, away from the nozzle and from fresh glue.',
        'Put the gun in its stand whenever you are not gluing.',
      ],
      sources: ['gun-temperatures', 'any-setting-burns', 'station-kit'],
    },
    {
      id: 'low-temperature',
      signalWord: 'CAUTION',
      harm: 'could cause minor or moderate injury',
      headline: 'Burn hazard. A low-temperature gun works at about 120 °C and still burns.',
      consequence: 'Touching its metal nozzle or its glue for less than a second is enough to burn you.',
      avoid: [
        'Handle it exactly as you would a high-temperature gun.',
        'Wait a full minute before you touch a joint.',
      ],
      sources: ['gun-temperatures', 'touch-limits', 'any-setting-burns', 'open-time'],
    },
    {
      id: 'cable-and-fire',
      signalWord: 'WARNING',
      harm: 'could cause death or serious injury',
      headline: 'Electric shock and fire hazard.',
      consequence:
        'A damaged cable can give you a deadly shock. The nozzle melts cables and can set paint, solvent or spray alight.',
      avoid: [
        'Look along the cable before you plug in. If it is damaged, leave it unplugged and give it to the crib keeper.',
        'Lead the cable away from the nozzle, to the back of the bench.',
        'Allow no spray can, solvent or other flammable thing at a glue bench.',
      ],
      sources: ['station-kit', 'no-flammables', 'electric-shock'],
    },
    {
      id: 'drips',
      signalWord: 'NOTICE',
      harm: 'no injury',
      headline: 'A gun drips.',
      consequence: 'Drops spoil the bench and the wood.',
      avoid: ['Keep the heat-proof mat under the nozzle.'],
      sources: ['station-kit'],
    },
  ],
  rules: [
    {
      id: 'age',
      text: 'Under 16, take a low-temperature gun only, with your adult at the same bench. From 9 to 12, your adult watches you all the time. Under 9, take other work. Where your own list of what you may do is stricter, the list counts.',
      sources: ['age-table', 'house-rule'],
    },
    {
      id: 'wear',
      text: 'Wear eye protection, closed shoes and long sleeves. Tie back your hair. Take off rings, bracelets and loose scarves.',
      sources: ['station-kit'],
    },
    {
      id: 'water',
      text: 'Before you switch on, see that a bucket of cold water stands at your bench and that you know the way to a running tap.',
      sources: ['station-kit'],
    },
    {
      id: 'stand',
      text: 'The gun stands in its stand. Never lay it on its side, on the bench or on your lap.',
      sources: ['station-kit'],
    },
    {
      id: 'one-person',
      text: 'One gun, one person. To hand it over, put it down in the stand, let go, and let the other person pick it up.',
      sources: ['house-rule'],
    },
    {
      id: 'unplug',
      text: 'When you leave the bench, even for a minute, put the gun in its stand and pull the plug. It stays hot for a long time after.',
      sources: ['station-kit', 'house-rule'],
    },
    {
      id: 'tell',
      text: 'Tell a first-aider about every burn, however small, and tell your bench lead about every near miss.',
      sources: ['house-rule'],
    },
  ],
  notes: [
    {
      id: 'hanging',
      text: 'Glue goes soft in the heat and slowly gives way. It holds a piece together; it never carries a piece that hangs.',
      sources: ['softening'],
    },
    {
      id: 'setting',
      text: 'A bead sets in a few seconds to a minute. Hold the stick, not the joint, while it sets.',
      sources: ['open-time'],
    },
  ],
  firstAid: [
    {
      id: 'leave-glue',
      text: 'Do not pull hot glue off. Skin comes off with it.',
      sources: ['glue-on-skin', 'house-rule'],
    },
    {
      id: 'cool',
      text: 'Put the burn under cool running water at once, for 20 minutes by the clock. Use the bucket until you are at the tap. No ice, no butter, no cream.',
      sources: ['cool-20-minutes', 'glue-on-skin'],
    },
    {
      id: 'call',
      text: 'Call out, or press Call on your phone: a first-aider comes to you. Do not walk off alone.',
      sources: ['house-rule'],
    },
    {
      id: 'fingers',
      text: 'Glue round a finger: keep the finger moving in the water, so that the glue does not set as a tight ring.',
      sources: ['glue-on-skin'],
    },
    {
      id: 'jewellery',
      text: 'Take off rings, watches and clothes near the burn, unless they stick to it.',
      sources: ['cool-20-minutes'],
    },
    {
      id: 'later',
      text: 'After cooling, cover it loosely with cling film laid lengthways. Glue that is cool and loose may come off; leave the rest to a medical person.',
      sources: ['cool-20-minutes', 'glue-on-skin'],
    },
    {
      id: 'emergency',
      text: 'Call the local emergency number if the burn is larger than the hurt person’s palm, on face, hands, feet or private parts, goes round an arm or leg, or if the hurt person is a child.',
      sources: ['cool-20-minutes'],
    },
  ],
  questions: [
    {
      id: 'glue-on-finger',
      text: 'Hot glue is on your finger. What do you do first?',
      options: [
        { id: 'pull', text: 'Pull it off quickly' },
        { id: 'water', text: 'Leave it on and put the finger in cool water' },
        { id: 'wipe', text: 'Wipe it off with a dry cloth' },
      ],
      right: 'water',
      why: 'Hot glue tears the skin when it is pulled or wiped. Water cools the glue and the skin under it.',
    },
    {
      id: 'how-long',
      text: 'How do you cool a burn, and for how long?',
      options: [
        { id: 'ice', text: 'With ice, until it no longer hurts' },
        { id: 'rinse', text: 'With water, for one or two minutes' },
        { id: 'twenty', text: 'With cool running water, for 20 minutes' },
        { id: 'butter', text: 'With butter or cream, then a plaster' },
      ],
      right: 'twenty',
      why: 'It takes 20 minutes until the heat is out of the skin. Ice, butter and cream make a burn worse.',
    },
    {
      id: 'low-temperature-safe',
      text: 'You have a low-temperature gun. What is true?',
      options: [
        { id: 'burns', text: 'It burns skin too; I handle it like a hot one' },
        { id: 'safe', text: 'It is safe to touch, that is why young people get it' },
        { id: 'tip', text: 'Only the glue is hot, the nozzle is not' },
      ],
      right: 'burns',
      why: 'It works at about 120 °C. Metal burns in under a second from 70 °C on.',
    },
    {
      id: 'pass-gun',
      text: 'Your partner needs your gun. How do you hand it over?',
      options: [
        { id: 'hand', text: 'From hand to hand, handle first' },
        { id: 'side', text: 'I lay it on the bench between us' },
        { id: 'stand', text: 'I put it in the stand, let go, and my partner picks it up' },
      ],
      right: 'stand',
      why: 'From hand to hand the nozzle passes somebody’s skin. Only in the stand is it nobody’s gun for a moment.',
    },
    {
      id: 'leave-bench',
      text: 'You go to fetch more sticks, two minutes away. What about the gun?',
      options: [
        { id: 'on', text: 'It stays plugged in, so that it is hot when I am back' },
        { id: 'unplug', text: 'Into the stand, and I pull the plug' },
        { id: 'watch', text: 'I ask a younger person to hold it' },
      ],
      right: 'unplug',
      why: 'A hot gun that nobody watches burns the next person, or starts a fire.',
    },
    {
      id: 'spray-can',
      text: 'Somebody puts a can of spray paint on your bench. What do you do?',
      options: [
        { id: 'ignore', text: 'Nothing, as long as nobody sprays' },
        { id: 'far-end', text: 'I move it to the other end of the bench' },
        { id: 'away', text: 'I stop gluing, have it taken to the paint bay, and tell the bench lead' },
      ],
      right: 'away',
      why: 'Nothing flammable belongs at a glue bench: the nozzle can set it alight.',
    },
    {
      id: 'bad-cable',
      text: 'The cable of the gun you were given has a cut in it. What do you do?',
      options: [
        { id: 'keep-unplugged', text: 'I leave it unplugged and take it back to the crib keeper' },
        { id: 'tape', text: 'I wind tape round it and carry on' },
        { id: 'careful', text: 'I plug it in and keep my hand away from the cut' },
      ],
      right: 'keep-unplugged',
      why: 'A damaged cable can kill. The crib keeper tags the gun so that nobody else uses it.',
    },
  ],
  closing:
    'Local codes, the rules of this venue and the advice of competent people come before this page. If you are not sure, ask a safety lead before you switch on.',
  sources: SOURCES,
};

/**
 * The shipped hot-glue briefing as its first version.
 * @param effectiveFrom ms since the epoch, the moment the installation takes it on
 * @returns version 1
 * @source the statements name theirs; signal words after ANSI Z535.4-2007
 */
export const hotGlueVersion = (effectiveFrom: number): BriefingVersion => ({
  version: 1,
  kind: 'first',
  effectiveFrom,
  whatChanged: null,
  body: HOT_GLUE_BODY,
});
