import { createHash, randomBytes } from 'node:crypto';
import type { DisplayTokenView } from '../../../shared/contracts/installations';
import { newId } from '../../../shared/kernel/ids';
import type { WriteScope } from '../../db/write';
import type { Deps } from '../../deps';
import { AppError, notFound } from '../../http/app-error';
import type { Principal } from '../../http/principal';
import { DisplayToken } from './installation.entity';
import { displayByHash } from './installations.repository';
import { assertOpen } from './installations.service';

/** A new token of 256 bits. */
export const newDisplayToken = (): string => randomBytes(32).toString('base64url');

const hashOf = (token: string) => createHash('sha256').update(token).digest('base64url');

/** The address a projector opens; the token stands in the fragment, which no server log sees. */
export const displayUrl = (publicUrl: string, token: string): string => `${publicUrl}/projector#${token}`;

/**
 * Let a projector in.
 * @param token from `newDisplayToken`; only its hash is kept
 */
export async function addDisplay(
  scope: WriteScope,
  installationId: string,
  label: string,
  token: string,
): Promise<DisplayTokenView> {
  await assertOpen(scope, installationId);
  const id = newId();
  await scope.manager.insert(DisplayToken, {
    id,
    installationId,
    label,
    tokenHash: hashOf(token),
    createdAt: scope.now,
    closedAt: null,
  });
  await scope.log({ action: 'display.added', subject: { displayId: id } });
  return { id, label, createdAt: scope.now, closed: false };
}

/** Close a projector's token, also on a closed installation: that only takes access away. */
export async function closeDisplay(
  scope: WriteScope,
  installationId: string,
  id: string,
): Promise<{ id: string }> {
  const closed = await scope.manager.query<unknown[]>(
    'UPDATE display_token SET closed_at = coalesce(closed_at, ?) WHERE id = ? AND installation_id = ? RETURNING id',
    [scope.now, id, installationId],
  );
  if (closed.length !== 1) throw notFound();
  await scope.log({ action: 'display.closed', subject: { displayId: id } });
  return { id };
}

/**
 * The projector behind a token.
 * @throws AppError LINK_SPENT
 */
export function findDisplay(deps: Deps, token: string): Principal {
  const id = displayByHash(deps.data.readHandle, hashOf(token));
  const principal = id === undefined ? null : deps.principals.find(`display:${id}`);
  if (!principal)
    throw new AppError('LINK_SPENT', 'This projector address was closed. Ask an organiser for a new one.');
  return principal;
}
