import { useState } from 'react';
import { buildDaySchema, type BuildDayInput } from '../../../shared/contracts/installations';
import { Action } from '../../components/ui/action';
import { DayRuler } from '../../components/ui/day-ruler';
import { Field } from '../../components/ui/field';
import { Refusal } from '../../components/ui/refusal';
import { checkInput } from '../../lib/check-input';
import { useForm } from '../../lib/use-form';
import type { Wish } from '../../lib/use-send';

const TIMES = [
  ['doors', 'doors open'],
  ['start', 'start'],
  ['clearUp', 'clear-up'],
  ['end', 'end'],
] as const;

const isTime = (text: string): boolean => /^\d{2}:\d{2}$/.test(text);

/** The ruler of what is typed so far; a break that is half typed is left out. */
export function DayPreview({ day }: { day: BuildDayInput }) {
  const { doors, start, clearUp, end } = day;
  const inOrder =
    [doors, start, clearUp, end].every(isTime) && doors <= start && start < clearUp && clearUp < end;
  if (!inOrder)
    return <p className="text-pencil">The ruler of the day is drawn here once its times are in order.</p>;
  const breaks = day.breaks.filter(({ from, to }) => isTime(from) && isTime(to) && from < to);
  return <DayRuler doors={doors} start={start} clearUp={clearUp} end={end} breaks={breaks} />;
}

/** A build day: date, times, breaks, and the ruler they make. */
export function BuildDayForm({
  initial,
  wish,
  words,
  onDone,
  onCancel,
}: {
  initial: BuildDayInput;
  /** Where it goes; the body is made here. */
  wish: Pick<Wish, 'method' | 'path'>;
  words: string;
  onDone: () => void;
  onCancel?: () => void;
}) {
  const [day, setDay] = useState(initial);
  const form = useForm({
    request: () => {
      const checked = checkInput(buildDaySchema, day);
      return 'problems' in checked ? checked : { ...wish, body: checked.body };
    },
    onDone,
  });
  const set = (part: Partial<BuildDayInput>) => setDay({ ...day, ...part });
  const setBreak = (index: number, part: Partial<BuildDayInput['breaks'][number]>) =>
    set({ breaks: day.breaks.map((pause, i) => (i === index ? { ...pause, ...part } : pause)) });
  return (
    <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
      <Refusal error={form.error} unplaced={form.unplaced} />
      <div className="grid grid-cols-2 items-start gap-5 desk:grid-cols-[11rem_repeat(4,8rem)]">
        <Field
          className="col-span-2 desk:col-span-1"
          label="date"
          type="date"
          value={day.date}
          onChange={(event) => set({ date: event.target.value })}
          error={form.problem('date')}
        />
        {TIMES.map(([key, label]) => (
          <Field
            key={key}
            label={label}
            type="time"
            value={day[key]}
            onChange={(event) => set({ [key]: event.target.value })}
            error={form.problem(key)}
          />
        ))}
      </div>
      <fieldset className="grid gap-3">
        <legend className="field-label">breaks</legend>
        {day.breaks.map((pause, i) => (
          <div
            key={i}
            className="grid grid-cols-2 items-start gap-x-5 gap-y-2 sm:grid-cols-[8rem_8rem_minmax(0,14rem)_auto]"
          >
            <Field
              label={`break ${i + 1} from`}
              type="time"
              value={pause.from}
              onChange={(event) => setBreak(i, { from: event.target.value })}
              error={form.problem(`breaks.${i}.from`)}
            />
            <Field
              label="to"
              type="time"
              value={pause.to}
              onChange={(event) => setBreak(i, { to: event.target.value })}
              error={form.problem(`breaks.${i}.to`)}
            />
            <Field
              label="called"
              value={pause.label}
              onChange={(event) => setBreak(i, { label: event.target.value })}
              error={form.problem(`breaks.${i}.label`)}
            />
            <Action
              className="sm:mt-6"
              look="words"
              label={`Take out break ${i + 1}`}
              onClick={() => set({ breaks: day.breaks.filter((_, other) => other !== i) })}
            >
              Take out
            </Action>
          </div>
        ))}
        <div>
          <Action
            look="plain"
            reason={day.breaks.length >= 12 ? 'A day has at most 12 breaks.' : undefined}
            onClick={() => set({ breaks: [...day.breaks, { from: '', to: '', label: 'break' }] })}
          >
            Add a break
          </Action>
        </div>
      </fieldset>
      <DayPreview day={day} />
      <div className="flex flex-wrap items-center gap-6">
        <Action type="submit" look="main" busy={form.busy}>
          {words}
        </Action>
        {onCancel && (
          <Action look="words" onClick={onCancel}>
            Leave it as it was
          </Action>
        )}
      </div>
    </form>
  );
}
