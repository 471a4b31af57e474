import { useState } from 'react';
import { Action } from '../../components/ui/action';
import { PageHead } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';
import { counted } from '../../lib/formats';
import { membershipIn, useMay, useSession } from '../../lib/session';
import { LendDesk } from './lend-desk';
import { OutOfUse } from './out-of-use';
import { TakeBackPanel } from './take-back';
import { ToolsList } from './tools-list';
import { useCrib } from './use-crib';
import { WhatEachHas } from './what-each-has';
import { WhoHasWhat } from './who-has-what';

/** The tool store: out in two scans, back in one, who has it, what is not to be used. */
export function CribDesk({ installationId }: { installationId: string }) {
  const crib = useCrib(installationId);
  const may = useMay(installationId);
  const place = membershipIn(useSession().data, installationId);
  const [takingBack, setTakingBack] = useState(false);
  const late = crib.out.filter((one) => one.late).length;
  const inside = crib.tools.length - crib.out.length;
  return (
    <>
      <PageHead
        title="Crib"
        summary={`${counted(crib.out.length, 'tool')} out, ${inside} in, ${crib.tagged.length} out of use. ${late} late.`}
        aside={
          may('tool.take-back') && (
            <Action
              size="phone"
              look="crossed"
              expanded={takingBack}
              onClick={() => setTakingBack(!takingBack)}
            >
              Take back a tool
            </Action>
          )
        }
      />
      <div className="crib">
        <div className="crib-main">
          {takingBack && <TakeBackPanel installationId={installationId} crib={crib} />}
          {place?.duties.includes('crib keeper') && !place.confirmed && (
            <Note kind="ask" title="The muster desk has not confirmed you yet." announce={false}>
              Until then you can take tools back and tag them, but lend none. Go to the desk first.
            </Note>
          )}
          {may('tool.lend') && <LendDesk installationId={installationId} crib={crib} />}
          <WhoHasWhat crib={crib} />
          <ToolsList installationId={installationId} crib={crib} />
        </div>
        <aside className="crib-side">
          <OutOfUse installationId={installationId} crib={crib} />
          <WhatEachHas crib={crib} />
        </aside>
      </div>
    </>
  );
}
