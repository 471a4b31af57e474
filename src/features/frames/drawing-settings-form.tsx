import { useState } from 'react';
import { drawingSettingsSchema, type DrawingView } from '../../../shared/contracts/drawing';
import type { FieldProblem } from '../../../shared/contracts/errors';
import { densityOf, SPECIES } from '../../../shared/frames';
import { parseLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { Action } from '../../components/ui/action';
import { Field, SelectField } from '../../components/ui/field';
import { Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { checkInput } from '../../lib/check-input';
import { typedLength } from '../../lib/formats';
import { useForm } from '../../lib/use-form';

const LENGTHS = [
  { key: 'strutDiameterMm', label: 'diameter of the sticks', hint: '' },
  { key: 'joinWithinMm', label: 'joints are one within', hint: 'Of two frames that touch.' },
  { key: 'cutWithinMm', label: 'lengths are one within', hint: 'What the saw cannot tell apart.' },
] as const;
type LengthKey = (typeof LENGTHS)[number]['key'];

/** What turns the drawing's lines into wood. */
export function DrawingSettingsForm({
  installationId,
  unit,
  view,
  mayEdit,
  onSaved,
}: {
  installationId: string;
  unit: LengthUnit;
  view: DrawingView;
  mayEdit: boolean;
  onSaved: () => unknown;
}) {
  const { settings } = view;
  const [texts, setTexts] = useState<Record<LengthKey, string>>({
    strutDiameterMm: typedLength(settings.strutDiameterMm, unit),
    joinWithinMm: typedLength(settings.joinWithinMm, unit),
    cutWithinMm: typedLength(settings.cutWithinMm, unit),
  });
  const [species, setSpecies] = useState(settings.species);
  const [cutAs, setCutAs] = useState(settings.cutAs);
  const [kept, setKept] = useState(false);
  const form = useForm({
    request: () => {
      const problems: FieldProblem[] = [];
      const mm = (key: LengthKey): number => {
        const read = parseLength(texts[key], unit);
        if (read === null)
          problems.push({
            path: key,
            code: 'length',
            message: 'This is no length. Write it as 8, 8 mm or 5/16 in.',
          });
        return read ?? Number.NaN;
      };
      const input = {
        strutDiameterMm: mm('strutDiameterMm'),
        joinWithinMm: mm('joinWithinMm'),
        cutWithinMm: mm('cutWithinMm'),
        species,
        cutAs,
        revision: view.settingsRevision,
      };
      const checked = checkInput(drawingSettingsSchema, input, problems);
      return 'problems' in checked
        ? checked
        : { method: 'PUT', path: `/installations/${installationId}/drawing/settings`, body: checked.body };
    },
    onDone: async () => {
      setKept(true);
      await onSaved();
    },
  });
  const wood = SPECIES.find(({ key }) => key === species);
  return (
    <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
      {kept && <Note kind="done" title="Kept." />}
      <Refusal error={form.error} unplaced={form.unplaced} />
      {LENGTHS.map(({ key, label, hint }) => (
        <Field
          key={key}
          label={label}
          hint={hint || undefined}
          disabled={!mayEdit}
          value={texts[key]}
          onChange={(event) => setTexts({ ...texts, [key]: event.target.value })}
          error={form.problem(key)}
        />
      ))}
      <SelectField
        label="wood"
        value={species}
        disabled={!mayEdit}
        onChange={(event) => setSpecies(event.target.value)}
        error={form.problem('species')}
        hint={wood ? `${Math.round(densityOf(species))} kg/m³ at 12 % moisture; ${wood.source}` : undefined}
      >
        {SPECIES.map(({ key, name }) => (
          <option key={key} value={key}>
            {name}
          </option>
        ))}
      </SelectField>
      <SelectField
        label="struts are cut"
        value={cutAs}
        disabled={!mayEdit}
        onChange={(event) => setCutAs(event.target.value === 'centre' ? 'centre' : 'set back')}
        error={form.problem('cutAs')}
        hint="Make a test piece first, whichever you choose."
      >
        <option value="centre">from centre to centre of the joints</option>
        <option value="set back">set back, so that they clear each other</option>
      </SelectField>
      {mayEdit && (
        <div>
          <Action type="submit" busy={form.busy}>
            Keep these
          </Action>
        </div>
      )}
    </form>
  );
}
