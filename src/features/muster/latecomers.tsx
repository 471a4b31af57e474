import { Action } from '../../components/ui/action';
import { BigCode } from '../../components/ui/big-code';
import { DimensionHead } from '../../components/ui/heads';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { useJoinCode } from '../../lib/join-code';

/** The join code to be said across the desk to whoever comes without having read the poster. */
export function Latecomers({ installationId }: { installationId: string }) {
  const code = useJoinCode(installationId);
  return (
    <section className="grid gap-3" aria-labelledby="muster-code">
      <DimensionHead id="muster-code" right="for who comes now">
        Join code
      </DimensionHead>
      {code.isPending && <Pending />}
      <Refusal error={code.error} />
      {code.data && (
        <>
          <BigCode code={code.data.joinCode} />
          <p className="text-pencil">On their own phone they type it in, or open</p>
          <div className="break-all">
            <Action look="words" href={code.data.joinUrl}>
              {code.data.joinUrl.replace(/^https?:\/\//, '')}
            </Action>
          </div>
        </>
      )}
    </section>
  );
}
