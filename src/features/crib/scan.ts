import type { PersonRecord, ToolRecord } from '../../../shared/contracts/live';

/** What a scanner typed, or a hand: the last part of a link, without the spaces round it. */
function bare(text: string): string {
  const typed = text.trim();
  if (!/^https?:\/\//i.test(typed)) return typed;
  // Codes on badges and tools are plain links that end in the number.
  const path = typed.split(/[?#]/, 1)[0] ?? '';
  return decodeURIComponent(path.replace(/\/+$/, '').split('/').at(-1) ?? '');
}

const plain = (name: string) =>
  name
    .toLowerCase()
    .replace(/[\s.]+/g, ' ')
    .trim();

/**
 * The person a scan means: by number, or by the whole name where only one has it.
 * @param text as typed, scanned or pasted
 * @returns null when nobody has it
 */
export function readPerson(text: string, people: Iterable<PersonRecord>): PersonRecord | null {
  const wanted = bare(text);
  const number = /^0*(\d{1,6})$/.exec(wanted)?.[1];
  const all = [...people].filter((person) => !person.removed);
  if (number !== undefined) return all.find((person) => person.number === Number(number)) ?? null;
  const named = all.filter((person) => plain(person.name) === plain(wanted));
  return named.length === 1 ? (named[0] ?? null) : null;
}

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
