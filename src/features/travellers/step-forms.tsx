import { useState } from 'react';
import type { PersonRecord, StepRecord } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { CheckField } from '../../components/ui/choices';
import { Field, SelectField, TextArea } from '../../components/ui/field';
import { FieldError } from '../../components/ui/measured';
import { Refusal } from '../../components/ui/refusal';
import { useForm } from '../../lib/use-form';
import type { Deed } from './step-actions';

/** Deeds that need a word with them. */
export type FormDeed = Extract<
  Deed,
  'offer' | 'rework' | 'hold' | 'release' | 'still-wet' | 'end-drying' | 'record'
>;
const FORM_DEEDS: readonly Deed[] = [
  'offer',
  'rework',
  'hold',
  'release',
  'still-wet',
  'end-drying',
  'record',
];
export const needsForm = (deed: Deed): deed is FormDeed => FORM_DEEDS.includes(deed);

export interface StepFormProps {
  deed: FormDeed;
  step: StepRecord;
  /** Steps of the traveller, in order. */
  traveller: readonly StepRecord[];
  /** `/installations/…/steps/…` */
  path: string;
  /** Present people, by name. */
  people: readonly PersonRecord[];
  onClose: () => void;
}

interface Fields {
  /** The words for a field that is wrong. */
  problem: (path: string) => string | undefined;
  step: StepRecord;
  traveller: readonly StepRecord[];
  people: readonly PersonRecord[];
  values: Values;
  set: (change: Partial<Values>) => void;
}

interface Values {
  text: string;
  choice: string;
  minutes: string;
  crew: ReadonlySet<string>;
}

const whole = (text: string): number => (text.trim() === '' ? Number.NaN : Number(text));

function bodyOf(deed: FormDeed, { text, choice, minutes, crew }: Values): object {
  switch (deed) {
    case 'offer':
      return { to: choice };
    case 'rework':
      return { reason: text, targetId: choice };
    case 'hold':
    case 'end-drying':
      return { reason: text };
    case 'release':
      return { note: text };
    case 'still-wet':
      return { minutes: whole(minutes) };
    case 'record':
      return { crew: [...crew], minutesAgo: whole(minutes) };
  }
}

/** What the button says that sends it. */
const SEND_WORDS: Record<FormDeed, string> = {
  offer: 'Offer it',
  rework: 'Send back',
  hold: 'Hold it',
  release: 'Release it',
  'still-wet': 'Still wet',
  'end-drying': 'End the drying now',
  record: 'Record it',
};

/** The form of one deed, under the step it belongs to. */
export function StepForm({ deed, step, traveller, path, people, onClose }: StepFormProps) {
  const [values, setValues] = useState<Values>({
    text: '',
    choice: deed === 'rework' ? step.id : '',
    minutes: deed === 'still-wet' ? '20' : '0',
    crew: new Set(),
  });
  const { onSubmit, problem, busy, error, unplaced } = useForm({
    request: () => ({ method: 'POST', path: `${path}/${deed}`, body: bodyOf(deed, values) }),
    onDone: onClose,
  });
  const set = (change: Partial<Values>) => setValues((now) => ({ ...now, ...change }));
  return (
    <form className="step-form" noValidate onSubmit={onSubmit}>
      <Refusal error={error} unplaced={unplaced} />
      <DeedFields deed={deed} {...{ step, traveller, people, values, set }} problem={problem} />
      <div className="flex flex-wrap items-center gap-4">
        <Action type="submit" look="main" busy={busy}>
          {SEND_WORDS[deed]}
        </Action>
        <Action look="words" onClick={onClose}>
          Leave it
        </Action>
      </div>
    </form>
  );
}

function DeedFields({ deed, ...fields }: Fields & { deed: FormDeed }) {
  switch (deed) {
    case 'offer':
      return <OfferFields {...fields} />;
    case 'rework':
      return <ReworkFields {...fields} />;
    case 'record':
      return <RecordFields {...fields} />;
    case 'still-wet':
      return (
        <Field
          label="how much longer"
          unit="min"
          inputMode="numeric"
          autoFocus
          value={fields.values.minutes}
          onChange={(event) => fields.set({ minutes: event.target.value })}
          error={fields.problem('minutes')}
          hint="Everything that dries at this station gets as much longer: it is as damp for the others."
        />
      );
    case 'hold':
      return <Why {...fields} label="why it is held" path="reason" />;
    case 'end-drying':
      return <Why {...fields} label="why it is dry before its clock" path="reason" />;
    case 'release':
      return <Why {...fields} label="what was done about it" path="note" />;
  }
}

function Why({ problem, values, set, label, path }: Fields & { label: string; path: string }) {
  return (
    <TextArea
      label={label}
      rows={2}
      autoFocus
      value={values.text}
      onChange={(event) => set({ text: event.target.value })}
      error={problem(path)}
    />
  );
}

function OfferFields({ problem, step, people, values, set }: Fields) {
  return (
    <SelectField
      label="to whom"
      autoFocus
      value={values.choice}
      onChange={(event) => set({ choice: event.target.value })}
      error={problem('to')}
      hint="They have to accept it, and pass the same gates as for a claim."
    >
      <option value="">Choose a person</option>
      {people
        .filter((person) => step.crew.every((member) => member.personId !== person.id))
        .map((person) => (
          <option key={person.id} value={person.id}>
            {person.name}, {person.number}
          </option>
        ))}
    </SelectField>
  );
}

function ReworkFields(fields: Fields) {
  const { problem, step, traveller, values, set } = fields;
  return (
    <>
      <Why {...fields} label="what is wrong" path="reason" />
      <SelectField
        label="back to"
        value={values.choice}
        onChange={(event) => set({ choice: event.target.value })}
        error={problem('targetId')}
        hint="Steps after it wait again."
      >
        {traveller
          .filter((other) => other.position <= step.position)
          .map((other) => (
            <option key={other.id} value={other.id}>
              {other.name}
              {other.id === step.id ? ' (this step)' : ''}
            </option>
          ))}
      </SelectField>
    </>
  );
}

function RecordFields({ problem, people, values, set }: Fields) {
  const wrongCrew = problem('crew');
  return (
    <>
      <p>
        What was done already is taken down as it was. It goes to a check, and a rule it broke is flagged for
        the checker.
      </p>
      <fieldset className="options record-crew">
        <legend className="field-label">who did it</legend>
        {wrongCrew && <FieldError id="record-crew-problem">{wrongCrew}</FieldError>}
        <div className="record-people">
          {people.map((person) => (
            <CheckField
              key={person.id}
              checked={values.crew.has(person.id)}
              onChange={(event) => {
                const crew = new Set(values.crew);
                if (event.target.checked) crew.add(person.id);
                else crew.delete(person.id);
                set({ crew });
              }}
            >
              {person.name}, {person.number}
            </CheckField>
          ))}
        </div>
      </fieldset>
      <Field
        label="how long ago"
        unit="min"
        inputMode="numeric"
        value={values.minutes}
        onChange={(event) => set({ minutes: event.target.value })}
        error={problem('minutesAgo')}
      />
    </>
  );
}
