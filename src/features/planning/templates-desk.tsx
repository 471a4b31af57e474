import { useState } from 'react';
import { Link, useNavigate, useSearchParams } from 'react-router-dom';
import type { FrameView } from '../../../shared/contracts/frames';
import type { TemplateView } from '../../../shared/contracts/travellers';
import { defaultTemplateSteps } from '../../../shared/travellers/default-template';
import { Action } from '../../components/ui/action';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { DimensionHead, SelectionStrut } from '../../components/ui/heads';
import { EmptyNote } from '../../components/ui/note';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { counted } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import { useReloadTemplates, useTemplates } from './queries';
import { blankStep, draftStep, draftTemplate, type TemplateDraft } from './template-draft';
import { TemplateEditor, type TemplateEditorProps } from './template-editor';

/** Templates of an installation, one of them open. */
export function TemplatesDesk({
  installationId,
  frames,
  closed,
}: {
  installationId: string;
  frames: readonly FrameView[];
  closed: boolean;
}) {
  const [search] = useSearchParams();
  const navigate = useNavigate();
  const list = useTemplates(installationId);
  const reload = useReloadTemplates(installationId);
  const stations = [...useLiveMap(installationId, 'stations').values()]
    .filter((station) => !station.removed)
    .sort((a, b) => a.position - b.position);
  const tools = useLiveMap(installationId, 'tools');
  const toolKinds = [
    ...new Set([...tools.values()].filter((tool) => !tool.removed).map(({ kind }) => kind)),
  ].sort();
  if (list.error) return <Refusal error={list.error} />;
  if (!list.data) return <Pending />;
  const page = `/i/${installationId}/templates`;
  const path = `/installations/${installationId}/templates`;
  const making = closed ? null : search.get('new');
  const chosen = making
    ? undefined
    : (list.data.find(({ id }) => id === search.get('template')) ?? list.data[0]);
  const kept = async ({ id }: { id: string }) => {
    await reload();
    await navigate(`${page}?template=${id}`);
  };
  const shared = { stations, toolKinds, frames, onDone: kept, onCancel: () => void navigate(page) };
  return (
    <div className="grid gap-6">
      <div className="flex flex-wrap items-center gap-x-8 gap-y-2">
        <TemplateChoices templates={list.data} chosenId={chosen?.id ?? null} page={page} />
        {!closed && (
          <span className="flex flex-wrap gap-x-2">
            <Action to={`${page}?new=usual`}>New, with the usual steps</Action>
            <Action to={`${page}?new=blank`}>New, blank</Action>
          </span>
        )}
      </div>
      {making && (
        <section className="grid gap-5" aria-labelledby="new-template">
          <DimensionHead id="new-template">A new template</DimensionHead>
          <TemplateEditor
            key={making}
            {...shared}
            initial={newDraft(making, stations)}
            wish={{ method: 'POST', path }}
            words="Add this template"
          />
        </section>
      )}
      {chosen && (
        <Chosen
          key={chosen.id}
          template={chosen}
          path={`${path}/${chosen.id}`}
          closed={closed}
          onRemoved={async () => {
            await reload();
            await navigate(page);
          }}
          onReload={reload}
          {...shared}
        />
      )}
      {!chosen && !making && (
        <EmptyNote title="No template yet.">
          A template is the order of steps that every piece made from it goes through. Begin with the usual
          ones and change what is different here.
        </EmptyNote>
      )}
    </div>
  );
}

function newDraft(kind: string, stations: readonly { id: string; kind: string }[]): TemplateDraft {
  return kind === 'usual'
    ? { name: 'Usual steps', steps: defaultTemplateSteps(stations).map(draftStep), revision: undefined }
    : { name: '', steps: [blankStep(stations[0]?.id ?? '')], revision: undefined };
}

function TemplateChoices({
  templates,
  chosenId,
  page,
}: {
  templates: readonly TemplateView[];
  chosenId: string | null;
  page: string;
}) {
  if (templates.length === 0) return null;
  return (
    <nav className="choices" aria-label="Templates">
      {templates.map(({ id, name }) => (
        <Link
          key={id}
          to={`${page}?template=${id}`}
          className="choice choice-link"
          aria-current={id === chosenId ? 'true' : undefined}
        >
          {name}
          {id === chosenId && <SelectionStrut />}
        </Link>
      ))}
    </nav>
  );
}

type ChosenProps = Omit<TemplateEditorProps, 'initial' | 'wish' | 'words' | 'onReload' | 'onCancel'> & {
  template: TemplateView;
  path: string;
  closed: boolean;
  onRemoved: () => unknown;
  onReload: () => Promise<unknown>;
};

function Chosen({ template, path, closed, onRemoved, onReload, ...editor }: ChosenProps) {
  const { name, steps } = template;
  // What is typed stays while others change the template; only a wish of the person loads what the server has.
  const [loaded, setLoaded] = useState(0);
  const load = async () => {
    await onReload();
    setLoaded((before) => before + 1);
  };
  return (
    <section className="grid gap-5" aria-labelledby="template">
      <DimensionHead id="template" right={counted(steps.length, 'step')}>
        {name}
      </DimensionHead>
      <p className="max-w-words">
        Pieces made from it before keep the steps they have. What you change here counts for pieces made
        after.
      </p>
      <TemplateEditor
        key={loaded}
        {...editor}
        initial={draftTemplate(template)}
        wish={{ method: 'PUT', path }}
        words="Keep it"
        cancelWords="Take my changes back"
        onCancel={() => void load()}
        onReload={() => void load()}
      />
      {!closed && (
        <div>
          <ConfirmAction
            words="Take out this template"
            title={`Take out the template ${name}?`}
            confirm="Take it out"
            wish={{ method: 'DELETE', path }}
            onDone={onRemoved}
          >
            <p>Pieces made from it stay as they are. New ones need another template.</p>
          </ConfirmAction>
        </div>
      )}
    </section>
  );
}
