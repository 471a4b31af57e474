import { PageHead } from '../../components/ui/heads';

/** The safety lead's desk: who has signed and waits for a countersign. */
export function CountersignDesk({ installationId }: { installationId: string }) {
  return <PageHead title="Countersign" summary={installationId} />;
}
