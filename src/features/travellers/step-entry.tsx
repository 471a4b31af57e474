import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import type { PersonRecord, StationRecord, StepRecord } from '../../../shared/contracts/live';
import { HAZARD_LABELS } from '../../../shared/safety/hazards';
import { shownState } from '../../../shared/travellers/step';
import { Action } from '../../components/ui/action';
import { Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { StateWord } from '../../components/ui/strut-glyph';
import { ApiError, send } from '../../lib/api';
import { counted, formatDuration, formatTime, listed } from '../../lib/formats';
import { useMessages } from '../../lib/messages';
import { refusalText, type AnyRefusal } from '../../lib/refusal-words';
import { commandStep, QUEUED_COMMANDS, type QueuedCommand } from '../../lib/write-queue';
import type { Deed, Offer } from './step-actions';
import { needsForm, StepForm, type FormDeed } from './step-forms';

export interface StepEntryProps {
  installationId: string;
  code: string;
  step: StepRecord;
  traveller: readonly StepRecord[];
  station: StationRecord | undefined;
  zone: string;
  nameOf(personId: string): string;
  /** Present people, for offers and records. */
  people: readonly PersonRecord[];
  personId: string | null;
  offers: readonly Offer[];
  /** Leads see who ever worked on it. */
  showDoers: boolean;
  /** The step that counts now stands open; the others open when asked. */
  open: boolean;
}

const DEED_WORDS: Record<Deed, string> = {
  claim: 'Take a place',
  'give-back': 'Give back',
  offer: 'Hand over',
  accept: 'Take it over',
  withdraw: 'Take the offer back',
  start: 'Start',
  finish: 'Finished',
  record: 'Record from paper',
  'end-drying': 'End drying early',
  'still-wet': 'Still wet',
  pass: 'Passed',
  rework: 'Back for rework',
  hold: 'Hold',
  release: 'Release',
};
const MAIN_DEEDS = new Set<Deed>(['claim', 'accept', 'start', 'finish', 'pass']);

/** What broke when something was recorded after it was done. */
const FLAG_WORDS: Record<string, string> = {
  RECORDED_FROM_PAPER: 'typed in from paper',
  STEP_HELD: 'done while it was held',
  STEP_NOT_READY: 'done before the step in front of it had passed',
  STEP_NOT_STARTED: 'finished without having been begun',
  STOP_ACTIVE: 'finished under a stop',
};

const isQueued = (deed: Deed): deed is QueuedCommand => (QUEUED_COMMANDS as readonly Deed[]).includes(deed);

/** One step of a traveller: its state, who, when, what stands against it, and what this person may do. */
export function StepEntry(props: StepEntryProps) {
  const { step, station, open } = props;
  const state = shownState(step);
  const id = `step-${step.id}`;
  const head = (
    <>
      <span className="step-number">{step.position}</span>
      <span className="step-name" id={id}>
        {step.name}
      </span>
      <span className="text-pencil">{station?.name}</span>
      <span className="step-state">
        <StateWord state={state} />
      </span>
    </>
  );
  if (open)
    return (
      <li className="step-entry" data-now="" aria-labelledby={id}>
        <div className="step-head">{head}</div>
        <StepBody {...props} />
      </li>
    );
  return (
    <li className="step-entry">
      <details>
        <summary className="step-head">{head}</summary>
        <StepBody {...props} />
      </details>
    </li>
  );
}

function StepBody(props: StepEntryProps) {
  const { step, offers } = props;
  return (
    <div className="step-body">
      <Facts {...props} />
      {step.held && (
        <p className="text-held">
          Held by {props.nameOf(step.held.by)} at {formatTime(step.held.at, props.zone)}: {step.held.reason}
        </p>
      )}
      {step.rework && (
        <p className="text-rework">
          Sent back by {props.nameOf(step.rework.by)} at {formatTime(step.rework.at, props.zone)}:{' '}
          {step.rework.reason}
        </p>
      )}
      {step.flags.length > 0 && (
        <p className="text-rework">
          Look at it well: {listed(step.flags.map((flag) => FLAG_WORDS[flag] ?? 'a rule was broken'))}.
        </p>
      )}
      {offers.length > 0 && <Deeds {...props} />}
    </div>
  );
}

/** Who and when, one fact each. */
function Facts({ step, zone, nameOf, showDoers }: StepEntryProps) {
  const time = (at: number) => formatTime(at, zone);
  const facts: [string, string][] = [];
  if (step.crew.length > 0)
    facts.push([
      'crew',
      listed(step.crew.map(({ personId, claimedAt }) => `${nameOf(personId)} since ${time(claimedAt)}`)),
    ]);
  const size =
    step.crewMin === step.crewMax
      ? counted(step.crewMax, 'place')
      : `${step.crewMin} to ${step.crewMax} places`;
  facts.push(['planned', `${formatDuration(step.plannedSeconds)}, ${size}`]);
  if (step.hazards.length > 0)
    facts.push(['sign-off', listed(step.hazards.map((hazard) => HAZARD_LABELS[hazard]))]);
  if (step.toolKinds.length > 0) facts.push(['tools', listed(step.toolKinds)]);
  if (step.handOver) facts.push(['offered', `to ${nameOf(step.handOver.to)} at ${time(step.handOver.at)}`]);
  if (step.startedAt !== null) facts.push(['begun', time(step.startedAt)]);
  if (step.finishedAt !== null)
    facts.push([
      'finished',
      `${time(step.finishedAt)}${step.finishedBy ? ` by ${nameOf(step.finishedBy)}` : ''}`,
    ]);
  if (step.dryUntil !== null) facts.push(['dry', `at ${time(step.dryUntil)}`]);
  if (step.passedAt !== null)
    facts.push([
      'passed',
      `${time(step.passedAt)}${step.passedBy ? `, checked by ${nameOf(step.passedBy)}` : ''}`,
    ]);
  if (showDoers && step.doers.length > 0) facts.push(['worked on it', listed(step.doers.map(nameOf))]);
  return (
    <dl className="step-facts">
      {facts.map(([word, text]) => (
        <div key={word}>
          <dt>{word}</dt>
          <dd>{text}</dd>
        </div>
      ))}
    </dl>
  );
}

function Deeds(props: StepEntryProps) {
  const { installationId, code, step, zone, nameOf, personId, offers } = props;
  const messages = useMessages();
  const [form, setForm] = useState<FormDeed | null>(null);
  const path = `/installations/${installationId}/steps/${step.id}`;
  const what = `${code} ${step.name}`;
  const say = (refusal: AnyRefusal) => refusalText(refusal, { messages, zone, what, step, nameOf });
  const act = useMutation({
    mutationFn: (deed: Deed) =>
      isQueued(deed) && personId !== null
        ? commandStep({ personId, installationId, stepId: step.id, command: deed })
        : send('POST', `${path}/${deed}`),
  });
  const press = (deed: Deed) => {
    act.reset();
    if (needsForm(deed)) setForm(deed);
    else if (!act.isPending) act.mutate(deed);
  };
  // A form whose deed the step no longer allows has lost its sense, unless what was typed is still being sent.
  const shown = offers.some((offer) => offer.deed === form && !offer.refusal) ? form : null;
  return (
    <>
      {act.error instanceof ApiError && (
        <Note kind={act.error.code === 'STEP_CREW_FULL' ? 'taken' : 'refused'} title={`${what}: not now.`}>
          {say({ code: act.error.code, details: act.error.details })}
        </Note>
      )}
      {act.error && !(act.error instanceof ApiError) && <Refusal error={act.error} />}
      {act.data === 'queued' && (
        <Note kind="no network" title="Not yours yet.">
          There is no network. It is sent when the network is back, in the order you asked.
        </Note>
      )}
      <div className="step-deeds">
        {offers.map(({ deed, refusal }) => (
          <Action
            key={deed}
            look={MAIN_DEEDS.has(deed) ? 'main' : 'plain'}
            label={`${DEED_WORDS[deed]}: ${what}`}
            busy={act.isPending && act.variables === deed}
            reason={refusal ? say(refusal) : undefined}
            expanded={needsForm(deed) ? shown === deed : undefined}
            onClick={() => press(deed)}
          >
            {deed === 'withdraw' && step.handOver?.to === personId ? 'No, thank you' : DEED_WORDS[deed]}
          </Action>
        ))}
      </div>
      {shown && (
        <StepForm
          key={shown}
          deed={shown}
          step={step}
          traveller={props.traveller}
          path={path}
          people={props.people}
          onClose={() => setForm(null)}
        />
      )}
    </>
  );
}
