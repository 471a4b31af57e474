import { describe, expect, it } from 'vitest';
import {
  HARMS,
  HOT_GLUE_BODY,
  SIGNAL_STYLE,
  SIGNAL_WORD_OF,
  SIGNAL_WORDS,
  signalPanelSchema,
  speaksOfInjury,
  type SignalPanel,
} from '../../../shared/safety';

const panel = (changes: Partial<SignalPanel> = {}): SignalPanel => ({
  id: 'p',
  signalWord: 'WARNING',
  harm: 'could cause death or serious injury',
  headline: 'Burn hazard.',
  consequence: 'Glue burns skin.',
  avoid: ['Use the stand.'],
  sources: [],
  ...changes,
});
const problems = (candidate: SignalPanel) => {
  const result = signalPanelSchema.safeParse(candidate);
  return result.success ? [] : result.error.issues.map((issue) => issue.path.join('.'));
};

// Source: ANSI Z535.4-2007, 4.14: DANGER *will* result in death or serious injury (red); WARNING *could* (orange); CAUTION
// *could* result in minor or moderate injury (yellow); NOTICE is not about injury (blue, no alert symbol).
describe('ANSI Z535.4-2007 4.14', () => {
  it('SIGNAL_WORD_OF > each harm > the word of the standard, its colour and alert symbol', () => {
    const table = HARMS.map((harm) => {
      const word = SIGNAL_WORD_OF[harm];
      return [harm, word, SIGNAL_STYLE[word].colour, SIGNAL_STYLE[word].alertSymbol];
    });
    expect(table).toEqual([
      ['will cause death or serious injury', 'DANGER', 'red', true],
      ['could cause death or serious injury', 'WARNING', 'orange', true],
      ['could cause minor or moderate injury', 'CAUTION', 'yellow', true],
      ['no injury', 'NOTICE', 'blue', false],
    ]);
  });

  it('signalPanelSchema > every word over every harm > accepts the fitting one only', () => {
    for (const harm of HARMS) {
      for (const signalWord of SIGNAL_WORDS) {
        const text =
          harm === 'no injury' ? { headline: 'A gun drips.', consequence: 'The bench is spoilt.' } : {};
        const accepted = problems(panel({ harm, signalWord, ...text })).length === 0;
        expect([harm, signalWord, accepted]).toEqual([harm, signalWord, SIGNAL_WORD_OF[harm] === signalWord]);
      }
    }
  });

  it('signalPanelSchema > an injury without consequence or avoidance > both are named', () => {
    expect(problems(panel({ consequence: ' ', avoid: [] }))).toEqual(['consequence', 'avoid']);
    expect(problems(panel({ headline: '' }))).toEqual(['headline']);
  });

  it('signalPanelSchema > NOTICE over words of injury > refused; over property > accepted without avoidance', () => {
    const notice: Partial<SignalPanel> = { signalWord: 'NOTICE', harm: 'no injury', avoid: [] };
    expect(
      problems(panel({ ...notice, headline: 'The glue is hot.', consequence: 'You get burned.' })),
    ).toEqual(['signalWord']);
    expect(problems(panel({ ...notice, headline: 'A gun drips.', consequence: '' }))).toEqual([]);
  });

  it('shipped hot-glue briefing > every panel > passes, NOTICE speaks of no injury, no DANGER is cried', () => {
    for (const shipped of HOT_GLUE_BODY.panels) {
      expect(problems(shipped)).toEqual([]);
      const text = [shipped.headline, shipped.consequence, ...shipped.avoid].join(' ');
      expect(speaksOfInjury(text)).toBe(shipped.signalWord !== 'NOTICE');
    }
    expect(HOT_GLUE_BODY.panels.map((shipped) => shipped.signalWord)).not.toContain('DANGER');
  });
});
