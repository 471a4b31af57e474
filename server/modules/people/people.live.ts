import type { PersonRecord } from '../../../shared/contracts/live';
import { selectRows, type AnyLiveSource, type LiveSource } from '../../realtime/live-source';
import { dutiesOf, isOnSite, type PersonRow } from './people.repository';

/** First name and initial, as the room says it; an erased person keeps only the number. */
export const shownName = (
  row: Pick<PersonRow, 'first_name' | 'initial' | 'number' | 'erased_at'>,
): string => {
  if (row.erased_at !== null) return `erased ${row.number}`;
  return row.initial ? `${row.first_name} ${row.initial}` : row.first_name;
};

const toPersonRecord = (row: PersonRow): PersonRecord => ({
  id: row.id,
  revision: row.revision,
  name: shownName(row),
  number: row.number,
  duties: dutiesOf(row),
  confirmed: row.confirmed_at !== null,
  onSite: isOnSite(row),
  removed: row.removed_at !== null,
  details:
    row.erased_at === null
      ? {
          ageBand: row.age_band,
          email: row.email,
          adultName: row.adult_name,
          joinedAt: row.joined_at,
          confirmedAt: row.confirmed_at,
          leftAt: row.left_at,
          hasAccount: row.account_id !== null,
        }
      : null,
});

const people: LiveSource<'people'> = {
  kind: 'people',
  load: (db, installationId, filter) =>
    selectRows<PersonRow>(db, 'person', installationId, filter).map(toPersonRecord),
  view(record, audience) {
    if (audience === 'leads' || audience === 'desk') return record;
    // Posters get photographed: whoever is not confirmed sees no names but their own.
    return audience === 'door' ? null : { ...record, details: null };
  },
  owner: (record) => record.id,
};

export const peopleLive: AnyLiveSource[] = [people];
