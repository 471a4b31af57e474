import { useState } from 'react';
import { addMemberSchema } from '../../../shared/contracts/people';
import { Action } from '../../components/ui/action';
import { CheckField } from '../../components/ui/choices';
import { Field } from '../../components/ui/field';
import { Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { checkInput } from '../../lib/check-input';
import { useForm } from '../../lib/use-form';
import { GIVEN_DUTIES, type GivenDuty } from './duty-words';

/** Gives somebody with an account a place in the installation. */
export function AddMemberForm({ installationId, mayInvite }: { installationId: string; mayInvite: boolean }) {
  const [email, setEmail] = useState('');
  const [firstName, setFirstName] = useState('');
  const [initial, setInitial] = useState('');
  const [duties, setDuties] = useState<readonly GivenDuty[]>([]);
  const [added, setAdded] = useState<string | null>(null);
  const form = useForm({
    request: () => {
      const checked = checkInput(addMemberSchema, { email, firstName, initial, duties: [...duties] });
      return 'problems' in checked
        ? checked
        : { method: 'POST', path: `/installations/${installationId}/people`, body: checked.body };
    },
    onDone: () => {
      setAdded(`${firstName.trim()} ${initial}`.trim());
      setEmail('');
      setFirstName('');
      setInitial('');
      setDuties([]);
    },
  });
  return (
    <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
      {added !== null && (
        <Note kind="done" title={`${added} takes part now.`}>
          On the day the muster desk confirms that they are there.
        </Note>
      )}
      <Refusal error={form.error} unplaced={form.unplaced} />
      <Field
        label="e-mail they sign in with"
        type="email"
        inputMode="email"
        autoComplete="off"
        autoCapitalize="none"
        value={email}
        onChange={(event) => setEmail(event.target.value)}
        error={form.problem('email')}
      />
      {mayInvite && (
        <p className="text-small">
          Nobody has a sign-in with it yet?{' '}
          <Action look="words" to="/accounts">
            Invite them first
          </Action>
        </p>
      )}
      <div className="grid grid-cols-[1fr_5.5rem] items-start gap-5">
        <Field
          label="first name"
          autoComplete="off"
          value={firstName}
          onChange={(event) => setFirstName(event.target.value)}
          error={form.problem('firstName')}
        />
        <Field
          label="initial"
          maxLength={1}
          autoComplete="off"
          value={initial}
          onChange={(event) => setInitial(event.target.value.toUpperCase())}
          error={form.problem('initial')}
        />
      </div>
      <fieldset>
        <legend className="field-label">duties</legend>
        {GIVEN_DUTIES.map(({ duty, may }) => (
          <CheckField
            key={duty}
            checked={duties.includes(duty)}
            detail={may}
            onChange={(event) =>
              setDuties(event.target.checked ? [...duties, duty] : duties.filter((other) => other !== duty))
            }
          >
            {duty}
          </CheckField>
        ))}
      </fieldset>
      <div>
        <Action type="submit" look="main" busy={form.busy}>
          Add them
        </Action>
      </div>
    </form>
  );
}
