import { bench } from './en-bench';
import { briefing } from './en-briefing';
import { common } from './en-common';
import { door } from './en-door';
import { refusals } from './en-refusals';
import { stop } from './en-stop';

/** The volunteers' words in English: the door, My bench, briefings, stop. The measure for every other language. */
export const en = { common, door, bench, refusals, briefing, stop };
