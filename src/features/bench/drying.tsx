import { useMutation } from '@tanstack/react-query';
import type { StepRecord } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { DryingClock } from '../../components/ui/drying-clock';
import { DimensionHead } from '../../components/ui/heads';
import { StateGlyph } from '../../components/ui/strut-glyph';
import { send } from '../../lib/api';
import { formatDuration, formatTime } from '../../lib/formats';
import { useMessages } from '../../lib/messages';
import type { BenchNames } from './names';

/** What "still wet" adds, minutes. */
const MORE_MINUTES = 20;

/** Pieces of mine whose paint dries; no hands needed. */
export function Drying({
  steps,
  installationId,
  names,
  now,
}: {
  steps: StepRecord[];
  installationId: string;
  names: BenchNames;
  now: number;
}) {
  const { bench: words } = useMessages();
  if (steps.length === 0) return null;
  return (
    <section aria-labelledby="bench-drying">
      <DimensionHead
        id="bench-drying"
        right={
          <span className="inline-flex items-center gap-2 text-drying">
            <StateGlyph state="drying" /> {words.noHands}
          </span>
        }
      >
        {words.drying}
      </DimensionHead>
      {steps.map((step) => (
        <OneClock key={step.id} step={step} installationId={installationId} names={names} now={now} />
      ))}
    </section>
  );
}

function OneClock({
  step,
  installationId,
  names,
  now,
}: {
  step: StepRecord;
  installationId: string;
  names: BenchNames;
  now: number;
}) {
  const { bench: words } = useMessages();
  const wet = useMutation({
    mutationFn: () =>
      send('POST', `/installations/${installationId}/steps/${step.id}/still-wet`, { minutes: MORE_MINUTES }),
  });
  const since = step.finishedAt ?? now;
  const until = step.dryUntil ?? now;
  const left = Math.max(0, (until - now) / 1000);
  return (
    <article className="py-4">
      <div className="flex justify-between gap-4">
        <h3>
          <strong>{names.codeOf(step)}</strong> {step.name}
        </h3>
        <strong>{words.left(formatDuration(left))}</strong>
      </div>
      <DryingClock
        since={formatTime(since, names.zone)}
        now={formatTime(now, names.zone)}
        until={formatTime(until, names.zone)}
        endWords={words.dryAt}
      />
      <p>{words.touchTest.title(names.codeOf(step))}</p>
      <Action size="phone" look="plain" busy={wet.isPending} onClick={() => wet.mutate()}>
        {words.touchTest.wet(MORE_MINUTES)}
      </Action>
    </article>
  );
}
