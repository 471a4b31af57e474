import type { PersonRecord, ToolRecord } from '../../../shared/contracts/live';

/** What a scanner typed, or a hand: the last part of a link, without the spaces round it. */
function bare(text: string): string {
  const typed = text.trim();
  if (!/^https?:\/\//i.test(typed)) return typed;
  // Codes on badges and tools are plain links that end in the number.
  const path = typed.split(/[?#]/, 1)[0] ?? '';
  const last = path.replace(/\/+$/, '').split('/').at(-1) ?? '';
  try {
    return decodeURIComponent(last);
  } catch {
    // A link that was cut off in the middle of a coded letter.
    return last;
  }
}

const plain = (name: string) =>
  name
    .toLowerCase()
    .replace(/[\s.]+/g, ' ')
    .trim();

/** A person as the field offers them: the number decides where two have one name. */
export const personOffer = ({ number, name }: PersonRecord): string => `${number} ${name}`;

const standing = (people: Iterable<PersonRecord>): PersonRecord[] =>
  [...people].filter((person) => !person.removed);

const namedLike = (text: string, people: Iterable<PersonRecord>): PersonRecord[] =>
  standing(people).filter((person) => plain(person.name) === plain(bare(text)));

/**
 * The person a scan means: by number, by number and name as offered, or by the whole name where only one has it.
 * @param text as typed, scanned or pasted
 * @returns null when nobody has it
 */
export function readPerson(text: string, people: Iterable<PersonRecord>): PersonRecord | null {
  const number = /^0*(\d{1,6})(?:\s+\p{L}.*)?$/u.exec(bare(text))?.[1];
  if (number !== undefined)
    return standing(people).find((person) => person.number === Number(number)) ?? null;
  const named = namedLike(text, people);
  return named.length === 1 ? (named[0] ?? null) : null;
}

/**
 * Why a scan means nobody, and what to type instead.
 * @param text what `readPerson` found nobody for
 */
export function personProblem(text: string, people: Iterable<PersonRecord>): string {
  const typed = bare(text);
  const same = namedLike(text, people);
  if (same.length > 1)
    return `${same.length} people are called ${same[0]?.name}: ${same.map(({ number }) => number).join(', ')}. Type the number.`;
  if (looksLikeTool(text)) return toolProblem(text);
  if (/^\d+$/.test(typed)) return `Nobody here has the number ${typed}. Ask at the muster desk.`;
  return `Nobody here is called ${typed}. Type their number, or choose from the names offered.`;
}

/** Why a scan means no tool. */
export const toolProblem = (text: string): string =>
  `No tool has the number ${bare(text)}. Look at the tag on it, such as G-07.`;

/** A tool's number as it stands on the tool: `g7`, `G 07` and `G-07` are one. */
function toolKey(text: string): string {
  const match = /^([A-Z]{1,2})[\s-]*0*(\d{1,3})$/i.exec(bare(text));
  return match ? `${(match[1] ?? '').toUpperCase()}-${Number(match[2])}` : '';
}

/**
 * The tool a scan means.
 * @param text as typed, scanned or pasted
 * @returns null when no tool has the number
 */
export function readTool(text: string, tools: Iterable<ToolRecord>): ToolRecord | null {
  const wanted = toolKey(text);
  if (wanted === '') return null;
  return [...tools].find((tool) => !tool.removed && toolKey(tool.number) === wanted) ?? null;
}

/** Whether something looks like a tool's number rather than a person's. */
export const looksLikeTool = (text: string): boolean => toolKey(text) !== '';
