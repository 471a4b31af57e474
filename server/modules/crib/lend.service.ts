import type { Lend, TakeBack } from '../../../shared/contracts/crib';
import type { InstallationRecord } from '../../../shared/contracts/live';
import { decideLend } from '../../../shared/crib';
import { newId } from '../../../shared/kernel/ids';
import type { AgeLimit } from '../../../shared/safety';
import type { WriteScope } from '../../db/write';
import { AppError, fieldError, notFound } from '../../http/app-error';
import { assertOpen } from '../installations';
import { activeStops, missingSignOffs } from '../safety';
import { ageRulesOf } from '../travellers';
import { Checkout, Tool } from './crib.entity';
import {
  closeCheckout,
  hasStation,
  loadBorrower,
  loadHolder,
  loadTool,
  openCheckout,
} from './crib.repository';
import { lendWords } from './lend-words';

/** What the keeper is told when a tool goes out. */
export interface LendOutcome {
  checkoutId: string;
  backBy: number;
  /** To be said when handing it over to somebody under 18. */
  limits: readonly AgeLimit[];
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
    const tagger = tool.tag ? ((await loadHolder(manager, tool.tag.by))?.name ?? 'somebody') : '';
    const names = { borrower: person.name, holder: out?.name ?? '', tagger };
    throw new AppError(code, lendWords(decision.refusal, tool, names, now), { details: { ...details } });
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
  return { checkoutId: id, backBy, limits: decision.value.limits };
}

/**
 * Take a tool back: always possible, also under a stop, in a closed installation, and from somebody who has left.
 * @param takerId who takes it back
 * @param input its condition, and a reason to tag it out of use at once. A tag that hangs there already stays its author's;
 *   what is found then is kept as the tool's condition.
 * @throws AppError TOOL_NOT_OUT
 */
export async function takeBackTool(
  scope: WriteScope,
  installationId: string,
  takerId: string,
  toolId: string,
  input: TakeBack,
): Promise<{ checkoutId: string }> {
  const { manager, now } = scope;
  const tool = await loadTool(manager, installationId, toolId);
  if (!tool) throw notFound();
  const found = tool.tag === null ? [input.condition] : [input.condition, input.tagReason ?? ''];
  const condition = found.filter((words) => words !== '').join('; ');
  const revision = await scope.revision();
  const back = { at: now, by: takerId, condition: condition || null, revision };
  const closed = await closeCheckout(manager, toolId, back);
  if (!closed) {
    throw new AppError(
      'TOOL_NOT_OUT',
      `${tool.number} ${tool.name} is in the crib by our list. Look at the number again.`,
    );
  }
  scope.changed('checkouts', closed.id);
  const tagged = input.tagReason !== null && tool.tag === null;
  if (condition !== '' || tagged) {
    const tag = tagged ? { reason: input.tagReason ?? '', by: takerId, at: now } : tool.tag;
    await manager.update(Tool, { id: toolId }, { condition: condition || tool.condition, tag, revision });
    scope.changed('tools', toolId);
  }
  await scope.log({
    action: 'tool.taken-back',
    subject: { toolId, checkoutId: closed.id, personId: closed.personId, late: now > closed.backBy },
    forPersonId: closed.personId,
  });
  if (tagged) await scope.log({ action: 'tool.tagged', subject: { toolId, reason: input.tagReason } });
  return { checkoutId: closed.id };
}
