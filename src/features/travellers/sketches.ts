import type { FrameView } from '../../../shared/contracts/frames';
import { wireframeThumbnail } from '../../../shared/frames/flat-drawing';

const known = new WeakMap<FrameView, string>();

/** The sketch of a frame in a box of 50 x 30, drawn once however many pieces are made from it. */
export function sketchOf(frame: FrameView | undefined): string {
  if (!frame) return '';
  const before = known.get(frame);
  if (before !== undefined) return before;
  const sketch = wireframeThumbnail(frame.geometry, 50, 30);
  known.set(frame, sketch);
  return sketch;
}
