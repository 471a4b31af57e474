import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { InstallationListItem } from '../../../shared/contracts/installations';
import { Figures } from '../../components/ui/figures';
import { EmptyNote } from '../../components/ui/note';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { Sheet } from '../../components/ui/sheet';
import { get } from '../../lib/api';
import { formatCalendarDay, listed } from '../../lib/formats';

/** Where the work on an installation goes on: its plan for whoever plans, the board or the bench for the others. */
function entrance({ id, duties }: InstallationListItem, isAdmin: boolean): string {
  if (isAdmin || duties.includes('organiser')) return `/i/${id}/plan`;
  return `/i/${id}/${duties.some((duty) => duty !== 'volunteer') ? 'travellers' : 'bench'}`;
}

/** Installations one takes part in; an administrator sees all. */
export function InstallationsList({ isAdmin, mayCreate }: { isAdmin: boolean; mayCreate: boolean }) {
  const list = useQuery({
    queryKey: ['installations'],
    queryFn: () => get<InstallationListItem[]>('/installations'),
    refetchOnMount: 'always',
  });
  if (list.error) return <Refusal error={list.error} />;
  if (!list.data) return <Pending />;
  if (list.data.length === 0)
    return (
      <EmptyNote title="No installation yet.">
        {mayCreate
          ? 'Start one: a name, a place and a day are enough to begin.'
          : 'You see one here as soon as its organiser gives you a place in it.'}
      </EmptyNote>
    );
  return (
    <Sheet caption="Installations">
      <thead>
        <tr>
          <th scope="col">installation</th>
          <th scope="col">venue</th>
          <th scope="col">first build day</th>
          <th scope="col" className="amount">
            sub-assemblies
          </th>
          <th scope="col" className="amount">
            people
          </th>
          <th scope="col">your duties</th>
          <th scope="col">state</th>
        </tr>
      </thead>
      <tbody>
        {list.data.map((item) => (
          <tr key={item.id}>
            <th scope="row">
              <Link to={entrance(item, isAdmin)} className="words-link">
                {item.name}
              </Link>
            </th>
            <td data-label="venue">{item.venue}</td>
            <td data-label="first build day">
              {item.firstDate ? formatCalendarDay(item.firstDate) : 'not set'}
            </td>
            <td data-label="sub-assemblies" className="amount">
              <Figures>{item.subAssemblies}</Figures>
            </td>
            <td data-label="people" className="amount">
              <Figures>{item.people}</Figures>
            </td>
            <td data-label="your duties">{listed(item.duties) || 'none'}</td>
            <td data-label="state">{item.status}</td>
          </tr>
        ))}
      </tbody>
    </Sheet>
  );
}
