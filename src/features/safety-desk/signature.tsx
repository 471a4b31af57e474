import { Pending } from '../../components/ui/pending';
import { useSignature } from './queries';

/** A signature on its line, as it was drawn or typed. */
export function Signature({
  installationId,
  signOffId,
  name,
}: {
  installationId: string;
  signOffId: string;
  name: string;
}) {
  const signature = useSignature(installationId, signOffId);
  if (signature.isPending) return <Pending />;
  if (signature.error) return <span className="text-pencil">cannot be shown</span>;
  const { kind, value } = signature.data;
  return (
    <span className="sign-line">
      {kind === 'typed' ? (
        <>
          <span className="sign-typed">{value}</span>
          <span className="sr-only">, typed</span>
        </>
      ) : (
        <svg
          className="sign-drawn"
          viewBox="0 0 600 160"
          role="img"
          aria-label={`drawn signature of ${name}`}
        >
          <path d={value} />
        </svg>
      )}
    </span>
  );
}
