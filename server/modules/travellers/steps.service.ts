import type { LogEntry, WriteScope } from '../../db/write';
import { AppError, notFound } from '../../http/app-error';
import { DEFAULT_AGE_RULES, tightenAgeRules, type AgeRules } from '../../../shared/safety';
import type { InstallationRecord } from '../../../shared/contracts/live';
import {
  decide,
  followPieces,
  type Command,
  type PersonFacts,
  type Step,
  type Transition,
  type World,
} from '../../../shared/travellers';
import { activeStops, missingSignOffs } from '../safety';
import { refusalWords } from './refusal-words';
import {
  loadDryingAt,
  loadFieldJointsOf,
  loadNeeds,
  loadPerson,
  loadSettings,
  loadTraveller,
  saveStep,
  stepsOfPerson,
  type LoadedSteps,
} from './steps.repository';

/** What a command on a step answers with. */
export interface StepOutcome {
  stepId: string;
  event: string;
  revision: number;
  flags: string[];
  warnings: Transition['warnings'];
}

/** The server stands in for a person where its own clock acts. */
const NOBODY: PersonFacts = {
  id: 'server',
  confirmed: true,
  ageBand: '18+',
  duties: [],
  inHand: 0,
  missing: {},
};

/** Commands that a stop can forbid. */
const STOPPABLE = new Set<Command['type']>(['claim', 'accept', 'start', 'finish']);
/** Commands that need a valid sign-off. Finishing does not: work in hand is listed for the lead, not stopped. */
const SIGNED_OFF = new Set<Command['type']>(['claim', 'accept', 'start']);

/** The age table of an installation: the defaults, tightened as the organiser wished. */
export function ageRulesOf(settings: InstallationRecord['settings']): AgeRules {
  const tightened = tightenAgeRules(DEFAULT_AGE_RULES, settings.ageChanges);
  if (!tightened.ok) throw new Error('The stored age rules contradict the table.');
  return tightened.value;
}

/**
 * Decide a command on a step and write what follows: the one use case behind every route of the board.
 * @param personId who asks; null for the server's own clock
 * @throws AppError with the refusal's code and words; notFound for a step or person that is not of the installation
 */
export async function commandStep(
  scope: WriteScope,
  installationId: string,
  stepId: string,
  personId: string | null,
  command: Command,
): Promise<StepOutcome> {
  const { manager, now } = scope;
  const installation = await loadSettings(manager, installationId);
  if (!installation) throw notFound();
  if (installation.status === 'closed') {
    throw new AppError('INSTALLATION_CLOSED', 'This installation is closed: nothing on it changes any more.');
  }
  if (installation.status === 'draft') {
    throw new AppError(
      'INSTALLATION_NOT_PUBLISHED',
      'Work begins when an organiser publishes the installation.',
    );
  }
  const traveller = await loadTraveller(manager, installationId, stepId);
  const step = traveller.steps.find((other) => other.id === stepId);
  if (!step) throw notFound();
  const station =
    command.type === 'still-wet' ? await loadDryingAt(manager, installationId, step.stationId) : none();
  // Stops and sign-offs concern steps with a hazard or a tool; for the others there is nothing to look up.
  const dangerous = step.hazards.length > 0 || step.toolKinds.length > 0;
  const missingPieces =
    step.state === 'waiting' || command.type === 'pass'
      ? (await loadNeeds(manager, step.subAssemblyId)).filter((need) => !need.passed).map((need) => need.code)
      : [];
  const settings = JSON.parse(installation.settings) as InstallationRecord['settings'];
  const world: World = {
    now,
    step,
    traveller: traveller.steps,
    missingPieces,
    station: station.steps,
    person: await personFacts(scope, installationId, personId, dangerous && SIGNED_OFF.has(command.type)),
    stops: dangerous && STOPPABLE.has(command.type) ? await activeStops(manager, installationId) : [],
    settings: { maxInHand: settings.maxInHand, ageRules: ageRulesOf(settings) },
  };
  if (command.type === 'offer' && !(await loadPerson(manager, installationId, command.to))) throw notFound();
  const decision = decide(world, command);
  if (!decision.ok) {
    const { code, details } = decision.refusal;
    throw new AppError(code, refusalWords(decision.refusal, step), { details: { ...details, stepId } });
  }
  const known = {
    steps: [...traveller.steps, ...station.steps],
    revisions: new Map([...station.revisions, ...traveller.revisions]),
  };
  return apply(scope, installationId, step, decision.value, known, logOf(command, personId));
}

const none = (): LoadedSteps => ({ steps: [], revisions: new Map() });

async function personFacts(
  scope: WriteScope,
  installationId: string,
  personId: string | null,
  withSignOffs: boolean,
): Promise<PersonFacts> {
  if (personId === null) return NOBODY;
  const person = await loadPerson(scope.manager, installationId, personId);
  if (!person) throw notFound();
  return {
    id: person.id,
    confirmed: person.confirmed,
    ageBand: person.age_band,
    duties: person.duties,
    inHand: person.inHand,
    missing: withSignOffs ? await missingSignOffs(scope.manager, installationId, personId, scope.now) : {},
  };
}

/** What the day log keeps of a command beside its step. */
function logOf(
  command: Command,
  personId: string | null,
): Pick<LogEntry, 'subject' | 'happenedAt' | 'forPersonId'> {
  const forPersonId = null;
  switch (command.type) {
    case 'finish':
      return { subject: {}, happenedAt: command.happenedAt, forPersonId };
    case 'record':
      return {
        subject: { crew: command.crew },
        happenedAt: command.happenedAt,
        forPersonId: command.crew[0] ?? personId,
      };
    case 'offer':
      return { subject: { to: command.to }, forPersonId };
    case 'still-wet':
      return { subject: { seconds: command.seconds }, forPersonId };
    case 'end-drying':
    case 'hold':
      return { subject: { reason: command.reason }, forPersonId };
    case 'rework':
      return { subject: { reason: command.reason, targetId: command.targetId }, forPersonId };
    case 'release':
      return { subject: { note: command.note }, forPersonId };
    default:
      return { subject: {}, forPersonId };
  }
}

async function apply(
  scope: WriteScope,
  installationId: string,
  step: Step,
  transition: Transition,
  known: LoadedSteps,
  log: Pick<LogEntry, 'subject' | 'happenedAt' | 'forPersonId'>,
): Promise<StepOutcome> {
  const revision = await scope.revision();
  for (const after of transition.steps) {
    const before = known.steps.find((other) => other.id === after.id);
    const read = known.revisions.get(after.id);
    if (!before || read === undefined)
      throw new Error(`A transition changed step ${after.id}, which was not loaded.`);
    const saved = await saveStep(
      scope.manager,
      installationId,
      before,
      after,
      { read, next: revision },
      transition.event,
      scope.now,
    );
    if (!saved)
      throw new AppError('STALE_PAGE', 'Somebody changed this step a moment ago. Look at it again.');
    scope.changed('steps', after.id);
  }
  await followFieldJoints(scope, installationId, step.subAssemblyId, known, transition, revision);
  await scope.log({
    action: transition.event,
    ...log,
    subject: { stepId: step.id, subAssemblyId: step.subAssemblyId, ...log.subject },
    flags: transition.flags,
  });
  return {
    stepId: step.id,
    event: transition.event,
    revision,
    flags: transition.flags,
    warnings: transition.warnings,
  };
}

/** Field joints open when the last of their pieces passes, and close when one of them is sent back. */
async function followFieldJoints(
  scope: WriteScope,
  installationId: string,
  pieceId: string,
  known: LoadedSteps,
  transition: Transition,
  revision: number,
): Promise<void> {
  const before = known.steps.filter((other) => other.subAssemblyId === pieceId);
  const after = before.map((step) => transition.steps.find((other) => other.id === step.id) ?? step);
  const all = (steps: readonly Step[]) => steps.every((step) => step.state === 'passed');
  if (all(before) === all(after)) return;
  const joints = await loadFieldJointsOf(scope.manager, installationId, pieceId);
  for (const joint of joints) {
    const passed = new Map(joint.needs.map((need) => [need.id, need.passed]));
    const changed = followPieces(
      pieceId,
      [{ needs: [...passed.keys()], steps: joint.steps.steps }],
      (id) => passed.get(id) ?? false,
    );
    for (const step of changed) {
      const old = joint.steps.steps.find((other) => other.id === step.id);
      const read = joint.steps.revisions.get(step.id);
      if (!old || read === undefined) throw new Error(`Field joint step ${step.id} was not loaded.`);
      await saveStep(
        scope.manager,
        installationId,
        old,
        step,
        { read, next: revision },
        transition.event,
        scope.now,
      );
      scope.changed('steps', step.id);
    }
  }
}

/**
 * Give back every place a person holds, because they left or were removed.
 * @returns ids of the steps
 */
export async function releasePlaces(
  scope: WriteScope,
  installationId: string,
  personId: string,
  reason: string,
): Promise<string[]> {
  const held = await stepsOfPerson(scope.manager, installationId, personId);
  for (const { step_id: stepId } of held) {
    const traveller = await loadTraveller(scope.manager, installationId, stepId);
    const step = traveller.steps.find((other) => other.id === stepId);
    if (!step) continue;
    const person = { ...NOBODY, id: personId };
    const world: World = {
      now: scope.now,
      step,
      traveller: traveller.steps,
      station: [],
      person,
      stops: [],
      settings: { maxInHand: 0, ageRules: DEFAULT_AGE_RULES },
    };
    const decision = decide(world, { type: 'give-back' });
    if (decision.ok)
      await apply(scope, installationId, step, decision.value, traveller, {
        subject: { reason },
        forPersonId: personId,
      });
  }
  return held.map((row) => row.step_id);
}
