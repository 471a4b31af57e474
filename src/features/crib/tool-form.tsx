import { useState } from 'react';
import type { ToolRecord } from '../../../shared/contracts/live';
import { HAZARD_LABELS, HAZARDS } from '../../../shared/safety/hazards';
import { Action } from '../../components/ui/action';
import { CheckField } from '../../components/ui/choices';
import { Dialog } from '../../components/ui/dialog';
import { Field, SelectField } from '../../components/ui/field';
import { Refusal } from '../../components/ui/refusal';
import { useForm } from '../../lib/use-form';

export interface ToolFormProps {
  installationId: string;
  /** Left out for a new one. */
  tool?: ToolRecord;
  /** Kinds that are in the crib already. */
  kinds: readonly string[];
  onClose: () => void;
}

interface Values {
  number: string;
  name: string;
  kind: string;
  hazard: string;
  temperature: string;
  poweredSaw: boolean;
  hot: boolean;
  ladderMm: string;
  watts: string;
  condition: string;
}

const valuesOf = (tool: ToolRecord | undefined): Values => ({
  number: tool?.number ?? '',
  name: tool?.name ?? '',
  kind: tool?.kind ?? '',
  hazard: tool?.hazard ?? '',
  temperature: tool?.traits.temperature ?? '',
  poweredSaw: tool?.traits.poweredSaw ?? false,
  hot: tool?.traits.hot ?? false,
  ladderMm: tool?.traits.ladderHeightMm?.toString() ?? '',
  watts: tool?.traits.watts?.toString() ?? '',
  condition: tool?.condition ?? 'good',
});

const number = (text: string): number | undefined => (text.trim() === '' ? undefined : Number(text));

function bodyOf(values: Values) {
  const watts = number(values.watts);
  const ladderHeightMm = number(values.ladderMm);
  return {
    number: values.number,
    name: values.name,
    kind: values.kind,
    hazard: values.hazard || null,
    traits: {
      ...(values.temperature ? { temperature: values.temperature } : {}),
      ...(values.poweredSaw ? { poweredSaw: true } : {}),
      ...(values.hot ? { hot: true } : {}),
      ...(ladderHeightMm === undefined ? {} : { ladderHeightMm }),
      ...(watts === undefined ? {} : { watts }),
    },
    condition: values.condition,
  };
}

/** A tool's line on the list: what it is called, which sign-off it needs, what the age rules need to know of it. */
export function ToolForm({ installationId, tool, kinds, onClose }: ToolFormProps) {
  const [values, setValues] = useState(() => valuesOf(tool));
  const set = (change: Partial<Values>) => setValues((now) => ({ ...now, ...change }));
  const form = useForm({
    request: () => ({
      method: tool ? 'PUT' : 'POST',
      path: `/installations/${installationId}/tools${tool ? `/${tool.id}` : ''}`,
      body: bodyOf(values),
    }),
    onDone: onClose,
  });
  const { problem } = form;
  return (
    <Dialog open onClose={onClose} title={tool ? `${tool.number} ${tool.name}` : 'A tool more'}>
      <form className="grid gap-4" noValidate onSubmit={form.onSubmit}>
        <Refusal error={form.error} unplaced={form.unplaced} />
        <div className="tool-fields">
          <Field
            label="number"
            autoFocus
            autoCapitalize="characters"
            autoComplete="off"
            value={values.number}
            error={problem('number')}
            onChange={(event) => set({ number: event.target.value })}
          />
          <Field
            label="name"
            value={values.name}
            error={problem('name')}
            onChange={(event) => set({ name: event.target.value })}
          />
          <Field
            label="kind, as steps ask for it"
            list="tool-kinds"
            value={values.kind}
            error={problem('kind')}
            onChange={(event) => set({ kind: event.target.value })}
          />
          <datalist id="tool-kinds">
            {kinds.map((kind) => (
              <option key={kind} value={kind} />
            ))}
          </datalist>
          <SelectField
            label="sign-off it needs"
            value={values.hazard}
            error={problem('hazard')}
            onChange={(event) => set({ hazard: event.target.value })}
          >
            <option value="">none</option>
            {HAZARDS.map((hazard) => (
              <option key={hazard} value={hazard}>
                {HAZARD_LABELS[hazard]}
              </option>
            ))}
          </SelectField>
          <SelectField
            label="glue gun temperature"
            value={values.temperature}
            error={problem('traits.temperature')}
            onChange={(event) => set({ temperature: event.target.value })}
          >
            <option value="">no glue gun</option>
            <option value="high">high</option>
            <option value="low">low</option>
          </SelectField>
          <Field
            label="ladder height"
            optional
            unit="mm"
            inputMode="numeric"
            value={values.ladderMm}
            error={problem('traits.ladderHeightMm')}
            onChange={(event) => set({ ladderMm: event.target.value })}
          />
          <Field
            label="power"
            optional
            unit="W"
            inputMode="numeric"
            value={values.watts}
            error={problem('traits.watts')}
            onChange={(event) => set({ watts: event.target.value })}
          />
          <Field
            label="condition"
            optional
            value={values.condition}
            error={problem('condition')}
            onChange={(event) => set({ condition: event.target.value })}
          />
          <CheckField
            checked={values.poweredSaw}
            onChange={(event) => set({ poweredSaw: event.target.checked })}
          >
            powered saw
          </CheckField>
          <CheckField checked={values.hot} onChange={(event) => set({ hot: event.target.checked })}>
            gets hot
          </CheckField>
        </div>
        <div className="dialog-actions">
          <Action type="submit" look="main" busy={form.busy}>
            {tool ? 'Keep it' : 'Put it on the list'}
          </Action>
          <Action look="plain" onClick={onClose}>
            Leave it
          </Action>
        </div>
      </form>
    </Dialog>
  );
}
