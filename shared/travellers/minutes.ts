/** How long a template step takes: a fixed part, and parts for each cut, joint and strut of the frame. */
export interface Minutes {
  fixed: number;
  perCut: number;
  perJoint: number;
}

/**
 * Planned time of a step from what there is to do.
 * @param minutes minutes fixed, per cut and per joint, each 0 or more
 * @param counts cuts and joints of the frame
 * @returns whole seconds, at least 60
 */
export function plannedSeconds(minutes: Minutes, counts: { cuts: number; joints: number }): number {
  const all = minutes.fixed + minutes.perCut * counts.cuts + minutes.perJoint * counts.joints;
  return Math.max(60, Math.round(all * 60));
}
