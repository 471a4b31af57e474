import { useState } from 'react';
import type { StepRecord } from '../../../shared/contracts/live';
import type { BenchEntry } from '../../../shared/travellers/bench';
import type { Step } from '../../../shared/travellers/step';
import { Action } from '../../components/ui/action';
import { DimensionHead } from '../../components/ui/heads';
import { EmptyNote, Note } from '../../components/ui/note';
import { Pending } from '../../components/ui/pending';
import { StateGlyph } from '../../components/ui/strut-glyph';
import { formatTime } from '../../lib/formats';
import { link } from '../../lib/live';
import { useMessages } from '../../lib/messages';
import { useStore } from '../../lib/store';
import { Drying } from './drying';
import { InHand } from './in-hand';
import { NotYet } from './not-yet';
import { Offered } from './offered';
import { AtTheDoor } from './at-the-door';
import { Told, Waiting } from './told';
import { benchNames, type BenchNames } from './names';
import { useBenchCommand } from './use-bench-command';
import { useMyBench, type MyBench as Mine } from './use-bench';

/** How many steps the list of what can be taken shows at first. */
const FIRST = 6;

interface Props {
  installationId: string;
  personId: string;
}

/** What I have in hand, what I can take, and what I still need to be allowed. */
export function MyBench({ installationId, personId }: Props) {
  const mine = useMyBench(installationId, personId);
  const messages = useMessages();
  if (!mine) return <Pending />;
  const me = mine.state.records.people.get(personId);
  const names = benchNames(mine.state, messages);
  if (!me?.confirmed) return <AtTheDoor installationId={installationId} me={me} state={mine.state} />;
  return <Confirmed installationId={installationId} personId={personId} mine={mine} names={names} />;
}

function Confirmed({ installationId, personId, mine, names }: Props & { mine: Mine; names: BenchNames }) {
  const { bench: words } = useMessages();
  const command = useBenchCommand(installationId, personId, names);
  const { state: linkState, heardAt } = useStore(link);
  const offline = linkState === 'broken';
  return (
    <div className="grid gap-8">
      <Told command={command} names={names} installationId={installationId} personId={personId} />
      {offline && <NoNetwork heardAt={heardAt} zone={names.zone} />}
      <Waiting installationId={installationId} personId={personId} names={names} />
      {mine.offered.map((step) => (
        <Offered key={step.id} step={step} installationId={installationId} names={names} />
      ))}
      <section aria-labelledby="bench-in-hand">
        <DimensionHead id="bench-in-hand" right={mine.inHand.length > 0 && <StateWord state="in hand" />}>
          {words.inHand}
        </DimensionHead>
        {mine.inHand.length === 0 && (
          <EmptyNote title={words.nothingInHand}>{words.nothingInHandText}</EmptyNote>
        )}
        {mine.inHand.map((step) => (
          <InHand
            key={step.id}
            step={step as StepRecord}
            installationId={installationId}
            personId={personId}
            names={names}
            now={mine.now}
            command={command}
            people={mine.state.records.people}
          />
        ))}
      </section>
      <Drying steps={mine.drying} installationId={installationId} names={names} now={mine.now} />
      <CanTake mine={mine} names={names} command={command} offline={offline} asOf={heardAt} />
      <NotYet entries={mine.notYet} names={names} installationId={installationId} />
    </div>
  );
}

function StateWord({ state }: { state: 'in hand' | 'drying' }) {
  const { common } = useMessages();
  return (
    <span
      className="inline-flex items-center gap-2"
      style={{ color: state === 'in hand' ? 'var(--s-hand)' : 'var(--s-drying)' }}
    >
      <StateGlyph state={state} /> {common.states[state]}
    </span>
  );
}

function NoNetwork({ heardAt, zone }: { heardAt: number | null; zone: string }) {
  const { bench: words } = useMessages();
  return (
    <Note kind="no network" title={words.offline.title(heardAt === null ? '' : formatTime(heardAt, zone))} />
  );
}

interface CanTakeProps {
  mine: Mine;
  names: BenchNames;
  command: ReturnType<typeof useBenchCommand>;
  offline: boolean;
  asOf: number | null;
}

function CanTake({ mine, names, command, offline, asOf }: CanTakeProps) {
  const { bench: words } = useMessages();
  const [all, setAll] = useState(false);
  const wanted = new Set(mine.handsWanted.map((step) => step.id));
  const hands = mine.handsWanted.flatMap((step) => mine.canTake.filter((entry) => entry.step.id === step.id));
  const entries = mine.canTake.filter(({ step }) => !wanted.has(step.id));
  const shown = all ? entries : entries.slice(0, FIRST);
  const row = (entry: BenchEntry, first: boolean) => (
    <TakeRow
      key={entry.step.id}
      entry={entry}
      first={first}
      names={names}
      command={command}
      offline={offline}
    />
  );
  return (
    <>
      {hands.length > 0 && (
        <section aria-labelledby="bench-hands">
          <DimensionHead id="bench-hands">{words.handsWanted}</DimensionHead>
          <ul>{hands.map((entry) => row(entry, false))}</ul>
        </section>
      )}
      <section aria-labelledby="bench-next">
        <DimensionHead
          id="bench-next"
          right={offline && asOf !== null ? words.offline.asItWas(formatTime(asOf, names.zone)) : undefined}
        >
          {words.next}
        </DimensionHead>
        {entries.length === 0 && <EmptyNote title={words.nothingNext}>{words.nothingNextText}</EmptyNote>}
        {offline && entries.length > 0 && <p className="mt-3">{words.offline.takingNeeds}</p>}
        <ul>
          <LostRow command={command} names={names} />
          {shown.map((entry, index) => row(entry, index === 0))}
        </ul>
        {shown.length < entries.length && (
          <Action look="words" onClick={() => setAll(true)}>
            {words.showAll(entries.length)}
          </Action>
        )}
      </section>
    </>
  );
}

/** A place lost a moment ago stays in the list, struck, so that it is not looked for. */
function LostRow({ command, names }: Pick<CanTakeProps, 'command' | 'names'>) {
  const { bench: words } = useMessages();
  const { outcome } = command;
  const step = outcome?.kind === 'taken' ? names.stepById(outcome.stepId) : undefined;
  const holder = step?.crew.at(-1);
  if (!step || !holder) return null;
  return (
    <li className="flex items-center justify-between gap-4 border-b border-rule py-4 text-pencil">
      <s className="bench-what">{names.whatOf(step)}</s>
      <span>{words.lost.has(names.personName(holder.personId))}</span>
    </li>
  );
}

function TakeRow({
  entry,
  first,
  names,
  command,
  offline,
}: { entry: BenchEntry; first: boolean } & Pick<CanTakeProps, 'names' | 'command' | 'offline'>) {
  const { bench: words } = useMessages();
  const { step, places, stepsBehind } = entry;
  const code = names.codeOf(step);
  return (
    <li className="flex items-center justify-between gap-4 border-b border-rule py-4">
      <div className="min-w-0">
        <h3 className="bench-what">
          <strong>{code}</strong> {step.name}
        </h3>
        <p>{words.stationPlaces(names.stationOf(step), places)}</p>
        <p className="text-pencil">{why(step, stepsBehind, first, words)}</p>
      </div>
      <Action
        className="shrink-0"
        size="phone"
        look={first ? 'main' : 'crossed'}
        label={words.takeThis(code, step.name)}
        busy={command.busyWith(step.id)}
        reason={offline ? words.offline.takingNeeds : undefined}
        onClick={() => command.run(step as StepRecord, 'claim')}
      >
        {words.take}
      </Action>
    </li>
  );
}

function why(
  step: Step,
  stepsBehind: number,
  first: boolean,
  words: ReturnType<typeof useMessages>['bench'],
): string {
  if (step.rework) return words.why.rework(step.rework.reason);
  if (step.crew.length > 0 && step.crew.length < step.crewMin)
    return words.why.handsWanted(step.crewMin - step.crew.length);
  if (first && stepsBehind > 0) return words.why.first;
  return words.why.behind(stepsBehind);
}
