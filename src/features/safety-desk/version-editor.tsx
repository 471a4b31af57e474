import { useEffect, useState } from 'react';
import type { BriefingRecord } from '../../../shared/contracts/live';
import type { VersionOutcome, WholeVersionView } from '../../../shared/contracts/safety';
import type { Statement } from '../../../shared/safety';
import { Action } from '../../components/ui/action';
import { OptionStruts } from '../../components/ui/choices';
import { Field, TextArea } from '../../components/ui/field';
import { ChoiceRow, DimensionHead, PageHead } from '../../components/ui/heads';
import { Refusal } from '../../components/ui/refusal';
import { counted } from '../../lib/formats';
import { serverNow } from '../../lib/server-clock';
import { useForm } from '../../lib/use-form';
import { PanelFields, QuestionFields, SourceList, StatementFields } from './entry-fields';
import { EntryList } from './entry-list';
import {
  bodyOf,
  checkVersion,
  draftOf,
  entryId,
  localOf,
  type DraftBody,
  type DraftPanel,
  type VersionBase,
  type VersionDraft,
} from './version-draft';
import { VersionPreview } from './version-preview';

export interface VersionEditorProps {
  installationId: string;
  briefing: BriefingRecord;
  kind: VersionBase['kind'];
  /** The newest published text. */
  text: WholeVersionView;
  zone: string;
  /** What a change would end: sign-offs that count now, and steps in hand that need them. */
  ends: { signOffs: number; stepsInHand: number };
  onDone: (outcome: VersionOutcome) => unknown;
  onCancel: () => void;
  onReload: () => void;
}

const KIND_WORDS = {
  change: {
    title: 'Propose a change',
    summary: 'Ends earlier sign-offs from a stated time; people read what changed, answer and sign again.',
    submit: 'Publish the change',
  },
  correction: {
    title: 'Propose a correction',
    summary: 'Puts words right and ends no sign-off; it stands when a second safety lead has read it.',
    submit: 'Propose the correction',
  },
} as const;

/** Writes the next version of a briefing. */
export function VersionEditor(props: VersionEditorProps) {
  const { installationId, briefing, kind, text, zone, ends, onDone, onCancel, onReload } = props;
  const words = KIND_WORDS[kind];
  const base: VersionBase = { kind, version: text.version, effectiveFrom: text.effectiveFrom, zone };
  const [draft, setDraft] = useState<VersionDraft>(() => ({
    whatChanged: '',
    when: 'at once',
    from: localOf(Math.max(serverNow() + 1_800_000, text.effectiveFrom), zone),
    body: draftOf(text.body),
  }));
  useEffect(() => document.querySelector<HTMLElement>('.page-title')?.focus(), []);
  const [view, setView] = useState<'write' | 'read'>('write');
  const form = useForm<VersionOutcome>({
    request: () => {
      const checked = checkVersion(draft, base, serverNow());
      return 'problems' in checked
        ? checked
        : {
            method: 'POST',
            path: `/installations/${installationId}/briefings/${briefing.key}/versions`,
            body: checked.body,
          };
    },
    // Words about a field can only stand beside it where the fields are.
    onProblems: () => setView('write'),
    onDone,
  });
  const set = (part: Partial<VersionDraft>) => setDraft((now) => ({ ...now, ...part }));
  const setBody = (part: Partial<DraftBody>) =>
    setDraft((now) => ({ ...now, body: { ...now.body, ...part } }));
  return (
    <form className="version-editor" noValidate onSubmit={form.onSubmit}>
      <PageHead title={`${words.title}: ${briefing.title}`} summary={words.summary} />
      <Refusal error={form.error} unplaced={form.unplaced} onReload={onReload} />
      <ChoiceRow
        label="Write the text or read it"
        choices={[
          { value: 'write', label: 'Write' },
          { value: 'read', label: 'Read it as the room will' },
        ]}
        value={view}
        onChange={setView}
      />
      {view === 'read' ? (
        <VersionPreview body={bodyOf(draft.body)} before={text.body} whatChanged={draft.whatChanged} />
      ) : (
        <>
          <div className="version-head">
            <TextArea
              label="what changed"
              hint="The short sheet: people who know the briefing read this first."
              rows={3}
              value={draft.whatChanged}
              onChange={(event) => set({ whatChanged: event.target.value })}
              error={form.problem('whatChanged')}
            />
            {kind === 'change' && <WhenFields draft={draft} set={set} zone={zone} form={form} />}
          </div>
          <BodyFields body={draft.body} setBody={setBody} problem={(path) => form.problem(`body.${path}`)} />
        </>
      )}
      <div className="version-foot">
        <p>
          {kind === 'change'
            ? `Version ${text.version + 1}. It ends ${counted(ends.signOffs, 'sign-off')}; ${counted(ends.stepsInHand, 'step')} in hand ${ends.stepsInHand === 1 ? 'needs' : 'need'} one. Nothing is stopped: you get the list.`
            : `Version ${text.version + 1}. ${counted(ends.signOffs, 'sign-off')} ${ends.signOffs === 1 ? 'stands' : 'stand'} as ${ends.signOffs === 1 ? 'it is' : 'they are'}.`}
        </p>
        <Action type="submit" look="main" busy={form.busy}>
          {words.submit}
        </Action>
        <Action look="words" onClick={onCancel}>
          Leave it
        </Action>
      </div>
    </form>
  );
}

function WhenFields({
  draft,
  set,
  zone,
  form,
}: {
  draft: VersionDraft;
  set: (part: Partial<VersionDraft>) => void;
  zone: string;
  form: { problem: (path: string) => string | undefined };
}) {
  const error = form.problem('effectiveFrom');
  return (
    <div className="grid gap-3">
      <OptionStruts
        legend="the change counts"
        columns={2}
        value={draft.when}
        onChange={(when) => set({ when })}
        options={[
          { value: 'at once', label: 'at once' },
          { value: 'from a time', label: 'from a time' },
        ]}
        error={draft.when === 'at once' ? error : undefined}
      />
      {draft.when === 'from a time' && (
        <Field
          label="from"
          type="datetime-local"
          value={draft.from}
          onChange={(event) => set({ from: event.target.value })}
          hint={`Local time of the installation, ${zone}.`}
          error={error}
        />
      )}
    </div>
  );
}

const newStatement = (noun: string, body: DraftBody): Statement => ({
  id: entryId(noun),
  text: '',
  // What a safety lead writes here is the house's own rule until it is given another source.
  sources: body.sources.some(({ id }) => id === 'house-rule') ? ['house-rule'] : [],
});

const STATEMENTS = [
  { list: 'rules', title: 'Rules', noun: 'rule', id: 'rule', least: 1 },
  { list: 'firstAid', title: 'First aid', noun: 'first-aid line', id: 'first-aid', least: 1 },
  { list: 'notes', title: 'Notes', noun: 'note', id: 'note', least: 0 },
] as const;

function BodyFields({
  body,
  setBody,
  problem,
}: {
  body: DraftBody;
  setBody: (part: Partial<DraftBody>) => void;
  problem: (path: string) => string | undefined;
}) {
  return (
    <>
      <EntryList<DraftPanel>
        title="Signal panels"
        noun="panel"
        entries={body.panels}
        onChange={(panels) => setBody({ panels })}
        blank={() => ({
          id: entryId('panel'),
          harm: 'could cause minor or moderate injury',
          headline: '',
          consequence: '',
          avoid: '',
          sources: [],
        })}
        least={1}
        error={problem('panels')}
      >
        {(panel, i, change) => (
          <PanelFields
            panel={panel}
            sources={body.sources}
            problem={(path) => problem(`panels.${i}.${path}`)}
            onChange={change}
          />
        )}
      </EntryList>
      {STATEMENTS.map(({ list, title, noun, id, least }) => (
        <EntryList
          key={list}
          title={title}
          noun={noun}
          entries={body[list]}
          onChange={(entries) => setBody({ [list]: entries })}
          blank={() => newStatement(id, body)}
          least={least}
          error={problem(list)}
        >
          {(statement, i, change) => (
            <StatementFields
              statement={statement}
              label={noun}
              sources={body.sources}
              problem={(path) => problem(`${list}.${i}.${path}`)}
              onChange={change}
            />
          )}
        </EntryList>
      ))}
      <EntryList
        title="Question sheet"
        noun="question"
        entries={body.questions}
        onChange={(questions) => setBody({ questions })}
        blank={() => ({
          id: entryId('question'),
          text: '',
          options: [
            { id: entryId('answer'), text: '' },
            { id: entryId('answer'), text: '' },
          ],
          right: '',
          why: '',
        })}
        least={1}
        most={20}
        error={problem('questions')}
      >
        {(question, i, change) => (
          <QuestionFields
            question={question}
            problem={(path) => problem(`questions.${i}.${path}`)}
            onChange={change}
          />
        )}
      </EntryList>
      <section className="grid gap-2" aria-labelledby="version-closing">
        <DimensionHead id="version-closing">Last line</DimensionHead>
        <TextArea
          label="local codes and competent people come first"
          rows={2}
          value={body.closing}
          onChange={(event) => setBody({ closing: event.target.value })}
          error={problem('closing')}
        />
      </section>
      <SourceList sources={body.sources} problem={problem} onChange={(sources) => setBody({ sources })} />
    </>
  );
}
