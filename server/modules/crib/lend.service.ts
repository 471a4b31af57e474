import type { Lend, TakeBack } from '../../../shared/contracts/crib';
import type { InstallationRecord } from '../../../shared/contracts/live';
import { decideLend, type LendRefusal } from '../../../shared/crib';
import { newId } from '../../../shared/kernel/ids';
import { ageRefusalText, HAZARD_LABELS, type AgeRefusal, type Hazard } from '../../../shared/safety';
import type { WriteScope } from '../../db/write';
import { AppError, fieldError, notFound } from '../../http/app-error';
import { assertOpen } from '../installations';
import { activeStops, missingSignOffs } from '../safety';
import { ageRulesOf } from '../travellers';
import { Checkout, Tool } from './crib.entity';
import {
  hasStation,
  loadBorrower,
  loadHolder,
  loadTool,
  openCheckout,
  type LoadedTool,
} from './crib.repository';

/** What the keeper is told when a tool goes out. */
export interface LendOutcome {
  checkoutId: string;
  backBy: number;
}

/**
 * Lend a tool to a present person signed off for it, or to a station in that person's charge.
 * @param keeperId the crib keeper
 * @throws AppError with the rule and its numbers; the tool stays where it is
 */
export async function lendTool(
  scope: WriteScope,
  installationId: string,
  keeperId: string,
  toolId: string,
  input: Lend,
): Promise<LendOutcome> {
  const { manager, now } = scope;
  const { settings } = await assertOpen(scope, installationId);
  const tool = await loadTool(manager, installationId, toolId);
  if (!tool) throw notFound();
  const person = await loadBorrower(manager, installationId, input.personId);
  if (!person)
    throw fieldError('personId', 'unknown', 'Nobody here has this number. Ask at the muster desk.');
  if (input.stationId !== null && !(await hasStation(manager, installationId, input.stationId))) {
    throw fieldError('stationId', 'unknown', 'This station is not there any more. Choose another one.');
  }
  const out = await openCheckout(manager, toolId);
  const decision = decideLend({
    tool,
    out,
    person: { ...person, missing: await missingSignOffs(manager, installationId, input.personId, now) },
    stationId: input.stationId,
    stops: await activeStops(manager, installationId),
    ageRules: ageRulesOf(JSON.parse(settings) as InstallationRecord['settings']),
  });
  if (!decision.ok) {
    const { code, details } = decision.refusal;
    const tagBy = tool.tag ? ((await loadHolder(manager, tool.tag.by))?.name ?? 'somebody') : '';
    throw new AppError(
      code,
      lendWords(decision.refusal, tool, person.name, { holder: out?.name ?? '', tagBy }),
      { details },
    );
  }
  const id = newId();
  const backBy = now + input.minutes * 60_000;
  const revision = await scope.revision();
  await manager.insert(Checkout, {
    id,
    installationId,
    toolId,
    personId: input.personId,
    stationId: input.stationId,
    outAt: now,
    outBy: keeperId,
    backBy,
    backAt: null,
    takenBackBy: null,
    conditionBack: null,
    revision,
  });
  scope.changed('checkouts', id);
  await scope.log({
    action: 'tool.lent',
    subject: { toolId, checkoutId: id, personId: input.personId, stationId: input.stationId, backBy },
    forPersonId: input.personId,
  });
  return { checkoutId: id, backBy };
}

function lendWords(
  { code, details }: LendRefusal,
  tool: LoadedTool,
  person: string,
  names: { holder: string; tagBy: string },
): string {
  const what = `${tool.number} ${tool.name}`;
  switch (code) {
    case 'TOOL_OUT':
      return `${what} is out already, with ${names.holder}. Take it back first, or lend another one.`;
    case 'TOOL_OUT_OF_USE':
      return `${what} is tagged out of use by ${names.tagBy}: ${tool.tag?.reason ?? ''} Lend another one.`;
    case 'PERSON_NOT_CONFIRMED':
      return `The muster desk has not confirmed ${person} yet. Send them there first.`;
    case 'PERSON_NOT_ON_SITE':
      return `${person} is signed out for today. Send them to the muster desk first.`;
    case 'STOP_ACTIVE':
      return `A stop covers ${what}. It stays in the crib until a safety lead lifts the stop.`;
    case 'AGE_RULE':
      return `Not for ${person}. ${ageRefusalText({ verdict: 'refused', subject: '', ...details } as unknown as AgeRefusal, tool.name)}`;
    case 'SIGN_OFF_MISSING':
      return `${person} has no valid ${HAZARD_LABELS[details.hazard as Hazard]} sign-off. They read the briefing, answer and sign on their phone, and a safety lead countersigns.`;
  }
}

/**
 * Take a tool back: always possible, also under a stop, in a closed installation, and from somebody who has left.
 * @param input its condition, and a reason to tag it out of use at once
 */
export async function takeBackTool(
  scope: WriteScope,
  installationId: string,
  takerId: string | null,
  toolId: string,
  input: TakeBack,
): Promise<{ checkoutId: string }> {
  const { manager, now } = scope;
  const tool = await loadTool(manager, installationId, toolId);
  if (!tool) throw notFound();
  const out = await openCheckout(manager, toolId);
  if (!out) {
    throw new AppError(
      'TOOL_NOT_OUT',
      `${tool.number} ${tool.name} is in the crib by our list. Look at the number again.`,
    );
  }
  const revision = await scope.revision();
  await manager.update(
    Checkout,
    { id: out.id },
    { backAt: now, takenBackBy: takerId, conditionBack: input.condition || null, revision },
  );
  scope.changed('checkouts', out.id);
  const tag =
    input.tagReason === null || takerId === null
      ? tool.tag
      : { reason: input.tagReason, by: takerId, at: now };
  if (input.condition !== '' || tag !== tool.tag) {
    await manager.update(
      Tool,
      { id: toolId },
      { condition: input.condition || tool.condition, tag, revision },
    );
    scope.changed('tools', toolId);
  }
  await scope.log({
    action: 'tool.taken-back',
    subject: { toolId, checkoutId: out.id, personId: out.personId, late: now > out.backBy },
    forPersonId: out.personId,
  });
  if (tag !== tool.tag)
    await scope.log({ action: 'tool.tagged', subject: { toolId, reason: input.tagReason } });
  return { checkoutId: out.id };
}
