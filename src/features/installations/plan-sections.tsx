import type { InstallationRecord } from '../../../shared/contracts/live';
import { AgeRulesSection } from './age-rules-section';
import { BasicsSection } from './basics-section';
import { BuildDaysSection } from './build-days-section';
import { DisplaysSection } from './displays-section';
import { JoinCodeSection } from './join-code-section';
import { usePlanForm } from './plan-form';
import { PosterSection } from './poster-section';
import { PublishingSection } from './publishing-section';
import { StationsSection } from './stations-section';

/** Everything that is set before the day. */
export function PlanSections({ installation }: { installation: InstallationRecord }) {
  const plan = usePlanForm(installation);
  const closed = installation.status === 'closed';
  const { id } = installation;
  return (
    <div className="with-side">
      <div className="grid content-start gap-12">
        <nav className="flex flex-wrap gap-x-6 wide:hidden" aria-label="Further down">
          <a href="#publishing" className="words-link">
            Publishing
          </a>
          <a href="#join-code" className="words-link">
            Join code
          </a>
          <a href="#poster" className="words-link">
            Poster
          </a>
        </nav>
        <BasicsSection plan={plan} closed={closed} />
        <BuildDaysSection installationId={id} closed={closed} />
        <StationsSection installationId={id} closed={closed} />
        <AgeRulesSection plan={plan} unit={installation.unit} closed={closed} />
        <DisplaysSection installation={installation} />
      </div>
      <div className="grid content-start gap-12">
        <PublishingSection installation={installation} />
        <JoinCodeSection installation={installation} />
        <PosterSection installation={installation} />
      </div>
    </div>
  );
}
