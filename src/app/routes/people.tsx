import { useParams } from 'react-router-dom';
import { DimensionHead, PageHead } from '../../components/ui/heads';
import { AddMemberForm } from '../../features/people-plan/add-member-form';
import { PeopleTable } from '../../features/people-plan/people-table';
import { counted } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import { membershipIn, useMay, useSession } from '../../lib/session';
import { useInstallation } from '../day';
import { NothingHere } from '../nothing-here';

/** Who takes part, and with which duties. */
export function Component() {
  const { installationId = '' } = useParams();
  const { data } = useSession();
  const may = useMay(installationId);
  const installation = useInstallation(installationId);
  const people = [...useLiveMap(installationId, 'people').values()].filter((person) => !person.removed);
  if (!may('person.give-duty')) return <NothingHere />;
  const closed = installation?.status === 'closed';
  const onSite = people.filter((person) => person.onSite).length;
  return (
    <>
      <PageHead
        title="People"
        summary={`${counted(people.length, 'person takes part', 'people take part')}, ${onSite} on site now`}
      />
      <div className="grid gap-12">
        <PeopleTable
          installationId={installationId}
          ownId={membershipIn(data, installationId)?.personId ?? null}
          closed={closed}
        />
        {!closed && (
          <section className="grid max-w-[30rem] gap-5" aria-labelledby="add-member">
            <DimensionHead id="add-member">Add somebody with an account</DimensionHead>
            <p>
              Volunteers need none of this: they join with the code on the poster. Leads sign in with e-mail
              and password.
            </p>
            <AddMemberForm installationId={installationId} mayInvite={may('account.invite')} />
          </section>
        )}
      </div>
    </>
  );
}
