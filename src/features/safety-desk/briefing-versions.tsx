import type { BriefingRecord } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { DimensionHead } from '../../components/ui/heads';
import { counted, formatDay } from '../../lib/formats';
import { versionNow } from './desk-words';
import { Proposals } from './proposals';
import { useProposals } from './queries';
import type { Desk } from './use-desk';

/** Which kind of version is being written, of which briefing. */
export interface Writing {
  key: string;
  kind: 'change' | 'correction';
}

/** The versions of each briefing, what waits for a second lead, and the ways to a next one. */
export function BriefingVersions({
  desk,
  briefings,
  onWrite,
}: {
  desk: Desk;
  briefings: readonly BriefingRecord[];
  onWrite: (writing: Writing) => void;
}) {
  return (
    <>
      {briefings.map((briefing) => (
        <section key={briefing.id} className="grid gap-2" aria-label={`Versions of ${briefing.title}`}>
          <DimensionHead right={`version ${versionNow(briefing, desk.at.now)}`}>
            {briefing.title}
          </DimensionHead>
          <VersionList desk={desk} briefing={briefing} />
          {desk.may('briefing.edit') && <VersionWays desk={desk} briefing={briefing} onWrite={onWrite} />}
        </section>
      ))}
    </>
  );
}

function VersionList({ desk: { at, zone }, briefing }: { desk: Desk; briefing: BriefingRecord }) {
  const current = versionNow(briefing, at.now);
  return (
    <ol className="version-list" reversed>
      {[...briefing.versions].reverse().map(({ version, kind, effectiveFrom, whatChanged }) => (
        <li key={version} aria-current={version === current ? 'true' : undefined}>
          <p>
            <span className={version === current ? 'font-semibold' : undefined}>
              {version}, {kind === 'first' ? 'the first' : `a ${kind}`}
            </span>
            , {effectiveFrom > at.now ? 'counts from' : 'since'} {formatDay(effectiveFrom, zone)}{' '}
            {at.time(effectiveFrom)}
          </p>
          {whatChanged && <p className="text-pencil">{whatChanged}</p>}
        </li>
      ))}
    </ol>
  );
}

function VersionWays({
  desk,
  briefing,
  onWrite,
}: {
  desk: Desk;
  briefing: BriefingRecord;
  onWrite: (writing: Writing) => void;
}) {
  const proposals = useProposals(desk.installationId, briefing.key);
  const newest = briefing.versions.at(-1)?.version ?? 0;
  // One that was seconded meanwhile is in the live state before it is out of this list.
  const waiting = (proposals.data ?? []).filter(({ version }) => version > newest);
  const { key, title } = briefing;
  return (
    <>
      <Proposals desk={desk} briefing={briefing} proposals={waiting} />
      <div className="flex flex-wrap items-start gap-x-3 gap-y-2">
        <Action
          look="plain"
          size="desk"
          label={`Propose a change of ${title}`}
          onClick={() => onWrite({ key, kind: 'change' })}
        >
          Propose a change
        </Action>
        <Action
          look="plain"
          size="desk"
          label={`Propose a correction of ${title}`}
          reason={waiting.length > 0 ? 'A correction waits: second or withdraw it first.' : undefined}
          onClick={() => onWrite({ key, kind: 'correction' })}
        >
          Propose a correction
        </Action>
      </div>
      <p className="text-small text-pencil">
        A sign-off holds {counted(briefing.validityDays, 'day')} from its countersign. A change ends it, a
        correction does not.
      </p>
    </>
  );
}
