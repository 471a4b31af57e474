import { useMemo } from 'react';
import type { PersonRecord, StopRecord } from '../../../shared/contracts/live';
import { HAZARD_LABELS, type Hazard } from '../../../shared/safety/hazards';
import { shareDone } from '../../../shared/travellers/step';
import { ProjectorFrame, WallLine } from '../../components/layout/projector-frame';
import { Figures } from '../../components/ui/figures';
import { StateWord } from '../../components/ui/strut-glyph';
import type { GLYPH_STATES } from '../../components/ui/strut-geometry';
import { StopBanner } from '../../components/ui/stop-banner';
import { counted, formatTime } from '../../lib/formats';
import { useFrames } from '../../lib/frames';
import { link, useLiveMap } from '../../lib/live';
import { useMessages } from '../../lib/messages';
import { useServerNow } from '../../lib/server-clock';
import { useStore } from '../../lib/store';
import { travellerSteps } from '../../lib/world';
import { handsWanted, type Wanted } from './hands-wanted';
import type { WallPiece } from './wall-drawing';
import { WallPicture } from './wall-picture';

/** As many wanted steps as the column has room for at the size that is read from ten metres. */
const WANTED_SHOWN = 3;
/** Two rows, in the order in which work goes. */
const LEGEND: readonly (typeof GLYPH_STATES)[number][] = [
  'passed',
  'to check',
  'drying',
  'in hand',
  'ready',
  'rework',
  'held',
  'waiting',
];

const byCode = new Intl.Collator('en', { numeric: true });

/** Every piece with its steps, by code. */
function usePieces(installationId: string): WallPiece[] {
  const pieces = useLiveMap(installationId, 'subAssemblies');
  const steps = useLiveMap(installationId, 'steps');
  return useMemo(
    () =>
      [...pieces.values()]
        .filter((piece) => !piece.removed)
        .sort((a, b) => byCode.compare(a.code, b.code))
        .map((piece) => ({ piece, steps: travellerSteps(steps, piece.id) })),
    [pieces, steps],
  );
}

/** The room's picture of an installation. It reads and never writes. */
export function ProjectorWall({ installationId }: { installationId: string }) {
  const [installation] = useLiveMap(installationId, 'installation').values();
  const pieces = usePieces(installationId);
  const frames = useFrames(installationId);
  const now = useServerNow(5000);
  const wanted = useMemo(() => handsWanted(pieces, now), [pieces, now]);
  const share = useMemo(() => shareDone(pieces.flatMap(({ steps }) => steps)), [pieces]);
  const zone = installation?.timeZone ?? 'UTC';
  const heard = useStore(link);
  const stale =
    heard.state !== 'broken'
      ? undefined
      : heard.heardAt === null
        ? 'no news'
        : `no news since ${formatTime(heard.heardAt, zone)}`;
  const shown = wanted.slice(0, WANTED_SHOWN);
  return (
    <ProjectorFrame
      title={installation?.name ?? 'Strutbee'}
      time={formatTime(now, zone)}
      share={share}
      stale={stale}
      picture={<WallPicture pieces={pieces} frames={frames} wanted={shown} />}
      legend={LEGEND.map((state) => (
        <StateWord key={state} state={state} height={40} />
      ))}
      column={
        <>
          <HandsWanted
            installationId={installationId}
            shown={shown}
            more={wanted.length - shown.length}
            done={share === 1}
          />
          <Counts installationId={installationId} phones={heard.phones} />
        </>
      }
      stop={<WallStop installationId={installationId} zone={zone} stale={stale} />}
    />
  );
}

function HandsWanted({
  installationId,
  shown,
  more,
  done,
}: {
  installationId: string;
  shown: readonly Wanted[];
  more: number;
  done: boolean;
}) {
  const stations = useLiveMap(installationId, 'stations');
  return (
    <section aria-labelledby="hands-wanted">
      <h2 id="hands-wanted" className="wall-word">
        {shown.length > 0 ? 'hands wanted' : done ? 'everything has passed' : 'no hands wanted now'}
      </h2>
      {shown.map(({ pieceId, code, step, hands }) => (
        <WallLine
          key={`${pieceId} ${step.id}`}
          figure={<Figures>{hands}</Figures>}
          detail={
            <>
              <span className="wall-clip">
                {step.name}, {stations.get(step.stationId)?.name}
              </span>
              <span className="wall-clip">
                {step.hazards.length > 0 ? step.hazards.map(hazardWord).join(', ') : 'no sign-off'}
              </span>
            </>
          }
        >
          {code}
        </WallLine>
      ))}
      {more > 0 && <p className="wall-more">and {counted(more, 'more step')}</p>}
    </section>
  );
}

/** As short as it can be said: 20 characters fill the column. */
const hazardWord = (hazard: Hazard) => HAZARD_LABELS[hazard].replace(/ work$/, '');

const present = (people: Iterable<PersonRecord>) =>
  [...people].filter((person) => person.onSite && !person.removed).length;

function Counts({ installationId, phones }: { installationId: string; phones: number }) {
  const people = useLiveMap(installationId, 'people');
  const checkouts = useLiveMap(installationId, 'checkouts');
  const [installation] = useLiveMap(installationId, 'installation').values();
  const onSite = present(people.values());
  const out = [...checkouts.values()].filter((checkout) => checkout.backAt === null).length;
  return (
    <dl className="wall-counts">
      <div>
        <dt>head count</dt>
        <dd>
          <Figures>{`${onSite} of ${installation?.hallLimit ?? 0}`}</Figures>
        </dd>
      </div>
      <div>
        <dt>tools out</dt>
        <dd>
          <Figures>{out}</Figures>
        </dd>
      </div>
      <div>
        <dt>phones</dt>
        <dd>
          <Figures>{`${Math.min(phones, onSite)} of ${onSite}`}</Figures>
        </dd>
      </div>
    </dl>
  );
}

/** Of several stops the widest counts for the whole room. */
const WIDTH: Record<StopRecord['scope'], number> = { everything: 0, 'hot-tools': 1, area: 2 };

function WallStop({
  installationId,
  zone,
  stale,
}: {
  installationId: string;
  zone: string;
  stale: string | undefined;
}) {
  const { stop: words, common } = useMessages();
  const stops = useLiveMap(installationId, 'stops');
  const people = useLiveMap(installationId, 'people');
  const stations = useLiveMap(installationId, 'stations');
  const raised = [...stops.values()]
    .filter((stop) => stop.liftedAt === null)
    .sort((a, b) => WIDTH[a.scope] - WIDTH[b.scope] || a.raisedAt - b.raisedAt);
  const [stop, ...others] = raised;
  if (!stop) return null;
  const scopeOf = ({ scope, stationId }: StopRecord) =>
    scope === 'area' ? words.scopes.area(stations.get(stationId ?? '')?.name ?? '') : words.scopes[scope];
  const name = people.get(stop.raisedBy)?.name ?? common.someone;
  return (
    <StopBanner
      size="wall"
      word={words.word}
      scope={scopeOf(stop)}
      since={words.since(formatTime(stop.raisedAt, zone))}
      what={words.what(stop.reason, name, scopeOf(stop))}
      steps={words.makeSafe[stop.scope]}
      foot={
        <>
          <p>{stop.scope === 'everything' ? words.allWork : words.otherWork}</p>
          {others.length > 0 && stop.scope !== 'everything' && (
            <p>{`${words.word}: ${others.map(scopeOf).join(', ')}.`}</p>
          )}
          {stale && <p>{stale}</p>}
        </>
      }
    />
  );
}
