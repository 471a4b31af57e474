import { useState } from 'react';
import { createInstallationSchema } from '../../../shared/contracts/installations';
import { Action } from '../../components/ui/action';
import { Refusal } from '../../components/ui/refusal';
import { checkInput } from '../../lib/check-input';
import { useForm } from '../../lib/use-form';
import { basicsInput, InstallationFields, type Basics } from './installation-fields';

/** Start an installation from a blank. */
export function NewInstallationForm({ onMade }: { onMade: (id: string) => unknown }) {
  const [basics, setBasics] = useState<Basics>(() => ({
    name: '',
    venue: '',
    timeZone: Intl.DateTimeFormat().resolvedOptions().timeZone,
    unit: 'mm',
    hallLimit: '',
  }));
  const form = useForm<{ id: string }>({
    request: () => {
      const checked = checkInput(createInstallationSchema, basicsInput(basics));
      return 'problems' in checked ? checked : { method: 'POST', path: '/installations', body: checked.body };
    },
    onDone: ({ id }) => onMade(id),
  });
  return (
    <form className="grid max-w-[52rem] gap-6" noValidate onSubmit={form.onSubmit}>
      <Refusal error={form.error} unplaced={form.unplaced} />
      <InstallationFields value={basics} onChange={setBasics} problem={form.problem} />
      <div>
        <Action type="submit" look="main" busy={form.busy}>
          Start it
        </Action>
      </div>
    </form>
  );
}
