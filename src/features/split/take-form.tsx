import { useState } from 'react';
import { takeSplitSchema, type SplitView } from '../../../shared/contracts/split';
import { Action } from '../../components/ui/action';
import { OptionStruts } from '../../components/ui/choices';
import { Field, SelectField } from '../../components/ui/field';
import { Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { checkInput } from '../../lib/check-input';
import { counted } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import { useForm } from '../../lib/use-form';
import { useTemplateNames } from './queries';

interface Taken {
  added: string[];
  redrawn: string[];
  unchanged: number;
  removed: string[];
  fieldJoints: number;
  leftOver: string[];
}

/** Makes travellers from the proposal. */
export function TakeForm({
  installationId,
  split,
  onTaken,
}: {
  installationId: string;
  split: SplitView;
  onTaken: (words: string) => unknown;
}) {
  const templates = useTemplateNames(installationId);
  const stations = useLiveMap(installationId, 'stations');
  const open = [...stations.values()]
    .filter((station) => !station.removed)
    .sort((a, b) => a.position - b.position);
  const [templateId, setTemplateId] = useState('');
  const [letter, setLetter] = useState('');
  const [name, setName] = useState('');
  const [stationId, setStationId] = useState('');
  const [begun, setBegun] = useState<'refuse' | 'leave'>('refuse');
  const hanging = open.find((station) => station.kind.includes('hang'));
  const form = useForm<Taken>({
    request: () => {
      const checked = checkInput(takeSplitSchema, {
        templateId: templateId || (templates.data?.[0]?.id ?? ''),
        letter,
        name,
        stationId: stationId || (hanging?.id ?? open[0]?.id ?? ''),
        begun,
        revision: split.revision,
      });
      return 'problems' in checked
        ? checked
        : { method: 'POST', path: `/installations/${installationId}/split/take`, body: checked.body };
    },
    onDone: (reply) => onTaken(takenWords(reply)),
  });
  if (templates.data?.length === 0) {
    return (
      <Note
        kind="ask"
        title="There is no template yet."
        actions={<Action to={`/i/${installationId}/templates`}>Make a template</Action>}
      >
        Travellers are made from one.
      </Note>
    );
  }
  return (
    <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
      <Refusal error={form.error} unplaced={form.unplaced} />
      <SelectField
        label="template of the steps"
        value={templateId}
        onChange={(event) => setTemplateId(event.target.value)}
        error={form.problem('templateId')}
      >
        {templates.data?.map((template) => (
          <option key={template.id} value={template.id}>
            {template.name}
          </option>
        ))}
      </SelectField>
      <div className="grid grid-cols-2 items-start gap-5">
        <Field
          label="name of the pieces"
          value={name}
          onChange={(event) => setName(event.target.value)}
          error={form.problem('name')}
          hint="They are numbered: Bay 1, Bay 2."
        />
        <Field
          label="letter of the code"
          maxLength={2}
          autoComplete="off"
          value={letter}
          onChange={(event) => setLetter(event.target.value.toUpperCase())}
          error={form.problem('letter')}
          hint="J is for the field joints."
        />
      </div>
      <SelectField
        label="where pieces are joined on site"
        value={stationId || (hanging?.id ?? '')}
        onChange={(event) => setStationId(event.target.value)}
        error={form.problem('stationId')}
      >
        {open.map((station) => (
          <option key={station.id} value={station.id}>
            {station.name}
          </option>
        ))}
      </SelectField>
      <OptionStruts<'refuse' | 'leave'>
        legend="if work has begun on a piece that would change"
        columns={1}
        value={begun}
        onChange={setBegun}
        options={[
          { value: 'refuse', label: 'change nothing, and name the pieces' },
          { value: 'leave', label: 'leave those pieces as they are, change the rest' },
        ]}
      />
      <p className="text-small text-pencil">
        Joining on site is often ladder work over people. Local codes and a competent person decide how it is
        done.
      </p>
      <div>
        <Action type="submit" look="main" busy={form.busy} disabled={split.outOfDate}>
          {`Make ${counted(split.plan.pieces.length, 'traveller')}`}
        </Action>
      </div>
    </form>
  );
}

function takenWords({ added, redrawn, unchanged, removed, fieldJoints, leftOver }: Taken): string {
  const parts = [
    added.length > 0 ? `${counted(added.length, 'piece')} made` : '',
    redrawn.length > 0 ? `${redrawn.join(', ')} redrawn` : '',
    unchanged > 0 ? `${counted(unchanged, 'piece')} unchanged` : '',
    removed.length > 0 ? `${removed.join(', ')} taken out` : '',
    counted(fieldJoints, 'field joint'),
    leftOver.length > 0 ? `${leftOver.join(', ')} left, because work has begun there` : '',
  ];
  return `${parts.filter((part) => part !== '').join('; ')}.`;
}
