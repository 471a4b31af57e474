import type { Hazard } from './hazards';
import { isHotTool, traitsOfKind, type SafetyTraits } from './tool-kinds';

export const STOP_KINDS = ['hot-tools', 'area', 'everything'] as const;
export type StopKind = (typeof STOP_KINDS)[number];

/** What a stop covers, as it stands on its record. */
export interface StopScope {
  scope: StopKind;
  /** The station of an area stop; null for the others. */
  stationId: string | null;
}

/** A step as a stop sees it. */
export interface StopStep {
  stationId: string | null;
  hazards: readonly Hazard[];
  toolKinds?: readonly string[] | undefined;
}

/** A tool as a stop sees it: where it is to be used (null when not known), and what it is. */
export interface StopTool {
  stationId: string | null;
  hazard: Hazard | null;
  kind?: string | undefined;
  traits?: SafetyTraits | undefined;
}

// An area stop without a station is a damaged record: then nothing tells where it is safe.
const reaches = (stop: StopScope, stationId: string | null): boolean =>
  stop.scope !== 'area' || stop.stationId === null || stop.stationId === stationId;

/**
 * Whether a stop forbids claiming, starting and finishing a step. Only steps with a hazard are stopped; a step that lists
 * a hot tool or a powered saw is one even when its hazards do not say so.
 * @param stop a raised stop, not lifted
 * @param step its station, hazards and kinds of tool
 * @returns true when the step must wait
 * @source rule 6 of the product, own
 */
export function stopCovers(stop: StopScope, step: StopStep): boolean {
  const kinds = step.toolKinds ?? [];
  const hot = step.hazards.includes('hot-glue') || kinds.some((kind) => isHotTool({ kind }));
  if (stop.scope === 'hot-tools') return hot;
  const hazardous = hot || step.hazards.length > 0 || kinds.some((kind) => traitsOfKind(kind).poweredSaw);
  return hazardous && reaches(stop, step.stationId);
}

/**
 * Whether a stop forbids lending a tool. Taking a tool back is never forbidden.
 * @param stop a raised stop, not lifted
 * @param tool what it is, and the station it would go to; where that is not known an area stop covers a tool with a hazard
 * @returns true when the tool stays in the crib
 * @source rules 4 and 6 of the product, own
 */
export function stopCoversTool(stop: StopScope, tool: StopTool): boolean {
  if (stop.scope === 'everything') return true;
  const hot = tool.hazard === 'hot-glue' || isHotTool(tool);
  if (stop.scope === 'hot-tools') return hot;
  if (tool.stationId === null) return hot || tool.hazard !== null || tool.traits?.poweredSaw === true;
  return reaches(stop, tool.stationId);
}

export const MAKE_SAFE_KEYS = [
  'stop.make-safe.stop-work',
  'stop.make-safe.gun-in-stand',
  'stop.make-safe.pull-plug',
  'stop.make-safe.let-go-of-saw',
  'stop.make-safe.spray-can-down',
  'stop.make-safe.lower-or-tie-off-load',
  'stop.make-safe.come-down-from-ladder',
  'stop.make-safe.step-back',
] as const;
export type MakeSafeKey = (typeof MAKE_SAFE_KEYS)[number];

const HOT_STEPS: readonly MakeSafeKey[] = [
  'stop.make-safe.gun-in-stand',
  'stop.make-safe.pull-plug',
  'stop.make-safe.step-back',
];

/**
 * What to do at once under a stop, in the order of doing.
 * @param scope of the stop
 * @returns keys of the message catalogue: hot tools put down and unplugged; under an area stop or a stop of everything
 *   also saws, cans, loads and ladders
 * @source rule 6 of the product, own
 */
export const makeSafe = (scope: StopScope): readonly MakeSafeKey[] =>
  scope.scope === 'hot-tools' ? HOT_STEPS : MAKE_SAFE_KEYS;
