import { useQueryClient } from '@tanstack/react-query';
import type { JoinCodeView } from '../../../shared/contracts/installations';
import type { InstallationRecord } from '../../../shared/contracts/live';
import { BigCode } from '../../components/ui/big-code';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { DimensionHead } from '../../components/ui/heads';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { formatDay, formatTime } from '../../lib/formats';
import { joinCodeKey, useJoinCode } from '../../lib/join-code';
import { useMay } from '../../lib/session';
import { CopyLine } from './copy-line';

/** The code on the poster and its link; a new one when it got about. */
export function JoinCodeSection({ installation }: { installation: InstallationRecord }) {
  const { id, timeZone, status } = installation;
  const client = useQueryClient();
  const may = useMay(id);
  const code = useJoinCode(id);
  return (
    <section className="grid gap-4" aria-labelledby="join-code">
      <DimensionHead id="join-code">Join code</DimensionHead>
      {code.error && <Refusal error={code.error} />}
      {code.isPending && <Pending />}
      {code.data && (
        <>
          <BigCode code={code.data.joinCode} />
          <CopyLine label="address that opens it" text={code.data.joinUrl} />
          <p className="text-pencil">
            {`In use since ${formatDay(code.data.renewedAt, timeZone)}, ${formatTime(code.data.renewedAt, timeZone)}. `}
            Whoever joins with it waits for the muster desk before they can claim anything.
          </p>
          {may('installation.renew-code') && status !== 'closed' && (
            <div>
              <ConfirmAction<JoinCodeView>
                words="Make a new code"
                title="Make a new join code?"
                confirm="Make a new one"
                wish={{ method: 'POST', path: `/installations/${id}/join-code` }}
                onDone={(view) => client.setQueryData(joinCodeKey(id), view)}
              >
                <p>
                  {`${code.data.joinCode} stops working at once, on every poster and in every message. `}
                  Print the poster again. Whoever has joined already stays in.
                </p>
              </ConfirmAction>
            </div>
          )}
        </>
      )}
    </section>
  );
}
