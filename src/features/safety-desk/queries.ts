import { useQueries, useQuery, useQueryClient } from '@tanstack/react-query';
import type { BriefingRecord } from '../../../shared/contracts/live';
import type {
  BriefingTextView,
  ProposedVersionView,
  RegisterView,
  WholeVersionView,
} from '../../../shared/contracts/safety';
import { get } from '../../lib/api';
import { useLive } from '../../lib/live';

/** A signature as it was given: a typed name, or an SVG path in a 600 x 160 box. */
export interface SignatureView {
  kind: 'typed' | 'drawn';
  value: string;
}

/** The signature of one sign-off. */
export const useSignature = (installationId: string, signOffId: string) =>
  useQuery({
    queryKey: ['signature', installationId, signOffId],
    queryFn: () => get<SignatureView>(`/installations/${installationId}/sign-offs/${signOffId}/signature`),
    staleTime: Infinity,
    retry: false,
  });

const textQuery = (installationId: string, key: string, version: number) => ({
  queryKey: ['briefing-text', installationId, key, version],
  queryFn: () =>
    get<BriefingTextView>(`/installations/${installationId}/briefings/${key}?version=${version}`),
  // A published version never changes.
  staleTime: Infinity,
});

/**
 * The newest version of a briefing with its right answers, to write the next one from.
 * @param newest its number, as the live state knows it
 */
export const useNewestVersion = (installationId: string, key: string, newest: number) =>
  useQuery({
    queryKey: ['briefing-newest', installationId, key, newest],
    queryFn: () => get<WholeVersionView>(`/installations/${installationId}/briefings/${key}/versions`),
    // Somebody may publish another one while this one is written on: the words must not change under the hands.
    staleTime: Infinity,
  });

/** The questions of a version by id; undefined until its text is there. */
export type QuestionsOf = (key: string, version: number) => ReadonlyMap<string, string> | undefined;

/** Questions of the versions that people have answered. */
export function useQuestions(
  installationId: string,
  wanted: readonly { briefing: Pick<BriefingRecord, 'key'>; signOff: { version: number } }[],
): QuestionsOf {
  const pairs = [
    ...new Map(
      wanted.map(({ briefing: { key }, signOff: { version } }) => [`${key} ${version}`, { key, version }]),
    ).values(),
  ];
  const texts = useQueries({
    queries: pairs.map(({ key, version }) => textQuery(installationId, key, version)),
  });
  return (key, version) => {
    const text = texts[pairs.findIndex((pair) => pair.key === key && pair.version === version)]?.data;
    return text && new Map(text.body.questions.map((question) => [question.id, question.text]));
  };
}

const proposalsKey = (installationId: string, key: string) => ['proposals', installationId, key] as const;

/** Corrections that wait for a second safety lead. They are no live records, so they are asked for now and then. */
export const useProposals = (installationId: string, key: string) =>
  useQuery({
    queryKey: proposalsKey(installationId, key),
    queryFn: () => get<ProposedVersionView[]>(`/installations/${installationId}/briefings/${key}/proposals`),
    refetchInterval: 20_000,
  });

/** Fetches the proposals of a briefing again. */
export function useReloadProposals(installationId: string, key: string) {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: proposalsKey(installationId, key) });
}

/** The register, checked by the server each time it is read. */
export function useRegister(installationId: string) {
  // Every row is written with a change of a sign-off or a briefing, which raises the installation's revision.
  const signOffs = useLive(installationId, (state) => state.records.signOffs);
  const briefings = useLive(installationId, (state) => state.records.briefings);
  const newest = Math.max(
    0,
    ...[...(signOffs?.values() ?? []), ...(briefings?.values() ?? [])].map(({ revision }) => revision),
  );
  return useQuery({
    queryKey: ['register', installationId, newest],
    queryFn: () => get<RegisterView>(`/installations/${installationId}/register`),
    placeholderData: (before) => before,
    gcTime: 10_000,
  });
}
