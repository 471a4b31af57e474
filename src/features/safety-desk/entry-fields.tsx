import { useState } from 'react';
import type { SourceNote, Statement } from '../../../shared/safety';
import { HARMS, SIGNAL_WORD_OF } from '../../../shared/safety/signal-words';
import { Action } from '../../components/ui/action';
import { CheckField } from '../../components/ui/choices';
import { Field, SelectField, TextArea } from '../../components/ui/field';
import { FieldError } from '../../components/ui/measured';
import { SignalPanel } from '../../components/ui/signal-panel';
import { EntryList } from './entry-list';
import { entryId, type DraftPanel, type DraftQuestion } from './version-draft';

/** The words for a field of one entry, by its path inside the entry. */
type Problem = (path: string) => string | undefined;

/** A signal panel: the words, and beside them the panel as people see it. */
export function PanelFields({
  panel,
  sources,
  problem,
  onChange,
}: {
  panel: DraftPanel;
  sources: readonly SourceNote[];
  problem: Problem;
  onChange: (part: Partial<DraftPanel>) => void;
}) {
  const lines = panel.avoid.split('\n').filter((line) => line.trim() !== '');
  const wrongLine = lines.map((_, i) => problem(`avoid.${i}`)).find((words) => words !== undefined);
  return (
    <div className="panel-fields">
      <div className="grid gap-4">
        <SelectField
          label="signal word, by the harm when it is not avoided"
          value={panel.harm}
          onChange={(event) => {
            const harm = HARMS.find((one) => one === event.target.value);
            if (harm) onChange({ harm });
          }}
          error={problem('signalWord') ?? problem('harm')}
        >
          {HARMS.map((harm) => (
            <option key={harm} value={harm}>
              {SIGNAL_WORD_OF[harm]}: {harm}
            </option>
          ))}
        </SelectField>
        <TextArea
          label="the hazard"
          rows={2}
          value={panel.headline}
          onChange={(event) => onChange({ headline: event.target.value })}
          error={problem('headline')}
        />
        <TextArea
          label="what happens"
          rows={2}
          value={panel.consequence}
          onChange={(event) => onChange({ consequence: event.target.value })}
          error={problem('consequence')}
        />
        <TextArea
          label="how to avoid it"
          hint="One line for each thing to do."
          rows={Math.max(2, lines.length + 1)}
          value={panel.avoid}
          onChange={(event) => onChange({ avoid: event.target.value })}
          error={problem('avoid') ?? wrongLine}
        />
        <SourceTicks
          chosen={panel.sources}
          sources={sources}
          error={problem('sources')}
          onChange={(next) => onChange({ sources: next })}
        />
      </div>
      <SignalPanel word={SIGNAL_WORD_OF[panel.harm]} title={panel.headline}>
        {panel.consequence !== '' && <p>{panel.consequence}</p>}
        {lines.map((line, i) => (
          <p key={i}>{line}</p>
        ))}
      </SignalPanel>
    </div>
  );
}

/** A sentence, and what it rests on. */
export function StatementFields({
  statement,
  label,
  sources,
  problem,
  onChange,
}: {
  statement: Statement;
  label: string;
  sources: readonly SourceNote[];
  problem: Problem;
  onChange: (part: Partial<Statement>) => void;
}) {
  return (
    <div className="grid gap-1">
      <TextArea
        label={label}
        rows={2}
        value={statement.text}
        onChange={(event) => onChange({ text: event.target.value })}
        error={problem('text')}
      />
      <SourceTicks
        chosen={statement.sources}
        sources={sources}
        error={problem('sources')}
        onChange={(next) => onChange({ sources: next })}
      />
    </div>
  );
}

/** Which sources a text rests on: a line, and boxes when it is opened. */
function SourceTicks({
  chosen,
  sources,
  error,
  onChange,
}: {
  chosen: readonly string[];
  sources: readonly SourceNote[];
  error: string | undefined;
  onChange: (chosen: string[]) => void;
}) {
  const [open, setOpen] = useState(false);
  // Ids of sources that were taken out have to be seen to be taken off.
  const unknown = chosen.filter((id) => !sources.some((source) => source.id === id));
  return (
    <div className="text-small">
      <div className="flex flex-wrap items-baseline gap-x-3 text-pencil">
        <span>{chosen.length === 0 ? 'rests on no source' : `rests on ${chosen.join(', ')}`}</span>
        <Action look="words" size="desk" expanded={open} onClick={() => setOpen(!open)}>
          {open ? 'Close the sources' : 'Sources'}
        </Action>
      </div>
      {error && <FieldError id={`${chosen.join('-')}-error`}>{error}</FieldError>}
      {open && (
        <div className="grid">
          {[...sources, ...unknown.map((id) => ({ id, text: 'no longer in the list' }))].map(
            ({ id, text }) => (
              <CheckField
                key={id}
                checked={chosen.includes(id)}
                detail={text}
                onChange={(event) =>
                  onChange(event.target.checked ? [...chosen, id] : chosen.filter((one) => one !== id))
                }
              >
                {id}
              </CheckField>
            ),
          )}
        </div>
      )}
    </div>
  );
}

/** A question with its answers, which of them is right, and why. */
export function QuestionFields({
  question,
  problem,
  onChange,
}: {
  question: DraftQuestion;
  problem: Problem;
  onChange: (part: Partial<DraftQuestion>) => void;
}) {
  const { options } = question;
  const setOptions = (next: DraftQuestion['options']) => onChange({ options: next });
  return (
    <div className="grid gap-4">
      <TextArea
        label="question"
        rows={2}
        value={question.text}
        onChange={(event) => onChange({ text: event.target.value })}
        error={problem('text')}
      />
      <ol className="grid gap-2" aria-label="Answers to choose from">
        {options.map((option, i) => (
          <li key={option.id} className="flex items-end gap-3">
            <Field
              className="flex-1"
              label={`answer ${i + 1}`}
              value={option.text}
              onChange={(event) =>
                setOptions(
                  options.map((other) => (other === option ? { ...other, text: event.target.value } : other)),
                )
              }
              error={problem(`options.${i}.text`)}
            />
            {options.length > 2 && (
              <Action
                look="words"
                label={`Take out answer ${i + 1}`}
                onClick={() => setOptions(options.filter((other) => other !== option))}
              >
                Take out
              </Action>
            )}
          </li>
        ))}
      </ol>
      {options.length < 6 && (
        <div>
          <Action look="words" onClick={() => setOptions([...options, { id: entryId('answer'), text: '' }])}>
            Add an answer
          </Action>
        </div>
      )}
      <div className="grid items-start gap-x-6 gap-y-4 sm:grid-cols-2">
        <SelectField
          label="right answer"
          value={question.right}
          onChange={(event) => onChange({ right: event.target.value })}
          error={problem('right') ?? problem('options')}
        >
          <option value="">Choose one</option>
          {options.map((option, i) => (
            <option key={option.id} value={option.id}>
              {i + 1}. {option.text}
            </option>
          ))}
        </SelectField>
        <TextArea
          label="why, shown after answering"
          rows={2}
          value={question.why}
          onChange={(event) => onChange({ why: event.target.value })}
          error={problem('why')}
        />
      </div>
    </div>
  );
}

const STATUS_WORDS: Record<SourceNote['status'], string> = {
  read: 'read',
  'read, conflict': 'read, sources differ',
  'from memory': 'from memory',
  computed: 'computed',
  own: 'own rule',
};

/** The sources that the text rests on. */
export function SourceList({
  sources,
  problem,
  onChange,
}: {
  sources: readonly SourceNote[];
  problem: (path: string) => string | undefined;
  onChange: (sources: SourceNote[]) => void;
}) {
  return (
    <EntryList<SourceNote>
      title="Sources"
      noun="source"
      entries={sources}
      onChange={onChange}
      blank={() => ({ id: entryId('source'), text: '', edition: '', status: 'read' })}
      error={problem('sources')}
      hint="What each sentence rests on. People do not see this list when they read."
    >
      {(source, i, change) => (
        <div className="grid gap-3">
          <p className="text-small text-pencil">{source.id}</p>
          <TextArea
            label="source"
            rows={2}
            value={source.text}
            onChange={(event) => change({ text: event.target.value })}
            error={problem(`sources.${i}.text`)}
          />
          <div className="grid items-start gap-x-6 gap-y-3 sm:grid-cols-2">
            <Field
              label="edition"
              value={source.edition}
              onChange={(event) => change({ edition: event.target.value })}
              error={problem(`sources.${i}.edition`)}
            />
            <SelectField
              label="how it is known"
              value={source.status}
              onChange={(event) => {
                const status = (Object.keys(STATUS_WORDS) as SourceNote['status'][]).find(
                  (one) => one === event.target.value,
                );
                if (status) change({ status });
              }}
              error={problem(`sources.${i}.status`)}
            >
              {Object.entries(STATUS_WORDS).map(([status, words]) => (
                <option key={status} value={status}>
                  {words}
                </option>
              ))}
            </SelectField>
          </div>
        </div>
      )}
    </EntryList>
  );
}
