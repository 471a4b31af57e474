import { useState } from 'react';
import type { BriefingRecord } from '../../../shared/contracts/live';
import type { VersionOutcome } from '../../../shared/contracts/safety';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { useLiveMap } from '../../lib/live';
import type { Writing } from './briefing-versions';
import { useNewestVersion, useReloadProposals } from './queries';
import type { Desk } from './use-desk';
import { VersionEditor } from './version-editor';

/** The editor for the next version of a briefing, filled from its newest text. */
export function WriteVersion({
  desk,
  briefing,
  kind,
  onDone,
  onClose,
}: {
  desk: Desk;
  briefing: BriefingRecord;
  kind: Writing['kind'];
  onDone: (outcome: VersionOutcome) => void;
  onClose: () => void;
}) {
  const { installationId, lists, zone } = desk;
  const newest = briefing.versions.at(-1)?.version ?? 1;
  // Somebody may publish another one meanwhile: what is being written stays until the newer text is asked for.
  const [basis, setBasis] = useState(newest);
  const text = useNewestVersion(installationId, briefing.key, basis);
  const steps = useLiveMap(installationId, 'steps');
  const reload = useReloadProposals(installationId, briefing.key);
  if (text.isPending) return <Pending />;
  if (text.error) return <Refusal error={text.error} />;
  const stepsInHand = [...steps.values()].filter(
    (step) =>
      !step.removed &&
      step.crew.length > 0 &&
      step.hazards.some((hazard) => briefing.hazards.includes(hazard)),
  ).length;
  const signOffs = lists.signedOff.filter((line) => line.briefing.id === briefing.id).length;
  return (
    <VersionEditor
      key={`${kind} ${basis}`}
      installationId={installationId}
      briefing={briefing}
      kind={kind}
      text={text.data}
      zone={zone}
      ends={{ signOffs, stepsInHand }}
      onDone={async (outcome) => {
        await reload();
        onDone(outcome);
      }}
      onCancel={onClose}
      onReload={() => setBasis(newest)}
    />
  );
}
