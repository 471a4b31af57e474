import type { PublishCheck } from '../../../shared/contracts/installations';
import type { PublishCounts } from './installations.repository';

/** Two, so that one of them can countersign the other and one can leave the room. */
export const SAFETY_LEADS_NEEDED = 2;

/** What publishing asks for and whether it is there, in the order in which it is planned. */
export function publishChecks(counts: PublishCounts): PublishCheck[] {
  const leads = counts.safetyLeads;
  return [
    {
      key: 'build-day',
      done: counts.buildDays > 0,
      message: counts.buildDays > 0 ? `Build days: ${counts.buildDays}.` : 'Add a build day.',
    },
    {
      key: 'station',
      done: counts.stations > 0,
      message: counts.stations > 0 ? `Stations: ${counts.stations}.` : 'Add a station.',
    },
    {
      key: 'sub-assembly',
      done: counts.subAssemblies > 0,
      message:
        counts.subAssemblies > 0
          ? `Sub-assemblies: ${counts.subAssemblies}.`
          : 'Make a sub-assembly from a frame.',
    },
    {
      key: 'safety-leads',
      done: leads >= SAFETY_LEADS_NEEDED,
      message:
        leads >= SAFETY_LEADS_NEEDED
          ? `Safety leads: ${leads}.`
          : `Name ${SAFETY_LEADS_NEEDED} safety leads; there ${leads === 1 ? 'is 1' : 'are none'}.`,
    },
    {
      key: 'briefings',
      done: counts.unbriefed.length === 0,
      message:
        counts.unbriefed.length === 0
          ? 'Every hazard of the steps has a briefing.'
          : `Steps have hazards without a briefing: ${counts.unbriefed.join(', ')}. Take the hazard off the steps, or write its briefing.`,
    },
  ];
}
