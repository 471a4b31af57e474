import type Database from 'better-sqlite3';
import type { Duty, Rights, SiteRole } from '../../shared/accounts';
import type { Audience } from '../../shared/contracts/live';
import type { ChangeMaker } from '../db/write';

/** Who a session belongs to. */
export type Principal =
  | { kind: 'account'; accountId: string; name: string; email: string; siteRole: SiteRole }
  | { kind: 'person'; personId: string; installationId: string }
  | { kind: 'display'; tokenId: string; installationId: string };

/** How a principal stands in the session row, such as `account:ID`. */
export const principalKey = (principal: Principal): string => {
  switch (principal.kind) {
    case 'account':
      return `account:${principal.accountId}`;
    case 'person':
      return `person:${principal.personId}`;
    case 'display':
      return `display:${principal.tokenId}`;
  }
};

/** Somebody in one installation: what they may do and as whom the day log knows them. */
export interface Actor {
  principal: Principal;
  personId: string | null;
  rights: Rights;
  audience: Audience;
  maker: ChangeMaker;
}

interface PersonRow {
  id: string;
  installation_id: string;
  duties: string;
  confirmed_at: number | null;
  left_at: number | null;
}

const LEAD_DUTIES: readonly Duty[] = ['organiser', 'safety lead', 'bench lead', 'crib keeper', 'first-aider'];

/** The audience a socket sits in: who may see whose names and papers. */
export function audienceOf(rights: Rights): Audience {
  if (rights.display) return 'projector';
  if (rights.siteRole === 'admin' || rights.duties.some((duty) => LEAD_DUTIES.includes(duty))) return 'leads';
  if (rights.duties.includes('muster desk')) return 'desk';
  return rights.confirmed ? 'people' : 'door';
}

/** Looks up who is behind a session and what they are in an installation; reads only what is committed. */
export class Principals {
  private readonly account;
  private readonly person;
  private readonly personOfAccount;
  private readonly display;
  private readonly installation;

  constructor(db: Database.Database) {
    this.account = db.prepare<[string], { id: string; name: string; email: string; site_role: SiteRole }>(
      'SELECT id, name, email, site_role FROM account WHERE id = ? AND disabled_at IS NULL',
    );
    this.person = db.prepare<[string], PersonRow>(
      'SELECT id, installation_id, duties, confirmed_at, left_at FROM person WHERE id = ? AND removed_at IS NULL',
    );
    this.personOfAccount = db.prepare<[string, string], PersonRow>(
      `SELECT id, installation_id, duties, confirmed_at, left_at FROM person
       WHERE account_id = ? AND installation_id = ? AND removed_at IS NULL`,
    );
    this.display = db.prepare<[string], { id: string; installation_id: string }>(
      'SELECT id, installation_id FROM display_token WHERE id = ? AND closed_at IS NULL',
    );
    this.installation = db.prepare<[string], { id: string }>('SELECT id FROM installation WHERE id = ?');
  }

  /** The principal behind a key, or null when it was disabled, removed or closed since. */
  find(key: string): Principal | null {
    const [kind, id = ''] = key.split(':');
    if (kind === 'account') {
      const row = this.account.get(id);
      return row
        ? { kind: 'account', accountId: row.id, name: row.name, email: row.email, siteRole: row.site_role }
        : null;
    }
    if (kind === 'person') {
      const row = this.person.get(id);
      return row ? { kind: 'person', personId: row.id, installationId: row.installation_id } : null;
    }
    if (kind === 'display') {
      const row = this.display.get(id);
      return row ? { kind: 'display', tokenId: row.id, installationId: row.installation_id } : null;
    }
    return null;
  }

  /** Rights outside any installation. */
  siteRights(principal: Principal): Rights {
    const siteRole = principal.kind === 'account' ? principal.siteRole : null;
    return { siteRole, duties: [], confirmed: false, display: principal.kind === 'display' };
  }

  /** What a principal is in an installation, or null when it has nothing to do with it. */
  actorIn(principal: Principal, installationId: string): Actor | null {
    if (principal.kind === 'display') {
      if (principal.installationId !== installationId) return null;
      const rights: Rights = { siteRole: null, duties: [], confirmed: false, display: true };
      return this.actor(principal, null, rights, `display:${principal.tokenId}`);
    }
    const row =
      principal.kind === 'person'
        ? principal.installationId === installationId
          ? this.person.get(principal.personId)
          : undefined
        : this.personOfAccount.get(principal.accountId, installationId);
    const siteRole = principal.kind === 'account' ? principal.siteRole : null;
    if (!row) {
      if (siteRole !== 'admin' || !this.installation.get(installationId)) return null;
      const rights: Rights = { siteRole, duties: [], confirmed: false, display: false };
      return this.actor(principal, null, rights, principalKey(principal));
    }
    const duties = JSON.parse(row.duties) as Duty[];
    const confirmed = row.confirmed_at !== null && row.left_at === null;
    return this.actor(principal, row.id, { siteRole, duties, confirmed, display: false }, `person:${row.id}`);
  }

  private actor(principal: Principal, personId: string | null, rights: Rights, maker: string): Actor {
    return { principal, personId, rights, audience: audienceOf(rights), maker: { actor: maker, personId } };
  }
}
