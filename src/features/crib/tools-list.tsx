import { useState } from 'react';
import type { ToolRecord } from '../../../shared/contracts/live';
import { HAZARD_LABELS } from '../../../shared/safety/hazards';
import { Action } from '../../components/ui/action';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { Field } from '../../components/ui/field';
import { EmptyNote } from '../../components/ui/note';
import { DimensionHead } from '../../components/ui/heads';
import { Sheet } from '../../components/ui/sheet';
import { StateWord } from '../../components/ui/strut-glyph';
import { useMay } from '../../lib/session';
import { TagTool } from './out-of-use';
import { ToolForm } from './tool-form';
import type { Crib } from './use-crib';

type Opened = { kind: 'new' } | { kind: 'edit' | 'tag'; tool: ToolRecord };

/** Every tool of the crib with where it is; for keepers also the way to change the list. */
export function ToolsList({ installationId, crib }: { installationId: string; crib: Crib }) {
  const may = useMay(installationId);
  const [typed, setTyped] = useState('');
  const [opened, setOpened] = useState<Opened | null>(null);
  const wanted = typed.trim().toLowerCase();
  const shown = crib.tools.filter((tool) =>
    `${tool.number} ${tool.name} ${tool.kind}`.toLowerCase().includes(wanted),
  );
  const kinds = [...new Set(crib.tools.map((tool) => tool.kind))];
  const close = () => setOpened(null);
  return (
    <section aria-labelledby="all-tools">
      <DimensionHead id="all-tools" right={`${crib.tools.length} on the list`}>
        All tools
      </DimensionHead>
      <div className="muster-find">
        <Field
          label="number, name or kind"
          type="search"
          autoComplete="off"
          value={typed}
          onChange={(event) => setTyped(event.target.value)}
        />
        {may('tool.edit') && (
          <Action look="crossed" onClick={() => setOpened({ kind: 'new' })}>
            A tool more
          </Action>
        )}
      </div>
      {shown.length === 0 ? (
        <EmptyNote
          title={crib.tools.length === 0 ? 'No tools on the list yet.' : 'No tool is called that.'}
        />
      ) : (
        <Sheet caption="All tools" rows="fixed" className="flowing">
          <thead>
            <tr>
              <th scope="col">number</th>
              <th scope="col">tool</th>
              <th scope="col">sign-off</th>
              <th scope="col">condition</th>
              <th scope="col">where</th>
              <th scope="col" className="amount">
                <span className="sr-only">ways on</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {shown.map((tool) => (
              <tr key={tool.id}>
                <th scope="row">{tool.number}</th>
                <td>{tool.name}</td>
                <td data-label="sign-off">{tool.hazard ? HAZARD_LABELS[tool.hazard] : 'none'}</td>
                <td data-label="condition">{tool.condition}</td>
                <td data-label="where">
                  <Where tool={tool} crib={crib} />
                </td>
                <td className="amount">
                  <span className="tool-ways">
                    {may('tool.tag') && !tool.tag && (
                      <Action
                        look="words"
                        label={`Tag ${tool.number} out of use`}
                        onClick={() => setOpened({ kind: 'tag', tool })}
                      >
                        Tag
                      </Action>
                    )}
                    {may('tool.edit') && (
                      <>
                        <Action
                          look="words"
                          label={`Change ${tool.number}`}
                          onClick={() => setOpened({ kind: 'edit', tool })}
                        >
                          Change
                        </Action>
                        <TakeOff installationId={installationId} tool={tool} />
                      </>
                    )}
                  </span>
                </td>
              </tr>
            ))}
          </tbody>
        </Sheet>
      )}
      {opened?.kind === 'tag' && (
        <TagTool installationId={installationId} tool={opened.tool} onClose={close} />
      )}
      {(opened?.kind === 'new' || opened?.kind === 'edit') && (
        <ToolForm
          installationId={installationId}
          {...(opened.kind === 'edit' ? { tool: opened.tool } : {})}
          kinds={kinds}
          onClose={close}
        />
      )}
    </section>
  );
}

function Where({ tool, crib }: { tool: ToolRecord; crib: Crib }) {
  const checkout = crib.outOf.get(tool.id);
  if (checkout) return <StateWord state="in hand">with {crib.nameOf(checkout.personId)}</StateWord>;
  if (tool.tag) return <StateWord state="held">out of use</StateWord>;
  return <StateWord state="ready">in the crib</StateWord>;
}

function TakeOff({ installationId, tool }: { installationId: string; tool: ToolRecord }) {
  return (
    <ConfirmAction
      words="Take off"
      look="words"
      label={`Take off ${tool.number}`}
      title={`Take ${tool.number} ${tool.name} off the list?`}
      confirm="Take it off"
      wish={{ method: 'DELETE', path: `/installations/${installationId}/tools/${tool.id}` }}
    >
      <p>It cannot be lent any more. Its number is not given out again.</p>
    </ConfirmAction>
  );
}
