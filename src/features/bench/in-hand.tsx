import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import type { PersonRecord, StepRecord } from '../../../shared/contracts/live';
import { frameFigures } from '../../../shared/frames/frame-figures';
import type { Frame } from '../../../shared/frames/frame';
import { formatLength } from '../../../shared/kernel/lengths';
import { Action } from '../../components/ui/action';
import { Dialog } from '../../components/ui/dialog';
import { SelectField } from '../../components/ui/field';
import { UnrolledDrawing } from '../../components/ui/unrolled-drawing';
import { ApiError, send } from '../../lib/api';
import { formatTime } from '../../lib/formats';
import { useFrames } from '../../lib/frames';
import { useMessages } from '../../lib/messages';
import type { BenchNames } from './names';
import type { BenchCommand } from './use-bench-command';

interface Props {
  step: StepRecord;
  installationId: string;
  personId: string;
  names: BenchNames;
  now: number;
  command: BenchCommand;
  people: ReadonlyMap<string, PersonRecord>;
}

/** A step I hold: what it is, its drawing and figures, and the few things to do with it. */
export function InHand(props: Props) {
  const { step, installationId, personId, names, now, command } = props;
  const { bench: words } = useMessages();
  const frame = useFrames(installationId).get(names.frameOf(step))?.geometry;
  const others = step.crew
    .filter((member) => member.personId !== personId)
    .map((member) => names.personName(member.personId));
  const missing = step.crewMin - step.crew.length;
  return (
    <article className="border-b border-rule py-5" aria-label={names.whatOf(step)}>
      <h3 className="bench-code">
        <strong>{names.codeOf(step)}</strong> {step.name}
      </h3>
      <p>{words.place(names.stationOf(step), others)}</p>
      <p className="text-pencil">{timeWords(step, now, names, words)}</p>
      {step.rework && <p className="mt-2 text-rework">{words.why.rework(step.rework.reason)}</p>}
      {step.held && (
        <p className="mt-2 text-rework">
          {names.refusal({ code: 'STEP_HELD', details: { ...step.held } }, step)}
        </p>
      )}
      {frame && (
        <div className="mt-4">
          <UnrolledDrawing
            frame={frame}
            unit={names.unit}
            label={names.whatOf(step)}
            view={step.operation === 'raise' ? 'auto' : 'top'}
          />
          <Figures frame={frame} step={step} names={names} />
        </div>
      )}
      {step.startedAt === null && missing > 0 && <p className="mt-4">{words.handsMissing(missing)}</p>}
      <div className="mt-5 grid gap-4">
        {step.startedAt === null ? (
          <Action
            wide
            size="glove"
            look="main"
            busy={command.busyWith(step.id)}
            reason={missing > 0 ? words.handsMissing(missing) : undefined}
            onClick={() => command.run(step, 'start')}
          >
            {words.start}
          </Action>
        ) : (
          <Action
            wide
            size="glove"
            look="main"
            busy={command.busyWith(step.id)}
            detail={thenWords(step, words)}
            onClick={() => command.run(step, 'finish')}
          >
            {words.finished}
          </Action>
        )}
        <div className="grid grid-cols-2 gap-4">
          <Action
            wide
            size="phone"
            busy={command.busyWith(step.id)}
            onClick={() => command.run(step, 'give-back')}
          >
            {words.giveBack}
          </Action>
          <HandOver {...props} />
        </div>
      </div>
    </article>
  );
}

type Words = ReturnType<typeof useMessages>['bench'];

function timeWords(step: StepRecord, now: number, names: BenchNames, words: Words): string {
  const planned = Math.round(step.plannedSeconds / 60);
  if (step.startedAt === null) return words.takenNotStarted(planned);
  const left = Math.round((step.startedAt + step.plannedSeconds * 1000 - now) / 60_000);
  const since = words.since(formatTime(step.startedAt, names.zone));
  return left > 0 ? `${since}, ${words.minutesLeft(left)}` : `${since}. ${words.longerThanPlanned}`;
}

function thenWords(step: StepRecord, words: Words): string | undefined {
  if (step.clocks) return words.thenDries(Math.round(step.clocks.touchDry / 60));
  return step.needsCheck ? words.someoneChecks : undefined;
}

/** Lengths to cut, or what there is to join. */
function Figures({ frame, step, names }: { frame: Frame; step: StepRecord; names: BenchNames }) {
  const { bench: words } = useMessages();
  const figures = frameFigures(frame);
  if (step.operation !== 'cut' && step.operation !== 'lay out') {
    return <p className="mt-2">{words.counts(figures.joints, figures.struts)}</p>;
  }
  return (
    <ul className="mt-2" aria-label={words.lengths}>
      {figures.lengthClasses.map(({ lengthMm, count }, index) => (
        <li key={lengthMm} className="flex justify-between border-b border-rule py-1">
          <strong>{classLetter(index)}</strong>
          <span>{words.ofLength(count, formatLength(lengthMm, names.unit))}</span>
        </li>
      ))}
    </ul>
  );
}

/** A, B, ... Z, AA, AB in falling length. */
const classLetter = (index: number): string =>
  (index >= 26 ? String.fromCharCode(64 + Math.floor(index / 26)) : '') +
  String.fromCharCode(65 + (index % 26));

function HandOver({ step, installationId, personId, names, people }: Props) {
  const { bench: words, common } = useMessages();
  const [open, setOpen] = useState(false);
  const [to, setTo] = useState('');
  const path = `/installations/${installationId}/steps/${step.id}`;
  const offer = useMutation({
    mutationFn: () => send('POST', `${path}/offer`, { to }),
    onSuccess: () => setOpen(false),
  });
  const withdraw = useMutation({ mutationFn: () => send('POST', `${path}/withdraw`) });
  if (step.handOver?.from === personId) {
    return (
      <div>
        <p>{words.handOver.offeredTo(names.personName(step.handOver.to))}</p>
        <Action look="words" busy={withdraw.isPending} onClick={() => withdraw.mutate()}>
          {words.handOver.takeBack}
        </Action>
      </div>
    );
  }
  const choices = [...people.values()]
    .filter((person) => person.onSite && person.confirmed && !person.removed && person.id !== personId)
    .filter((person) => step.crew.every((member) => member.personId !== person.id))
    .sort((a, b) => a.name.localeCompare(b.name));
  const refusal = offer.error instanceof ApiError ? offer.error : null;
  return (
    <>
      <Action wide size="phone" onClick={() => setOpen(true)}>
        {words.handOver.action}
      </Action>
      <Dialog open={open} title={words.handOver.title} onClose={() => setOpen(false)}>
        <form
          className="grid gap-5"
          onSubmit={(event) => {
            event.preventDefault();
            offer.mutate();
          }}
        >
          <p>{words.handOver.text}</p>
          <SelectField
            label={words.handOver.to}
            size="phone"
            value={to}
            onChange={(event) => setTo(event.target.value)}
            error={
              refusal?.fields[0]?.message ??
              (refusal ? names.refusal(refusal, step) : offer.error ? common.failed : undefined)
            }
          >
            <option value="">{words.handOver.choose}</option>
            {choices.map((person) => (
              <option key={person.id} value={person.id}>
                {person.name}
              </option>
            ))}
          </SelectField>
          <div className="flex flex-wrap items-center gap-5">
            <Action type="submit" size="phone" look="main" busy={offer.isPending}>
              {words.handOver.action}
            </Action>
            <Action look="words" onClick={() => setOpen(false)}>
              {common.cancel}
            </Action>
          </div>
        </form>
      </Dialog>
    </>
  );
}
