import { useMemo, useState } from 'react';
import type { FrameView } from '../../../shared/contracts/frames';
import { createSubAssembliesSchema, type TemplateView } from '../../../shared/contracts/travellers';
import { wireframeThumbnail } from '../../../shared/frames/flat-drawing';
import { Action } from '../../components/ui/action';
import { Field, SelectField } from '../../components/ui/field';
import { Figures } from '../../components/ui/figures';
import { Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { WireSketch } from '../../components/ui/unrolled-drawing';
import { checkInput, typedNumber } from '../../lib/check-input';
import { counted, formatDuration } from '../../lib/formats';
import { useForm } from '../../lib/use-form';
import { nextCodes } from './next-codes';
import { secondsPerStep, totalWords } from './planned-minutes';

export type CreatePiecesFormProps = {
  installationId: string;
  frames: readonly FrameView[];
  templates: readonly TemplateView[];
  /** Codes of all pieces, those taken out included. */
  codes: readonly string[];
};

const rangeWords = (codes: readonly string[]): string => {
  const [first = '', last] = [codes[0], codes.at(-1)];
  return last === undefined || last === first ? first : `${first} to ${last}`;
};

/** Pieces from a frame and a template, with what they would be before they are made. */
export function CreatePiecesForm({ installationId, frames, templates, codes }: CreatePiecesFormProps) {
  const [frameId, setFrameId] = useState(frames[0]?.id ?? '');
  const [templateId, setTemplateId] = useState(templates[0]?.id ?? '');
  const [letter, setLetter] = useState('');
  const [name, setName] = useState('');
  const [quantity, setQuantity] = useState('1');
  const [made, setMade] = useState<readonly string[] | null>(null);
  const frame = frames.find(({ id }) => id === frameId);
  const template = templates.find(({ id }) => id === templateId);
  const coming = nextCodes(letter, typedNumber(quantity) ?? 0, codes);
  const form = useForm<{ codes: string[] }>({
    request: () => {
      const checked = checkInput(createSubAssembliesSchema, {
        frameId,
        templateId,
        letter,
        // The frame's name stands in the empty field, so it is what an empty field means.
        name: name.trim() === '' ? (frame?.name ?? '') : name,
        quantity: typedNumber(quantity),
      });
      return 'problems' in checked
        ? checked
        : { method: 'POST', path: `/installations/${installationId}/sub-assemblies`, body: checked.body };
    },
    onDone: (reply) => {
      setMade(reply.codes);
      setName('');
    },
  });
  return (
    <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
      {made && (
        <Note kind="done" title={`${rangeWords(made)} ${made.length === 1 ? 'is' : 'are'} made.`}>
          Each with a traveller of its own.
        </Note>
      )}
      <Refusal error={form.error} unplaced={form.unplaced} />
      <SelectField
        label="frame"
        value={frameId}
        onChange={(event) => setFrameId(event.target.value)}
        error={form.problem('frameId')}
      >
        {frames.map(({ id, name: frameName }) => (
          <option key={id} value={id}>
            {frameName}
          </option>
        ))}
      </SelectField>
      <SelectField
        label="template of its steps"
        value={templateId}
        onChange={(event) => setTemplateId(event.target.value)}
        error={form.problem('templateId')}
      >
        {templates.map(({ id, name: templateName }) => (
          <option key={id} value={id}>
            {templateName}
          </option>
        ))}
      </SelectField>
      <Field
        label="name of the piece"
        placeholder={frame?.name}
        value={name}
        onChange={(event) => setName(event.target.value)}
        error={form.problem('name')}
        hint="Left empty it is the frame's. Several are numbered: North bay 1, North bay 2."
      />
      <div className="grid grid-cols-2 items-start gap-5">
        <Field
          label="letter of the code"
          maxLength={2}
          autoComplete="off"
          value={letter}
          onChange={(event) => setLetter(event.target.value.toUpperCase())}
          error={form.problem('letter')}
          hint="Not O, I, B, D, P: they are misheard."
        />
        <Field
          label="how many"
          unit="pieces"
          inputMode="numeric"
          value={quantity}
          onChange={(event) => setQuantity(event.target.value)}
          error={form.problem('quantity')}
        />
      </div>
      {frame && template && <Coming frame={frame} template={template} codes={coming} />}
      <div>
        <Action type="submit" look="main" busy={form.busy}>
          {coming.length > 1 ? `Make ${coming.length} pieces` : 'Make the piece'}
        </Action>
      </div>
    </form>
  );
}

/** What would be made: codes, steps, minutes. */
function Coming({
  frame,
  template,
  codes,
}: {
  frame: FrameView;
  template: TemplateView;
  codes: readonly string[];
}) {
  const sketch = useMemo(() => wireframeThumbnail(frame.geometry, 96, 72), [frame.geometry]);
  const seconds = secondsPerStep(template.steps, frame);
  return (
    <section className="grid gap-3 border-y border-rule py-3" aria-label="What would be made">
      <div className="flex items-center gap-4">
        <WireSketch path={sketch} width={96} height={72} />
        <div>
          <p className="font-semibold" role="status">
            {codes.length > 0 ? rangeWords(codes) : 'Give it a letter'}
          </p>
          <p className="text-small">{`${totalWords(seconds)} each, ${counted(template.steps.length, 'step')}`}</p>
          {codes.length > 1 && (
            <p className="text-small">{`${totalWords(seconds.map((one) => one * codes.length))} in all`}</p>
          )}
        </div>
      </div>
      <ol className="grid grid-cols-[1fr_auto] gap-x-4 gap-y-1 text-small">
        {template.steps.map((step, i) => (
          <li key={i} className="contents">
            <span>{step.name}</span>
            <span className="text-right">
              <Figures>{formatDuration(seconds[i] ?? 0)}</Figures>
            </span>
          </li>
        ))}
      </ol>
      <p className="text-small text-pencil">Minutes of hands at work; drying comes on top.</p>
    </section>
  );
}
