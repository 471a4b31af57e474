import type { Deps } from '../../deps';
import { AppError } from '../../http/app-error';
import { SERVER_ACTOR } from '../../db/write';
import { dueDrying } from './steps.repository';
import { commandStep } from './steps.service';

/**
 * End every drying clock that has run out, each in a unit of work of its own, logged as the server's doing.
 * @returns how many were ended
 */
export async function endDueDrying(deps: Deps): Promise<number> {
  const due = await dueDrying(deps.data.reader.manager, deps.clock.now());
  let ended = 0;
  for (const { id, installation_id: installationId } of due) {
    try {
      await deps.writer.runPlain({ maker: SERVER_ACTOR, installationId }, (scope) =>
        commandStep(scope, installationId, id, null, { type: 'clock-ended' }),
      );
      ended += 1;
    } catch (error) {
      // "Still wet" or a lead's override came between: the step is no longer due.
      if (!(error instanceof AppError)) throw error;
    }
  }
  return ended;
}
