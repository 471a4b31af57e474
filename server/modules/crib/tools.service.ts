import type { ToolInput } from '../../../shared/contracts/crib';
import { newId } from '../../../shared/kernel/ids';
import type { WriteScope } from '../../db/write';
import { AppError, fieldError, notFound } from '../../http/app-error';
import { assertOpen } from '../installations';
import { Tool } from './crib.entity';
import { isNumberTaken, loadHolder, loadTool, openCheckout, type LoadedTool } from './crib.repository';

async function toolOf(scope: WriteScope, installationId: string, id: string): Promise<LoadedTool> {
  const tool = await loadTool(scope.manager, installationId, id);
  if (!tool) throw notFound();
  return tool;
}

async function guardNumber(
  scope: WriteScope,
  installationId: string,
  number: string,
  except: string,
): Promise<void> {
  if (await isNumberTaken(scope.manager, installationId, number, except)) {
    throw fieldError('number', 'taken', `A tool has the number ${number} already. Choose the next one.`);
  }
}

/** Put a tool on the list. */
export async function addTool(
  scope: WriteScope,
  installationId: string,
  input: ToolInput,
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  await guardNumber(scope, installationId, input.number, '');
  const id = newId();
  await scope.manager.insert(Tool, {
    id,
    installationId,
    ...input,
    tag: null,
    revision: await scope.revision(),
    removedAt: null,
  });
  scope.changed('tools', id);
  await scope.log({ action: 'tool.added', subject: { toolId: id } });
  return { id };
}

/** Change what the list says of a tool. */
export async function editTool(
  scope: WriteScope,
  installationId: string,
  id: string,
  input: ToolInput,
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  await toolOf(scope, installationId, id);
  await guardNumber(scope, installationId, input.number, id);
  await scope.manager.update(Tool, { id }, { ...input, revision: await scope.revision() });
  scope.changed('tools', id);
  await scope.log({ action: 'tool.edited', subject: { toolId: id } });
  return { id };
}

/**
 * Take a tool off the list.
 * @throws AppError IN_USE while it is out
 */
export async function removeTool(
  scope: WriteScope,
  installationId: string,
  id: string,
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  const tool = await toolOf(scope, installationId, id);
  const out = await openCheckout(scope.manager, id);
  if (out)
    throw new AppError('IN_USE', `${tool.number} is out with ${out.name}. Take it back first.`, {
      details: { ...out },
    });
  await scope.manager.update(Tool, { id }, { removedAt: scope.now, revision: await scope.revision() });
  scope.changed('tools', id);
  await scope.log({ action: 'tool.removed', subject: { toolId: id } });
  return { id };
}

/** Tag a tool out of use: who, why, when. A tag that hangs there already is replaced only by clearing it. */
export async function tagTool(
  scope: WriteScope,
  installationId: string,
  id: string,
  by: string,
  reason: string,
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  const tool = await toolOf(scope, installationId, id);
  if (tool.tag) {
    throw new AppError('TOOL_OUT_OF_USE', `${tool.number} is tagged out of use already: ${tool.tag.reason}`, {
      details: { ...tool.tag },
    });
  }
  await scope.manager.update(
    Tool,
    { id },
    { tag: { reason, by, at: scope.now }, revision: await scope.revision() },
  );
  scope.changed('tools', id);
  await scope.log({ action: 'tool.tagged', subject: { toolId: id, reason } });
  return { id };
}

/**
 * Clear a tag after inspection: its author, or a second authorised person who gives a reason.
 * @throws AppError TOOL_TAG_OTHER for a second person without a reason
 */
export async function clearTag(
  scope: WriteScope,
  installationId: string,
  id: string,
  by: string,
  reason: string,
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  const tool = await toolOf(scope, installationId, id);
  if (!tool.tag) throw new AppError('STALE_PAGE', `${tool.number} has no tag any more. Look at it again.`);
  if (tool.tag.by !== by && reason.trim().length < 3) {
    const author = (await loadHolder(scope.manager, tool.tag.by))?.name ?? 'somebody';
    throw new AppError(
      'TOOL_TAG_OTHER',
      `${author} tagged ${tool.number}. To clear it as a second person, say what you inspected and why it is safe.`,
      {
        details: { ...tool.tag },
        fields: [{ path: 'reason', code: 'missing', message: 'Say what you inspected and why it is safe.' }],
      },
    );
  }
  await scope.manager.update(Tool, { id }, { tag: null, revision: await scope.revision() });
  scope.changed('tools', id);
  await scope.log({ action: 'tool.tag-cleared', subject: { toolId: id, taggedBy: tool.tag.by, reason } });
  return { id };
}
