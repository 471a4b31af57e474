import { useId } from 'react';
import { HAZARD_LABELS, HAZARDS, type Hazard } from '../../../shared/safety';
import { OPERATIONS, type Operation } from '../../../shared/travellers/step';
import { CheckField } from '../../components/ui/choices';
import { Field, SelectField } from '../../components/ui/field';
import { CLOCKS, type DraftStep } from './template-draft';

export type StepFieldsProps = {
  step: DraftStep;
  stations: readonly { id: string; name: string }[];
  /** Kinds of tool that the crib has. */
  toolKinds: readonly string[];
  onChange: (part: Partial<DraftStep>) => void;
  /** By the path inside the step: `crewMax`, `minutes.fixed`. */
  problem: (path: string) => string | undefined;
};

/** Everything about one step of a template. */
export function StepFields({ step, stations, toolKinds, onChange, problem }: StepFieldsProps) {
  const kinds = useId();
  const text = (key: 'name' | 'tools' | 'crewMin' | 'crewMax' | 'fixed' | 'perCut' | 'perJoint') => ({
    value: step[key],
    autoComplete: 'off',
    onChange: (event: { target: { value: string } }) => onChange({ [key]: event.target.value }),
  });
  const setHazard = (hazard: Hazard, on: boolean) =>
    onChange({ hazards: HAZARDS.filter((one) => (one === hazard ? on : step.hazards.includes(one))) });
  return (
    <div className="grid gap-5">
      <div className="grid items-start gap-x-5 gap-y-4 sm:grid-cols-3">
        <Field label="name" {...text('name')} error={problem('name')} />
        <SelectField
          label="operation"
          value={step.operation}
          onChange={(event) => onChange({ operation: event.target.value as Operation })}
          error={problem('operation')}
        >
          {OPERATIONS.map((operation) => (
            <option key={operation}>{operation}</option>
          ))}
        </SelectField>
        <SelectField
          label="station"
          value={stations.some(({ id }) => id === step.stationId) ? step.stationId : ''}
          onChange={(event) => onChange({ stationId: event.target.value })}
          error={problem('stationId')}
        >
          <option value="">choose a station</option>
          {stations.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </SelectField>
      </div>
      <div className="grid grid-cols-2 items-start gap-x-5 gap-y-4 sm:grid-cols-5">
        <Field
          label="minutes, fixed"
          unit="min"
          inputMode="decimal"
          {...text('fixed')}
          error={problem('minutes.fixed')}
        />
        <Field
          label="and per cut"
          unit="min"
          inputMode="decimal"
          {...text('perCut')}
          error={problem('minutes.perCut')}
        />
        <Field
          label="and per joint"
          unit="min"
          inputMode="decimal"
          {...text('perJoint')}
          error={problem('minutes.perJoint')}
        />
        <Field label="crew, at least" inputMode="numeric" {...text('crewMin')} error={problem('crewMin')} />
        <Field label="crew, at most" inputMode="numeric" {...text('crewMax')} error={problem('crewMax')} />
      </div>
      <fieldset>
        <legend className="field-label">hazards; each needs a briefing that is signed off</legend>
        <div className="flex flex-wrap gap-x-8">
          {HAZARDS.map((hazard) => (
            <CheckField
              key={hazard}
              checked={step.hazards.includes(hazard)}
              onChange={(event) => setHazard(hazard, event.target.checked)}
            >
              {HAZARD_LABELS[hazard]}
            </CheckField>
          ))}
        </div>
      </fieldset>
      <Field
        label="tools"
        optional
        list={kinds}
        {...text('tools')}
        error={problem('toolKinds') ?? problem('toolKinds.0')}
        hint="Kinds, parted by commas: hot-glue gun, brush."
      />
      <datalist id={kinds}>
        {toolKinds.map((kind) => (
          <option key={kind} value={kind} />
        ))}
      </datalist>
      <div className="flex flex-wrap gap-x-8">
        <CheckField
          checked={step.needsCheck}
          onChange={(event) => onChange({ needsCheck: event.target.checked })}
        >
          Somebody else checks it
        </CheckField>
        <CheckField checked={step.dries} onChange={(event) => onChange({ dries: event.target.checked })}>
          It dries afterwards
        </CheckField>
      </div>
      {step.dries && (
        <fieldset className="grid gap-2">
          <legend className="field-label">
            clocks from the finish, as the paint’s data sheet has them; only the first is needed
          </legend>
          <div className="grid grid-cols-2 items-start gap-x-5 gap-y-4 sm:grid-cols-5">
            {CLOCKS.map(({ key, label, hint }) => (
              <Field
                key={key}
                label={label}
                unit="min"
                inputMode="decimal"
                autoComplete="off"
                value={step.clocks[key]}
                onChange={(event) => onChange({ clocks: { ...step.clocks, [key]: event.target.value } })}
                error={problem(`clocks.${key}`)}
                hint={hint || undefined}
              />
            ))}
          </div>
        </fieldset>
      )}
    </div>
  );
}
