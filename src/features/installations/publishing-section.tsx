import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { PublishCheck } from '../../../shared/contracts/installations';
import type { InstallationRecord } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { DimensionHead } from '../../components/ui/heads';
import { Refusal } from '../../components/ui/refusal';
import { StateGlyph } from '../../components/ui/strut-glyph';
import { get } from '../../lib/api';
import { counted } from '../../lib/formats';
import { useLive, useLiveMap } from '../../lib/live';
import { useSend } from '../../lib/use-send';

/** Where each thing that is missing is done. */
const WHERE: Record<PublishCheck['key'], { to: string; words: string }> = {
  'build-day': { to: '#build-days', words: 'Build days' },
  station: { to: '#stations', words: 'Stations' },
  'sub-assembly': { to: 'sub-assemblies', words: 'Sub-assemblies' },
  'safety-leads': { to: 'people', words: 'People' },
  briefings: { to: 'templates', words: 'Templates' },
};

function useChecks(installationId: string): PublishCheck[] | undefined {
  const revision = useLive(installationId, (state) => state.cursor);
  const { data } = useQuery({
    queryKey: ['publish-checks', installationId, revision],
    queryFn: () => get<{ publishChecks: PublishCheck[] }>(`/installations/${installationId}`),
    placeholderData: (before) => before,
    gcTime: 10_000,
  });
  return data?.publishChecks;
}

/** Draft, published or closed; what publishing still needs; the ways on. */
export function PublishingSection({ installation }: { installation: InstallationRecord }) {
  const { id, status } = installation;
  return (
    <section className="grid gap-4" aria-labelledby="publishing">
      <DimensionHead id="publishing" right={status}>
        {status === 'draft' ? 'To publish' : 'State'}
      </DimensionHead>
      {status === 'draft' && <Draft id={id} />}
      {status === 'published' && <Published id={id} />}
      {status === 'closed' && <p>Closed. Everything stays readable, nothing changes any more.</p>}
    </section>
  );
}

function Draft({ id }: { id: string }) {
  const checks = useChecks(id);
  const publish = useSend();
  const missing = checks?.filter((check) => !check.done).length ?? 0;
  return (
    <>
      <ul className="grid gap-2">
        {checks?.map((check) => {
          const { to, words } = WHERE[check.key];
          return (
            <li key={check.key} className="flex items-start gap-3">
              <span className="pt-0.5">
                <StateGlyph state={check.done ? 'passed' : 'waiting'} />
              </span>
              <span>
                <span className="sr-only">{check.done ? 'Done: ' : 'Missing: '}</span>
                {check.message}{' '}
                {!check.done && (
                  <Link to={to.startsWith('#') ? to : `/i/${id}/${to}`} className="words-link">
                    {words}
                  </Link>
                )}
              </span>
            </li>
          );
        })}
      </ul>
      <Refusal error={publish.error} />
      <div>
        <Action
          look="main"
          busy={publish.isPending}
          reason={
            missing > 0
              ? `${counted(missing, 'thing')} of the list ${missing === 1 ? 'is' : 'are'} missing.`
              : undefined
          }
          onClick={() => publish.mutate({ method: 'POST', path: `/installations/${id}/publish` })}
        >
          Publish
        </Action>
      </div>
      <p className="text-pencil">Until then only people you add see it, and the join code opens nothing.</p>
      <CloseAction id={id} />
    </>
  );
}

function Published({ id }: { id: string }) {
  return (
    <>
      <p className="flex items-center gap-3">
        <StateGlyph state="passed" /> Published. People can join and work.
      </p>
      <CloseAction id={id} />
    </>
  );
}

function CloseAction({ id }: { id: string }) {
  const people = [...useLiveMap(id, 'people').values()].filter((one) => one.onSite && !one.removed).length;
  const inHand = [...useLiveMap(id, 'steps').values()].filter(
    (step) => !step.removed && step.crew.length > 0,
  ).length;
  const out = [...useLiveMap(id, 'checkouts').values()].filter((one) => one.backAt === null).length;
  return (
    <div>
      <ConfirmAction
        words="Close the installation"
        title="Close it for good?"
        confirm="Close it"
        wish={{ method: 'POST', path: `/installations/${id}/close` }}
      >
        <p>
          {`Now: ${counted(people, 'person', 'people')} on site, ${counted(inHand, 'step')} in hand, ${counted(out, 'tool')} out.`}
        </p>
        <p>
          Nobody can join, claim, lend or sign after that, tools cannot be taken back here, and it cannot be
          opened again. Everything stays readable, and people can still be erased.
        </p>
      </ConfirmAction>
    </div>
  );
}
