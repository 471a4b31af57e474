import { useState } from 'react';
import type { ToolRecord } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { CheckField } from '../../components/ui/choices';
import { Dialog } from '../../components/ui/dialog';
import { TextArea } from '../../components/ui/field';
import { DimensionHead } from '../../components/ui/heads';
import { Refusal } from '../../components/ui/refusal';
import { OutOfUseTag } from '../../components/ui/tool-out-line';
import { counted } from '../../lib/formats';
import { membershipIn, useMay, useSession } from '../../lib/session';
import { useForm } from '../../lib/use-form';
import { timeWords } from './back-by';
import type { Crib } from './use-crib';

/** The tags that hang: which tool, why, who, and the way to take one off. */
export function OutOfUse({ installationId, crib }: { installationId: string; crib: Crib }) {
  const may = useMay(installationId);
  const [clearing, setClearing] = useState<ToolRecord | null>(null);
  if (crib.tagged.length === 0) return null;
  return (
    <section aria-labelledby="out-of-use">
      <DimensionHead id="out-of-use" right={counted(crib.tagged.length, 'tag')}>
        Out of use
      </DimensionHead>
      <ul className="tags">
        {crib.tagged.map((tool) => {
          const name = tool.tag ? crib.nameOf(tool.tag.by) : '';
          return (
            <li key={tool.id}>
              <OutOfUseTag
                tool={`${tool.number} ${tool.name}`}
                reason={tool.tag?.reason ?? ''}
                detail={`${name}, ${tool.tag ? timeWords(tool.tag.at, crib.now, crib.zone) : ''}. Cleared only by ${name} or a second authorised person.`}
                actions={
                  may('tool.clear-tag') && (
                    <Action
                      look="words"
                      label={`Clear the tag of ${tool.number}`}
                      onClick={() => setClearing(tool)}
                    >
                      Clear the tag
                    </Action>
                  )
                }
              />
            </li>
          );
        })}
      </ul>
      {clearing && (
        <ClearTag
          key={clearing.id}
          installationId={installationId}
          crib={crib}
          tool={clearing}
          onClose={() => setClearing(null)}
        />
      )}
    </section>
  );
}

interface DialogProps {
  installationId: string;
  tool: ToolRecord;
  onClose: () => void;
}

function ClearTag({ installationId, crib, tool, onClose }: DialogProps & { crib: Crib }) {
  const { data: session } = useSession();
  const [inspected, setInspected] = useState(false);
  const [reason, setReason] = useState('');
  const own = tool.tag?.by === membershipIn(session, installationId)?.personId;
  const form = useForm({
    request: () => ({
      method: 'POST',
      path: `/installations/${installationId}/tools/${tool.id}/clear-tag`,
      body: { inspected, reason },
    }),
    onDone: onClose,
  });
  return (
    <Dialog open onClose={onClose} title={`Clear the tag of ${tool.number} ${tool.name}?`}>
      <form className="grid gap-4" noValidate onSubmit={form.onSubmit}>
        <p>
          {tool.tag && `${own ? 'You' : crib.nameOf(tool.tag.by)} tagged it: ${tool.tag.reason} `}
          Then it may be lent again.
        </p>
        <Refusal error={form.error} unplaced={form.unplaced} />
        <CheckField
          checked={inspected}
          error={form.problem('inspected')}
          onChange={(event) => setInspected(event.target.checked)}
        >
          I have inspected it
        </CheckField>
        <TextArea
          label="what you inspected and why it is safe"
          optional={own}
          rows={2}
          value={reason}
          error={form.problem('reason')}
          onChange={(event) => setReason(event.target.value)}
        />
        <DialogWays busy={form.busy} words="Clear the tag" onClose={onClose} />
      </form>
    </Dialog>
  );
}

/** Hang a tag on a tool that is in the crib. */
export function TagTool({ installationId, tool, onClose }: DialogProps) {
  const [reason, setReason] = useState('');
  const form = useForm({
    request: () => ({
      method: 'POST',
      path: `/installations/${installationId}/tools/${tool.id}/tag`,
      body: { reason },
    }),
    onDone: onClose,
  });
  return (
    <Dialog open onClose={onClose} title={`Tag ${tool.number} ${tool.name} out of use`}>
      <form className="grid gap-4" noValidate onSubmit={form.onSubmit}>
        <p>Nobody can borrow it until the tag is cleared after an inspection.</p>
        <Refusal error={form.error} unplaced={form.unplaced} />
        <TextArea
          label="what is wrong with it"
          rows={2}
          autoFocus
          value={reason}
          error={form.problem('reason')}
          onChange={(event) => setReason(event.target.value)}
        />
        <DialogWays busy={form.busy} words="Tag it" onClose={onClose} />
      </form>
    </Dialog>
  );
}

function DialogWays({ busy, words, onClose }: { busy: boolean; words: string; onClose: () => void }) {
  return (
    <div className="dialog-actions">
      <Action type="submit" look="main" busy={busy}>
        {words}
      </Action>
      <Action look="plain" onClick={onClose}>
        Leave it
      </Action>
    </div>
  );
}
