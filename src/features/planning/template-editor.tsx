import { useState } from 'react';
import { flushSync } from 'react-dom';
import type { FrameView } from '../../../shared/contracts/frames';
import { plannedSeconds } from '../../../shared/travellers/minutes';
import { Action } from '../../components/ui/action';
import { Field, SelectField } from '../../components/ui/field';
import { Figures } from '../../components/ui/figures';
import { Refusal } from '../../components/ui/refusal';
import { counted } from '../../lib/formats';
import { useForm } from '../../lib/use-form';
import type { Wish } from '../../lib/use-send';
import { countsOf, totalWords } from './planned-minutes';
import { moveId, StepRow } from './step-row';
import {
  blankStep,
  checkTemplate,
  minutesOf,
  movedStep,
  type DraftStep,
  type TemplateDraft,
} from './template-draft';

export type TemplateEditorProps = {
  initial: TemplateDraft;
  wish: Pick<Wish, 'method' | 'path'>;
  words: string;
  stations: readonly { id: string; name: string }[];
  toolKinds: readonly string[];
  /** For the running example; the first is taken. */
  frames: readonly FrameView[];
  onDone: (reply: { id: string; revision: number }) => unknown;
  onCancel: () => void;
  cancelWords?: string;
  /** Takes the newer state from the server, when somebody else changed the template. */
  onReload?: () => void;
};

/** The steps of a template, in order, with the minutes they take for a frame. */
export function TemplateEditor(props: TemplateEditorProps) {
  const { initial, wish, words, stations, toolKinds, frames, onDone, onCancel, onReload } = props;
  const { cancelWords = 'Leave it' } = props;
  const [draft, setDraft] = useState(initial);
  const [open, setOpen] = useState<ReadonlySet<string>>(new Set());
  const [kept, setKept] = useState<TemplateDraft | null>(null);
  const [told, setTold] = useState('');
  const [frameId, setFrameId] = useState(frames[0]?.id ?? '');
  const form = useForm<{ id: string; revision: number }>({
    request: () => {
      const checked = checkTemplate(draft, new Set(stations.map(({ id }) => id)));
      return 'problems' in checked ? checked : { ...wish, body: checked.body };
    },
    onProblems: (fields) => {
      // A closed step with something wrong in it opens, so that the words stand beside their field.
      const wrong = draft.steps.filter((_, i) => fields.some(({ path }) => path.startsWith(`steps.${i}.`)));
      setOpen((now) => new Set([...now, ...wrong.map(({ key }) => key)]));
    },
    onDone: (reply) => {
      setKept({ ...draft, revision: reply.revision });
      setDraft((now) => ({ ...now, revision: reply.revision }));
      return onDone(reply);
    },
  });
  const { steps } = draft;
  const isKept = kept?.name === draft.name && kept.steps === draft.steps;
  const setSteps = (next: readonly DraftStep[]) => setDraft((now) => ({ ...now, steps: next }));
  const frame = frames.find(({ id }) => id === frameId);
  const secondsOf = (step: DraftStep): number | null => {
    const minutes = minutesOf(step);
    return frame && minutes ? plannedSeconds(minutes, countsOf(frame)) : null;
  };
  const seconds = steps.map(secondsOf);
  const move = (index: number, by: 1 | -1) => {
    const step = steps[index];
    if (!step) return;
    const next = movedStep(steps, index, by);
    const at = next.indexOf(step);
    flushSync(() => {
      setSteps(next);
      setTold(`${step.name || step.operation} is now step ${at + 1} of ${next.length}.`);
    });
    // The browser lets go of what was moved; at either end the other button takes over.
    const ends = at === 0 ? 1 : at === next.length - 1 ? -1 : by;
    document.getElementById(moveId(step.key, ends))?.focus();
  };
  const add = () => {
    const step = blankStep(stations[0]?.id ?? '');
    flushSync(() => {
      setSteps([...steps, step]);
      setOpen((now) => new Set([...now, step.key]));
    });
    document.getElementById(`${step.key}-fields`)?.querySelector('input')?.focus();
  };
  const remove = (step: DraftStep) => {
    setSteps(steps.filter((other) => other !== step));
    setTold(`${step.name || step.operation} is taken out. ${counted(steps.length - 1, 'step')} left.`);
    document.getElementById('template-steps')?.focus();
  };
  const toggle = (key: string) =>
    setOpen((now) => new Set(now.has(key) ? [...now].filter((one) => one !== key) : [...now, key]));
  const frameCounts = frame && countsOf(frame);
  return (
    <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
      <Refusal error={form.error} unplaced={form.unplaced} onReload={onReload} />
      <div className="grid items-start gap-x-6 gap-y-4 sm:grid-cols-2">
        <Field
          label="name of the template"
          value={draft.name}
          onChange={(event) => setDraft({ ...draft, name: event.target.value })}
          error={form.problem('name')}
        />
        {frames.length > 0 && (
          <SelectField
            label="minutes are shown for"
            value={frameId}
            onChange={(event) => setFrameId(event.target.value)}
            hint={
              frameCounts && `${counted(frameCounts.cuts, 'cut')}, ${counted(frameCounts.joints, 'joint')}`
            }
          >
            {frames.map(({ id, name }) => (
              <option key={id} value={id}>
                {name}
              </option>
            ))}
          </SelectField>
        )}
      </div>
      <ol id="template-steps" tabIndex={-1} className="template-steps" aria-label="Steps in order">
        {steps.map((step, i) => (
          <StepRow
            key={step.key}
            step={step}
            index={i}
            count={steps.length}
            seconds={seconds[i] ?? null}
            stations={stations}
            toolKinds={toolKinds}
            open={open.has(step.key)}
            problem={(path) => form.problem(`steps.${i}.${path}`)}
            onToggle={() => toggle(step.key)}
            onMove={(by) => move(i, by)}
            onRemove={() => remove(step)}
            onChange={(part) =>
              setSteps(steps.map((other) => (other === step ? { ...other, ...part } : other)))
            }
          />
        ))}
      </ol>
      <p className="flex justify-between gap-4">
        <span>{counted(steps.length, 'step')}</span>
        {frame && (
          <strong>
            <Figures>{totalWords(seconds.map((one) => one ?? 0))}</Figures>
          </strong>
        )}
      </p>
      <p className="sr-only" role="status">
        {told}
      </p>
      <div className="flex flex-wrap items-center gap-x-6 gap-y-2">
        <Action reason={steps.length >= 20 ? 'A traveller has at most 20 steps.' : undefined} onClick={add}>
          Add a step
        </Action>
        <Action type="submit" look="main" busy={form.busy}>
          {words}
        </Action>
        <span role="status">{isKept ? 'Kept.' : ''}</span>
        <Action look="words" onClick={onCancel}>
          {cancelWords}
        </Action>
      </div>
    </form>
  );
}
