/** Roles of an account on the whole site. */
export const SITE_ROLES = ['admin', 'organiser', 'member'] as const;
export type SiteRole = (typeof SITE_ROLES)[number];

/** Duties of a person in one installation; a person may hold several. Everybody who joined is a volunteer. */
export const DUTIES = [
  'organiser',
  'safety lead',
  'crib keeper',
  'bench lead',
  'checker',
  'muster desk',
  'first-aider',
  'volunteer',
] as const;
export type Duty = (typeof DUTIES)[number];

/** What decides whether somebody may take an action. */
export interface Rights {
  siteRole: SiteRole | null;
  duties: readonly Duty[];
  /** The muster desk has confirmed the person and the age band, and the person is on site. */
  confirmed: boolean;
  /** Signed in with a projector's display token. */
  display: boolean;
}

interface Rule {
  /** Site roles that may. */
  site?: readonly SiteRole[];
  /** Duties in the installation that may. */
  duties?: readonly Duty[];
  /** The duty counts only once the muster desk has confirmed the person. */
  confirmed?: true;
  /** A projector may. */
  display?: true;
  /** Nobody needs to be signed in. */
  public?: true;
  /** Anyone who is signed in, whatever the role. */
  signedIn?: true;
}

const ORGANISERS = ['organiser'] as const;
const ADMIN_SITE = ['admin'] as const;
const LEADS = ['organiser', 'safety lead', 'bench lead'] as const;
const ALL_BUT_VOLUNTEER = DUTIES.filter((duty) => duty !== 'volunteer');

/**
 * The one table of who may do what. Routes, screens and the role test read this and nothing else.
 * A site admin stands in for an organiser, never for a safety lead.
 */
export const PERMISSIONS = {
  // accounts
  'session.read': { public: true },
  'session.sign-in': { public: true },
  'session.sign-out': { signedIn: true },
  'account.accept-link': { public: true },
  'account.ask-reset': { public: true },
  'account.change-password': { site: SITE_ROLES },
  'account.read-all': { site: ADMIN_SITE },
  'account.invite': { site: ['admin', 'organiser'] },
  'account.change-role': { site: ADMIN_SITE },
  'account.disable': { site: ADMIN_SITE },
  'outbox.read': { site: ADMIN_SITE },
  // installations
  'installation.list': { site: SITE_ROLES },
  'installation.create': { site: ['admin', 'organiser'] },
  'installation.read': { site: ADMIN_SITE, duties: DUTIES, display: true },
  'installation.edit': { site: ADMIN_SITE, duties: ORGANISERS },
  'installation.publish': { site: ADMIN_SITE, duties: ORGANISERS },
  'installation.close': { site: ADMIN_SITE, duties: ORGANISERS },
  'installation.renew-code': { site: ADMIN_SITE, duties: ['organiser', 'muster desk'] },
  'installation.read-code': { site: ADMIN_SITE, duties: ALL_BUT_VOLUNTEER },
  'display.manage': { site: ADMIN_SITE, duties: ORGANISERS },
  'display.sign-in': { public: true },
  // the live path
  'live.read': { site: ADMIN_SITE, duties: DUTIES, display: true },
  'day-log.read': { site: ADMIN_SITE, duties: LEADS },
  // people
  'person.look-up-code': { public: true },
  'person.join': { public: true },
  'person.confirm': { site: ADMIN_SITE, duties: ['organiser', 'muster desk'] },
  'person.sign-out-site': { site: ADMIN_SITE, duties: ['organiser', 'muster desk'] },
  'person.leave': { duties: DUTIES },
  'person.give-duty': { site: ADMIN_SITE, duties: ORGANISERS },
  'person.remove': { site: ADMIN_SITE, duties: ORGANISERS },
  'person.erase': { site: ADMIN_SITE, duties: ORGANISERS },
  // frames and travellers
  'frame.read': { site: ADMIN_SITE, duties: DUTIES, display: true },
  'frame.edit': { site: ADMIN_SITE, duties: ORGANISERS },
  'split.read': { site: ADMIN_SITE, duties: LEADS },
  'split.edit': { site: ADMIN_SITE, duties: ORGANISERS },
  'sub-assembly.edit': { site: ADMIN_SITE, duties: ORGANISERS },
  'template.read': { site: ADMIN_SITE, duties: LEADS },
  'template.edit': { site: ADMIN_SITE, duties: ORGANISERS },
  // work on steps
  'step.claim': { duties: DUTIES, confirmed: true },
  'step.give-back': { duties: DUTIES, confirmed: true },
  'step.hand-over': { duties: DUTIES, confirmed: true },
  'step.start': { duties: DUTIES, confirmed: true },
  'step.finish': { duties: DUTIES, confirmed: true },
  'step.still-wet': { duties: DUTIES, confirmed: true },
  'step.end-drying': { duties: LEADS, confirmed: true },
  'step.check': { duties: ['bench lead', 'checker'], confirmed: true },
  'step.rework': { duties: ['bench lead', 'checker'], confirmed: true },
  'step.hold': { duties: ['organiser', 'safety lead', 'bench lead', 'checker'], confirmed: true },
  'step.release': { duties: LEADS, confirmed: true },
  'step.record': { duties: ['organiser', 'bench lead'], confirmed: true },
  // safety
  'briefing.read': { site: ADMIN_SITE, duties: DUTIES },
  'briefing.answer': { duties: DUTIES },
  'briefing.sign': { duties: DUTIES },
  'briefing.talk': { duties: ['safety lead'] },
  'briefing.countersign': { duties: ['safety lead', 'organiser'] },
  'briefing.revoke': { duties: ['safety lead'] },
  'briefing.edit': { duties: ['safety lead'] },
  'register.read': { site: ADMIN_SITE, duties: ['organiser', 'safety lead'] },
  'stop.raise': { duties: DUTIES, confirmed: true },
  'stop.see': { duties: DUTIES },
  'stop.lift': { duties: ['safety lead'], confirmed: true },
  // crib
  'tool.edit': { site: ADMIN_SITE, duties: ['organiser', 'crib keeper'] },
  'tool.lend': { duties: ['crib keeper'], confirmed: true },
  'tool.take-back': { duties: ['crib keeper', 'bench lead', 'safety lead'] },
  'tool.tag': { duties: ['crib keeper', 'bench lead', 'safety lead'] },
  'tool.clear-tag': { duties: ['crib keeper', 'bench lead', 'safety lead'] },
} as const satisfies Record<string, Rule>;

export type Action = keyof typeof PERMISSIONS;
export const ACTIONS = Object.keys(PERMISSIONS) as Action[];

/** Why somebody may not: they are not signed in, wait for the desk, or hold no duty that may. */
export type Denial = 'sign-in' | 'confirm' | 'duty';

/**
 * Whether an action is denied, and why.
 * @param rights who is asking; null when nobody is signed in
 * @param action a key of the table
 * @returns null when allowed
 */
export function denial(rights: Rights | null, action: Action): Denial | null {
  const rule: Rule = PERMISSIONS[action];
  if (rule.public) return null;
  if (!rights) return 'sign-in';
  if (rule.signedIn) return null;
  if (rights.display) return rule.display ? null : 'duty';
  if (rights.siteRole && rule.site?.includes(rights.siteRole)) return null;
  if (rule.duties?.some((duty) => rights.duties.includes(duty))) {
    return rule.confirmed && !rights.confirmed ? 'confirm' : null;
  }
  return 'duty';
}

/** Whether somebody may take an action. */
export const may = (rights: Rights | null, action: Action): boolean => denial(rights, action) === null;

/** Who may take an action, for the words of a refusal: duties first, then site roles. */
export function whoMay(action: Action): string[] {
  const rule: Rule = PERMISSIONS[action];
  return [...(rule.duties ?? []), ...(rule.site ?? []).map((role) => `site ${role}`)];
}
