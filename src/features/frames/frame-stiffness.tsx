import { useEffect, useMemo, useState } from 'react';
import type { Frame } from '../../../shared/frames';
import {
  analyseStiffness,
  PIN_JOINT_WORDS,
  proposeBraces,
  shownMovement,
  stiffnessText,
} from '../../../shared/frames/stiffness';
import { formatLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { SpaceView } from '../../components/space/space-view';
import { Action } from '../../components/ui/action';
import { DimensionHead } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';

/** Larger ones are looked at piece by piece, after the split. */
const MOST_STRUTS = 400;
const MOST_BRACES = 12;
/** The fastest joint is shown going this share of the frame's mean strut either way. */
const SWING_SHARE = 0.35;
const TURN_MS = 2600;

/** Whether a frame keeps its shape on pins, how it moves where it does not, and the fewest braces that stop it. */
export function FrameStiffness({ frame, unit }: { frame: Frame; unit: LengthUnit }) {
  const large = frame.struts.length > MOST_STRUTS;
  const found = useMemo(() => (large ? null : analyseStiffness(frame)), [frame, large]);
  const braces = useMemo(
    () => (found?.ok && found.value.mechanisms > 0 ? proposeBraces(frame, {}, found.value) : null),
    [frame, found],
  );
  const [way, setWay] = useState<number | null>(null);
  return (
    <section className="grid gap-3" aria-labelledby="stiffness">
      <DimensionHead id="stiffness">Stiffness</DimensionHead>
      {large && <p>With more than {MOST_STRUTS} struts it is looked at piece by piece, after the split.</p>}
      {found && !found.ok && <Note kind="ask" announce={false} title={found.refusal.message} />}
      {found?.ok && (
        <>
          {stiffnessText(found.value).map((words) => (
            <p key={words}>{words}</p>
          ))}
          {braces?.ok && braces.value.braces.length > 0 && (
            <p className="max-w-words">
              {`Fewest braces that stop it, shortest first: ${braces.value.braces
                .slice(0, MOST_BRACES)
                .map(
                  ({ joints: [a, b], lengthMm }) =>
                    `joints ${a + 1} to ${b + 1} (${formatLength(lengthMm, unit)})`,
                )
                .join(
                  ', ',
                )}${braces.value.braces.length > MOST_BRACES ? ` and ${braces.value.braces.length - MOST_BRACES} more` : ''}.`}
            </p>
          )}
          {braces?.ok && braces.value.shortfall && <p>{braces.value.shortfall.message}</p>}
          {braces && !braces.ok && <p>{braces.refusal.message}</p>}
          {found.value.basis && found.value.basis.length > 0 && (
            <div className="flex flex-wrap gap-x-5 gap-y-1">
              <Action look="words" onClick={() => setWay(way === null ? 0 : null)}>
                {way === null ? 'Show how it moves' : 'Hide how it moves'}
              </Action>
              {way !== null && found.value.basis.length > 1 && (
                <Action look="words" onClick={() => setWay((way + 1) % (found.value.basis?.length ?? 1))}>
                  {`Way ${way + 1} of ${found.value.basis.length}: show the next`}
                </Action>
              )}
            </div>
          )}
          {way !== null && (
            <Moving frame={frame} movement={shownMovement(frame, found.value, way)} key={way} />
          )}
          <ul className="grid gap-1 text-small text-pencil">
            {PIN_JOINT_WORDS.map((words) => (
              <li key={words}>{words}</li>
            ))}
          </ul>
        </>
      )}
    </section>
  );
}

/** One mechanism: by hand with the slider, or swinging by itself where somebody starts it. */
function Moving({
  frame,
  movement,
}: {
  frame: Frame;
  movement: readonly { x: number; y: number; z: number }[];
}) {
  const [share, setShare] = useState(0.6);
  const [playing, setPlaying] = useState(false);
  useEffect(() => {
    if (!playing) return;
    let request = 0;
    const start = performance.now();
    const next = (now: number) => {
      setShare(Math.sin(((now - start) / TURN_MS) * 2 * Math.PI));
      request = requestAnimationFrame(next);
    };
    request = requestAnimationFrame(next);
    return () => cancelAnimationFrame(request);
  }, [playing]);
  const swing = useMemo(() => {
    const lengths = frame.struts.map(([a, b]) => {
      const [from, to] = [frame.joints[a], frame.joints[b]];
      return from && to ? Math.hypot(from.x - to.x, from.y - to.y, from.z - to.z) : 0;
    });
    return (SWING_SHARE * lengths.reduce((sum, length) => sum + length, 0)) / Math.max(1, lengths.length);
  }, [frame]);
  const joints = useMemo(
    () =>
      frame.joints.map((joint, at) => {
        const step = movement[at] ?? { x: 0, y: 0, z: 0 };
        const by = share * swing;
        return { x: joint.x + by * step.x, y: joint.y + by * step.y, z: joint.z + by * step.z };
      }),
    [frame, movement, share, swing],
  );
  return (
    <div className="grid gap-2">
      <div className="flex flex-wrap items-center gap-x-6 gap-y-2">
        <label className="flex items-center gap-3">
          <span>how far</span>
          <input
            type="range"
            className="run-progress"
            min={-1}
            max={1}
            step={0.05}
            value={share}
            disabled={playing}
            onChange={(event) => setShare(Number(event.target.value))}
          />
        </label>
        <Action look="words" onClick={() => setPlaying(!playing)}>
          {playing ? 'Stop it' : 'Let it swing'}
        </Action>
      </div>
      <SpaceView
        joints={joints}
        struts={frame.struts}
        label="The frame as it folds"
        look={plainLook}
        numbers="joints"
      />
    </div>
  );
}

const PLAIN = { colour: 'ink', dash: [] } as const;
const plainLook = () => PLAIN;
