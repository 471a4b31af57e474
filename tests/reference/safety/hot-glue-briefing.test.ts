import { describe, expect, it } from 'vitest';
import {
  briefingSchema,
  briefingVersionSchema,
  HOT_GLUE_BODY,
  HOT_GLUE_BRIEFING,
  hotGlueVersion,
} from '../../../shared/safety';

const { panels, rules, notes, firstAid, questions, sources, closing } = HOT_GLUE_BODY;
const text = (list: readonly { text: string }[]) => list.map((one) => one.text).join(' ');
const right = (id: string) => {
  const question = questions.find((one) => one.id === id);
  return question?.options.find((option) => option.id === question.right)?.text ?? '';
};

describe('shipped hot-glue briefing', () => {
  it('hotGlueVersion > the schema of briefings > valid, five to seven questions', () => {
    expect(briefingVersionSchema.safeParse(hotGlueVersion(0)).error?.issues ?? []).toEqual([]);
    expect(briefingSchema.safeParse(HOT_GLUE_BRIEFING).success).toBe(true);
    expect(questions.length).toBeGreaterThanOrEqual(5);
    expect(questions.length).toBeLessThanOrEqual(7);
  });

  it('"Cool, Call, Cover" (southashford 2016; other pages say 10, 15, 10 to 30) > cooling > 20 minutes, no ice, no butter', () => {
    expect(text(firstAid)).toContain('cool running water');
    expect(text(firstAid)).toContain('20 minutes');
    expect(text(firstAid)).toContain('No ice, no butter, no cream');
    expect(right('how-long')).toContain('20 minutes');
    expect(sources.find((one) => one.id === 'cool-20-minutes')?.status).toBe('read, conflict');
  });

  it('museum training slides; adhesives maker note > glue on skin > not pulled off', () => {
    expect(firstAid[0]?.text).toContain('Do not pull hot glue off');
    expect(right('glue-on-finger')).toContain('Leave it on');
  });

  it('"Glue Gun" Jan 2018, DETE V3 Nov 2013 > temperatures > about 195 °C and 120 °C, and the cool one burns', () => {
    const headlines = panels.map((panel) => panel.headline).join(' ');
    expect(headlines).toContain('195 °C');
    expect(headlines).toContain('120 °C and still burns');
    // ISO 13732-1:2006 via IEC 62368-1 Table 42: metal 70 °C under 1 s. 120 °C is far above.
    expect(questions.find((one) => one.id === 'low-temperature-safe')?.why).toContain('70 °C');
    expect(right('low-temperature-safe')).toContain('burns');
  });

  it('museum slides; CAP briefing 2018 > station rules > stand, cable, water, no flammables, unplug, eyes, hair', () => {
    const all = `${text(rules)} ${panels.flatMap((panel) => panel.avoid).join(' ')}`;
    for (const word of [
      'stand',
      'cable',
      'bucket of cold water',
      'flammable',
      'pull the plug',
      'eye protection',
      'hair',
      'One gun, one person',
      'first-aider',
    ]) {
      expect(all).toContain(word);
    }
  });

  it('every statement > its sources > at least one, each source used and its text, edition and status shown', () => {
    const used = [...panels, ...rules, ...notes, ...firstAid].flatMap((statement) => {
      expect(statement.sources.length).toBeGreaterThan(0);
      return statement.sources;
    });
    expect([...new Set(used)].sort()).toEqual(sources.map((one) => one.id).sort());
  });

  it('the right answers > their places in the lists > not always the same', () => {
    const places = questions.map((one) => one.options.findIndex((option) => option.id === one.right));
    expect(new Set(places).size).toBeGreaterThanOrEqual(3);
  });

  it('closing > last line > local codes, the venue and competent people come first', () => {
    expect(closing).toMatch(/Local codes.*venue.*competent people come before/);
  });

  it('plain English for a reader of 13 > sentences of rules and first aid > 20 words on average at most', () => {
    const sentences = `${text(rules)} ${text(firstAid)} ${text(notes)}`.split(/[.?!:;]\s+/);
    const words = sentences.map((sentence) => sentence.split(/\s+/).length);
    expect(words.reduce((sum, count) => sum + count, 0) / words.length).toBeLessThanOrEqual(20);
    expect(Math.max(...words)).toBeLessThanOrEqual(40);
  });
});
