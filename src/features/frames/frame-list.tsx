import { useMemo } from 'react';
import { Link } from 'react-router-dom';
import type { FrameView } from '../../../shared/contracts/frames';
import { wireframeThumbnail } from '../../../shared/frames/flat-drawing';
import { WireSketch } from '../../components/ui/unrolled-drawing';
import { counted } from '../../lib/formats';

/** One frame as a small sketch with its counts; leads to the whole of it. */
function FrameItem({ frame, chosen, to }: { frame: FrameView; chosen: boolean; to: string }) {
  const path = useMemo(() => wireframeThumbnail(frame.geometry, 72, 56), [frame.geometry]);
  const { struts, joints } = frame.geometry;
  return (
    <Link to={to} className="frame-item" aria-current={chosen ? 'true' : undefined}>
      <WireSketch path={path} width={72} height={56} />
      <span className="min-w-0">
        <span className="frame-name">{frame.name}</span>
        <span className="block text-small text-pencil">
          {counted(joints.length, 'joint')}, {counted(struts.length, 'strut')}
        </span>
        <span className="block text-small text-pencil">
          {frame.subAssemblies === 0 ? 'no piece yet' : counted(frame.subAssemblies, 'piece')}
        </span>
      </span>
    </Link>
  );
}

/** The frames of an installation, by name. */
export function FrameList({
  frames,
  chosenId,
  hrefOf,
}: {
  frames: readonly FrameView[];
  chosenId: string | null;
  hrefOf: (frame: FrameView) => string;
}) {
  return (
    <ul className="grid">
      {frames.map((frame) => (
        <li key={frame.id}>
          <FrameItem frame={frame} chosen={frame.id === chosenId} to={hrefOf(frame)} />
        </li>
      ))}
    </ul>
  );
}
