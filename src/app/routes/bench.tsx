import { useParams } from 'react-router-dom';
import { EmptyNote } from '../../components/ui/note';
import { GoHome, WhatIMayDo } from '../../features/bench/bench-foot';
import { MyBench } from '../../features/bench/my-bench';
import { RaiseStop } from '../../features/stop/raise-stop';
import { useMessages } from '../../lib/messages';
import { membershipIn, useSession } from '../../lib/session';

/** My bench: the volunteer's own page. */
export function Component() {
  const { installationId = '' } = useParams();
  const { bench } = useMessages();
  const { data } = useSession();
  const place = membershipIn(data, installationId);
  if (!place?.personId) return <EmptyNote title={bench.nobody.title}>{bench.nobody.text}</EmptyNote>;
  return (
    <div className="grid gap-8">
      <MyBench installationId={installationId} personId={place.personId} />
      {place.confirmed && (
        <>
          <WhatIMayDo installationId={installationId} personId={place.personId} />
          <div className="flex flex-wrap items-center justify-between gap-5">
            <RaiseStop installationId={installationId} size="phone" />
            <GoHome installationId={installationId} />
          </div>
        </>
      )}
    </div>
  );
}
