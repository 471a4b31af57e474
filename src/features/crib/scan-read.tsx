import type { PersonRecord, ToolRecord } from '../../../shared/contracts/live';
import { AGE_BAND_LABELS, HAZARD_LABELS } from '../../../shared/safety/hazards';
import { formatTime } from '../../lib/formats';
import type { LiveState } from '../../lib/live-state';
import { personFacts } from '../../lib/world';
import type { Crib } from './use-crib';

/** Who was read, large enough to be seen from the other side of the counter. */
export function PersonRead({
  person,
  crib,
  live,
}: {
  person: PersonRecord;
  crib: Crib;
  live: LiveState | undefined;
}) {
  const facts = live ? personFacts(live, person.id, crib.now) : null;
  const has = crib.out.filter(({ checkout }) => checkout.personId === person.id);
  const since = person.details?.confirmedAt;
  return (
    <div className="lend-read" role="status">
      <p className="lend-name">{person.name}</p>
      <p>
        {person.onSite && since ? `on site since ${formatTime(since, crib.zone)}` : 'not on site'}
        {person.details ? `, ${AGE_BAND_LABELS[person.details.ageBand]}` : ''}
        {facts && facts.missing['hot-glue'] === undefined ? ', hot glue countersigned' : ''}
      </p>
      {has.length > 0 && <p className="text-pencil">has {has.map(({ tool }) => tool.number).join(', ')}</p>}
    </div>
  );
}

/** What was read, with what matters when it is handed over. */
export function ToolRead({ tool }: { tool: ToolRecord }) {
  const facts = [
    tool.traits.watts ? `${tool.traits.watts} W` : '',
    tool.traits.temperature ? `${tool.traits.temperature} temperature` : '',
    tool.hazard ? `needs ${HAZARD_LABELS[tool.hazard]}` : 'no sign-off',
    tool.condition,
  ].filter(Boolean);
  return (
    <div className="lend-read" role="status">
      <p className="lend-name">
        {tool.number} {tool.name}
      </p>
      <p>{facts.join(', ')}</p>
    </div>
  );
}
