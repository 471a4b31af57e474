/** What the age rules and a stop need to know of a tool. */
export interface SafetyTraits {
  poweredSaw?: boolean | undefined;
  temperature?: 'high' | 'low' | undefined;
  ladderHeightMm?: number | undefined;
  /** Gets hot in use, whatever its name. */
  hot?: boolean | undefined;
}

const SAW = /\b\w*saws?\b/;
const HAND_SAW = /\b(hand|pull|tenon|coping|hack|dovetail|gent'?s|razor|mitre box)/;
const HOT = /\b(hot|heat|glue gun|solder|low-temp|high-temp)/;

/**
 * Traits that the name of a kind of tool gives away. A saw not known to be worked by hand counts as powered.
 * @param kind name of a kind as a step lists it, such as `mitre saw` or `low-temperature glue gun`
 * @returns only the traits the name tells; an unknown kind has none
 * @source own; the unclear case falls to the strict side
 */
export function traitsOfKind(kind: string): SafetyTraits {
  const name = kind.trim().toLowerCase();
  const traits: SafetyTraits = {};
  if (SAW.test(name)) traits.poweredSaw = !HAND_SAW.test(name);
  if (HOT.test(name)) {
    traits.hot = true;
    if (/\bhigh[- ]temp/.test(name)) traits.temperature = 'high';
    if (/\blow[- ]temp/.test(name)) traits.temperature = 'low';
  }
  return traits;
}

/** Whether a tool gets hot: said so, has a working temperature, or has the name of a hot tool. */
export const isHotTool = (tool: { kind?: string | undefined; traits?: SafetyTraits | undefined }): boolean =>
  tool.traits?.hot === true ||
  tool.traits?.temperature !== undefined ||
  (tool.kind !== undefined && traitsOfKind(tool.kind).hot === true);
