import { useState } from 'react';
import type { BriefingRecord } from '../../../shared/contracts/live';
import type { ProposedVersionView } from '../../../shared/contracts/safety';
import { newVersionProblems } from '../../../shared/safety/briefing-versions';
import { Action } from '../../components/ui/action';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { Dialog } from '../../components/ui/dialog';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { useNewestVersion, useReloadProposals } from './queries';
import type { Desk } from './use-desk';
import { useOnce } from './use-once';
import { VersionPreview } from './version-preview';

interface ProposalProps {
  desk: Desk;
  briefing: BriefingRecord;
  proposal: ProposedVersionView;
}

/** Corrections that wait for a second safety lead. */
export function Proposals({
  proposals,
  ...context
}: Omit<ProposalProps, 'proposal'> & { proposals: readonly ProposedVersionView[] }) {
  return (
    <ul>
      {proposals.map((proposal) => (
        <Proposal key={`${proposal.version} ${proposal.at}`} {...context} proposal={proposal} />
      ))}
    </ul>
  );
}

function Proposal({ desk, briefing, proposal }: ProposalProps) {
  const [open, setOpen] = useState(false);
  const reload = useReloadProposals(desk.installationId, briefing.key);
  const { version, whatChanged, at } = proposal;
  const by = desk.nameOf(proposal.proposedBy);
  return (
    <li className="correction">
      <p className="font-semibold">Correction {version} waits for a second safety lead</p>
      <p className="text-small text-pencil">
        by {by}, {desk.at.time(at)}
      </p>
      {whatChanged && <p className="text-small">{whatChanged}</p>}
      <div className="flex flex-wrap gap-x-5">
        <Action look="words" label={`Read correction ${version}`} onClick={() => setOpen(true)}>
          Read it
        </Action>
        <ConfirmAction
          look="words"
          words="Withdraw it"
          label={`Withdraw it: correction ${version}`}
          title={`Withdraw the correction of ${briefing.title} by ${by}?`}
          confirm="Withdraw it"
          wish={{
            method: 'DELETE',
            path: `/installations/${desk.installationId}/briefings/${briefing.key}/proposals/${version}`,
          }}
          onDone={reload}
        >
          <p>Its words are gone then. Version {version - 1} stays as it is.</p>
        </ConfirmAction>
      </div>
      {open && <ReadProposal {...{ desk, briefing, proposal }} onClose={() => setOpen(false)} />}
    </li>
  );
}

/** Why whoever is signed in cannot second it; undefined when they can. */
function whyNot(desk: Desk, briefing: BriefingRecord, { version, proposedBy }: ProposedVersionView) {
  const { me, people, at } = desk;
  const last = briefing.versions.at(-1)?.effectiveFrom ?? 0;
  const problems = newVersionProblems(
    briefing.versions,
    { version, kind: 'correction', effectiveFrom: Math.max(at.now, last) },
    {
      leadId: proposedBy,
      secondId: me?.id ?? null,
      safetyLeads: [...people.values()]
        .filter((person) => !person.removed && person.duties.includes('safety lead'))
        .map(({ id }) => id),
      now: at.now,
    },
  );
  switch (problems[0]) {
    case undefined:
      return undefined;
    case 'SECOND_LEAD_SAME':
      return 'Your own words: another safety lead reads and seconds them.';
    case 'SECOND_LEAD_NEEDED':
      return 'A safety lead seconds it.';
    case 'NOT_A_SAFETY_LEAD':
      return 'Whoever proposed it is no safety lead any more. Withdraw it and propose it yourself.';
    default:
      return 'Another version was published meanwhile. Withdraw it and propose it on the new text.';
  }
}

function ReadProposal({ desk, briefing, proposal, onClose }: ProposalProps & { onClose: () => void }) {
  const { installationId } = desk;
  const newest = briefing.versions.at(-1)?.version ?? 1;
  const before = useNewestVersion(installationId, briefing.key, newest);
  const reload = useReloadProposals(installationId, briefing.key);
  const { press, busy, error } = useOnce(async () => {
    await reload();
    onClose();
  });
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Correction ${proposal.version} of ${briefing.title}, by ${desk.nameOf(proposal.proposedBy)}`}
      actions={
        <>
          <Action
            look="main"
            busy={busy}
            reason={whyNot(desk, briefing, proposal)}
            onClick={() =>
              press({
                method: 'POST',
                path: `/installations/${installationId}/briefings/${briefing.key}/proposals/${proposal.version}/second`,
                body: { proposedAt: proposal.at },
              })
            }
          >
            I have read it: it stands
          </Action>
          <Action look="words" onClick={onClose}>
            Leave it
          </Action>
        </>
      }
    >
      {before.data ? (
        <VersionPreview
          body={proposal.body}
          before={before.data.body}
          whatChanged={proposal.whatChanged ?? ''}
        />
      ) : (
        <Pending />
      )}
      <Refusal error={before.error ?? error} onReload={() => void reload().then(onClose)} />
    </Dialog>
  );
}
