import { DimensionHead, PageHead } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';
import { counted } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import { useServerNow } from '../../lib/server-clock';
import { useMay } from '../../lib/session';
import { Arrivals } from './arrivals';
import { HeadCount } from './head-count';
import { Latecomers } from './latecomers';
import { Gone, OnSite } from './on-site';
import { presenceOf, presentWith, WANTED_DUTIES, type Presence } from './presence';

/** The muster desk: who arrives, who is there, who looks after what. */
export function MusterDesk({ installationId }: { installationId: string }) {
  const people = useLiveMap(installationId, 'people');
  const [installation] = useLiveMap(installationId, 'installation').values();
  const may = useMay(installationId);
  const now = useServerNow(20_000);
  const presence = presenceOf(people.values());
  const { waiting, present, gone } = presence;
  const limit = installation?.hallLimit ?? 0;
  const zone = installation?.timeZone ?? 'UTC';
  const full = present.length >= limit;
  return (
    <>
      <PageHead
        title="Muster"
        summary={`${present.length} of ${limit} on site, ${counted(waiting.length, 'waits', 'wait')} at the desk.`}
      />
      <div className="muster">
        <div className="muster-main">
          {full && (
            <Note kind="refused" title={`The hall is full: ${present.length} of ${limit} people are in.`}>
              Nobody more can be confirmed. Sign somebody out who has left.
            </Note>
          )}
          <section aria-labelledby="muster-waiting">
            <DimensionHead id="muster-waiting" right={counted(waiting.length, 'person', 'people')}>
              At the desk
            </DimensionHead>
            <Arrivals {...{ installationId, waiting, present, zone, now, full }} />
          </section>
        </div>
        <aside className="muster-side">
          <section aria-labelledby="muster-count">
            <DimensionHead id="muster-count" right="posted limit">
              Head count
            </DimensionHead>
            <HeadCount count={present.length} limit={limit} />
          </section>
          {may('installation.read-code') && <Latecomers installationId={installationId} />}
          <Duties presence={presence} />
        </aside>
        <div className="muster-rest">
          <section aria-labelledby="muster-present">
            <DimensionHead id="muster-present" right={counted(present.length, 'person', 'people')}>
              On site
            </DimensionHead>
            <OnSite {...{ installationId, present, zone }} maySignOut={may('person.sign-out-site')} />
          </section>
          {gone.length > 0 && (
            <section aria-labelledby="muster-gone">
              <DimensionHead id="muster-gone" right={counted(gone.length, 'person', 'people')}>
                Signed out
              </DimensionHead>
              <Gone {...{ installationId, gone, zone, full }} />
            </section>
          )}
        </div>
      </div>
    </>
  );
}

/** Who is there for what; a duty without anybody stands out. */
function Duties({ presence: { present } }: { presence: Presence }) {
  return (
    <section aria-labelledby="muster-duties">
      <DimensionHead id="muster-duties" right="on site">
        Duties
      </DimensionHead>
      <dl className="muster-duties">
        {WANTED_DUTIES.map((duty) => {
          const people = presentWith(present, duty);
          return (
            <div key={duty}>
              <dt>{duty}</dt>
              <dd className={people.length === 0 ? 'text-held font-semibold' : undefined}>
                {people.length === 0 ? 'nobody' : people.map(({ name }) => name).join(', ')}
              </dd>
            </div>
          );
        })}
      </dl>
    </section>
  );
}
