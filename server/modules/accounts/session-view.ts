import type { Request } from 'express';
import type { SessionView } from '../../../shared/contracts/live';
import type { Deps } from '../../deps';
import type { Principal } from '../../http/principal';
import type { SessionLayer } from '../../http/session';
import { membershipsOfAccount, membershipsOfPerson } from './accounts.repository';

/** Who is signed in, as the client needs to know it, with the token its changes carry. */
export function sessionView(
  deps: Deps,
  layer: SessionLayer,
  req: Request,
  principal: Principal | null,
): SessionView {
  return {
    csrfToken: layer.csrfToken(req),
    now: deps.clock.now(),
    clockRate: deps.clock.rate,
    demo: deps.config.DEMO,
    principal: principal && describe(deps, principal),
  };
}

function describe(deps: Deps, principal: Principal): SessionView['principal'] {
  const db = deps.data.readHandle;
  switch (principal.kind) {
    case 'account':
      return {
        ...principal,
        installations: membershipsOfAccount(db, principal.accountId, principal.siteRole === 'admin'),
      };
    case 'person':
      return {
        kind: 'person',
        personId: principal.personId,
        installations: membershipsOfPerson(db, principal.personId),
      };
    case 'display':
      return { kind: 'display', installationId: principal.installationId };
  }
}
