import { PageHead } from '../../components/ui/heads';

/** The sign-off register, newest row first. */
export function RegisterPage({ installationId }: { installationId: string }) {
  return <PageHead title="Register" summary={installationId} />;
}
