export const NAV_GROUPS = ['Site', 'Before', 'On the day', 'After'] as const;
export type NavGroup = (typeof NAV_GROUPS)[number];

/** A screen in the navigation. */
export type NavItem = {
  to: string;
  label: string;
  group: NavGroup;
  /** Only this very path is this screen, not the ones below it. */
  end?: boolean;
};
