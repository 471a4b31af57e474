import { useEffect, useId, useRef } from 'react';
import type { PersonRecord } from '../../../shared/contracts/live';
import { shownState } from '../../../shared/travellers/step';
import { Action } from '../../components/ui/action';
import { MarkedStick } from '../../components/ui/marked-stick';
import { StateWord } from '../../components/ui/strut-glyph';
import { useWidth } from '../../components/ui/use-width';
import { useFrames } from '../../lib/frames';
import { useLive, useLiveMap } from '../../lib/live';
import type { LiveState } from '../../lib/live-state';
import { membershipIn, useMay, useSession } from '../../lib/session';
import { useServerNow } from '../../lib/server-clock';
import { worldOf } from '../../lib/world';
import type { BoardRow } from './board-rows';
import { sketchOf } from './sketches';
import { offersFor } from './step-actions';
import { StepEntry } from './step-entry';

export interface TravellerPanelProps {
  installationId: string;
  row: BoardRow;
  onClose: () => void;
}

const whole = (state: LiveState) => state;

/** Everything of one traveller, beside the board on a desk and over it on a phone. */
export function TravellerPanel({ installationId, row, onClose }: TravellerPanelProps) {
  const { piece, steps, state, current } = row;
  const head = useRef<HTMLHeadingElement>(null);
  const titleId = useId();
  const [ref, width] = useWidth<HTMLDivElement>(380);
  const frame = useFrames(installationId).get(piece.frameId);
  useEffect(() => {
    const row = document.getElementById(`traveller-${piece.code}`);
    row?.scrollIntoView({ block: 'nearest' });
    head.current?.focus({ preventScroll: true });
    return () => row?.querySelector<HTMLElement>('a')?.focus({ preventScroll: true });
  }, [piece.code]);
  const pitch = Math.min(60, Math.floor((width - 16) / Math.max(steps.length, 1)));
  return (
    <aside
      className="traveller-panel"
      aria-labelledby={titleId}
      onKeyDown={(event) => {
        if (event.key === 'Escape') onClose();
      }}
    >
      <div ref={ref} className="traveller-sheet">
        <div className="traveller-head">
          <svg className="board-sketch" width="75" height="45" viewBox="0 0 50 30" aria-hidden="true">
            <path d={sketchOf(frame)} />
          </svg>
          <div>
            <h2 ref={head} id={titleId} tabIndex={-1} className="traveller-code">
              <strong>{piece.code}</strong> {piece.name}
            </h2>
            <p className="text-pencil">traveller, revision {piece.travellerRevision}</p>
          </div>
          <Action look="words" onClick={onClose} label="Close the traveller">
            Close
          </Action>
        </div>
        <p>
          <StateWord state={state}>
            {current && state !== 'passed' && state !== 'waiting' ? `${current.name} ${state}` : state}
          </StateWord>
        </p>
        <MarkedStick
          code={piece.code}
          steps={steps.map((step) => ({ name: step.name, state: shownState(step) }))}
          pitch={pitch}
        />
        <Entries installationId={installationId} row={row} />
      </div>
    </aside>
  );
}

function Entries({ installationId, row }: Omit<TravellerPanelProps, 'onClose'>) {
  const live = useLive(installationId, whole);
  const people = useLiveMap(installationId, 'people');
  const stations = useLiveMap(installationId, 'stations');
  const [installation] = useLiveMap(installationId, 'installation').values();
  const { data: session } = useSession();
  const may = useMay(installationId);
  const now = useServerNow(5000);
  const personId = membershipIn(session, installationId)?.personId ?? null;
  if (!live) return null;
  const present = presentPeople(people.values());
  return (
    <ol className="step-entries">
      {row.steps.map((step) => (
        <StepEntry
          key={step.id}
          installationId={installationId}
          code={row.piece.code}
          step={step}
          traveller={row.steps}
          station={stations.get(step.stationId)}
          zone={installation?.timeZone ?? 'UTC'}
          nameOf={(id) => people.get(id)?.name ?? 'somebody'}
          people={present}
          personId={personId}
          offers={personId === null ? [] : offersFor(worldOf(live, personId, step, now), may)}
          showDoers={may('step.release') || may('step.check')}
          open={step === row.current}
        />
      ))}
    </ol>
  );
}

const byName = new Intl.Collator('en');
const presentPeople = (people: Iterable<PersonRecord>): PersonRecord[] =>
  [...people]
    .filter((person) => person.onSite && person.confirmed && !person.removed)
    .sort((a, b) => byName.compare(a.name, b.name));
