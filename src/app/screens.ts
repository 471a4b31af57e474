import type { Action } from '../../shared/accounts';
import type { NavItem } from '../components/layout/nav-item';

interface Screen {
  path: string;
  label: string;
  group: NavItem['group'];
  /** Shown to whoever may take one of these actions. */
  for: readonly Action[];
}

const SCREENS: readonly Screen[] = [
  { path: 'plan', label: 'Plan', group: 'Before', for: ['installation.edit'] },
  { path: 'drawing', label: 'Drawing', group: 'Before', for: ['frame.edit'] },
  { path: 'templates', label: 'Templates', group: 'Before', for: ['template.edit'] },
  { path: 'sub-assemblies', label: 'Sub-assemblies', group: 'Before', for: ['sub-assembly.edit'] },
  { path: 'people', label: 'People', group: 'Before', for: ['person.give-duty'] },
  { path: 'travellers', label: 'Travellers', group: 'On the day', for: ['step.claim', 'day-log.read'] },
  { path: 'bench', label: 'My bench', group: 'On the day', for: ['step.claim'] },
  { path: 'crib', label: 'Crib', group: 'On the day', for: ['tool.take-back', 'tool.edit'] },
  { path: 'briefings', label: 'My briefings', group: 'On the day', for: ['briefing.answer'] },
  {
    path: 'countersign',
    label: 'Countersign',
    group: 'On the day',
    for: ['briefing.countersign', 'register.read'],
  },
  { path: 'muster', label: 'Muster', group: 'On the day', for: ['person.confirm'] },
  { path: 'day-log', label: 'Day log', group: 'After', for: ['day-log.read'] },
  { path: 'register', label: 'Register', group: 'After', for: ['register.read'] },
];

/** The screens somebody may open in an installation, by the permission table. */
export function screensFor(installationId: string, may: (action: Action) => boolean): NavItem[] {
  return SCREENS.filter((screen) => screen.for.some(may)).map(({ path, label, group }) => ({
    to: `/i/${installationId}/${path}`,
    label,
    group,
  }));
}

/** The phone's own bar. */
export const PHONE_SCREENS = ['bench', 'travellers', 'briefings'] as const;
