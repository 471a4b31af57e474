/** The four signal words of safety texts, strongest first. */
export const SIGNAL_WORDS = ['DANGER', 'WARNING', 'CAUTION', 'NOTICE'] as const;
export type SignalWord = (typeof SIGNAL_WORDS)[number];

/** What happens to a person when the hazard is not avoided. */
export const HARMS = [
  'will cause death or serious injury',
  'could cause death or serious injury',
  'could cause minor or moderate injury',
  'no injury',
] as const;
export type Harm = (typeof HARMS)[number];

/**
 * The one signal word that fits a harm.
 * @source ANSI Z535.4-2007, 4.14: DANGER will result in death or serious injury (red); WARNING could (orange); CAUTION
 *   could result in minor or moderate injury (yellow); NOTICE is for practices not related to injury (blue, no alert
 *   symbol)
 */
export const SIGNAL_WORD_OF: Record<Harm, SignalWord> = {
  'will cause death or serious injury': 'DANGER',
  'could cause death or serious injury': 'WARNING',
  'could cause minor or moderate injury': 'CAUTION',
  'no injury': 'NOTICE',
};

/** How each panel is drawn: ground of the word, and whether the safety alert symbol stands before it. */
export const SIGNAL_STYLE: Record<
  SignalWord,
  { colour: 'red' | 'orange' | 'yellow' | 'blue'; alertSymbol: boolean }
> = {
  DANGER: { colour: 'red', alertSymbol: true },
  WARNING: { colour: 'orange', alertSymbol: true },
  CAUTION: { colour: 'yellow', alertSymbol: true },
  NOTICE: { colour: 'blue', alertSymbol: false },
};

const INJURY =
  /\b(injur\w*|hurt\w*|wound\w*|burn(s|t|ed|ing)?|scald\w*|blind\w*|blister\w*|bleed\w*|kill\w*|die[sd]?|death|deadly|fatal\w*|crush\w*|electric shock)\b/i;

/** Whether a text speaks of injury, so that NOTICE would be the wrong word over it. */
export const speaksOfInjury = (text: string): boolean => INJURY.test(text);
