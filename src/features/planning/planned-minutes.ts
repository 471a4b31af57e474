import type { FrameView } from '../../../shared/contracts/frames';
import { cutCount, jointCount } from '../../../shared/frames/frame';
import { plannedSeconds, type Minutes } from '../../../shared/travellers/minutes';
import { formatDuration } from '../../lib/formats';

/** Cuts and joints of a frame, which minutes are made from. */
export const countsOf = ({ geometry }: FrameView) => ({
  cuts: cutCount(geometry),
  joints: jointCount(geometry),
});

/** Planned seconds of each step for a frame, in order. */
export const secondsPerStep = (steps: readonly { minutes: Minutes }[], frame: FrameView): number[] => {
  const counts = countsOf(frame);
  return steps.map((step) => plannedSeconds(step.minutes, counts));
};

/** Seconds of all steps, in words. */
export const totalWords = (seconds: readonly number[]): string =>
  formatDuration(seconds.reduce((sum, one) => sum + one, 0));
