import { Action } from '../../components/ui/action';
import { Field } from '../../components/ui/field';
import { DimensionHead } from '../../components/ui/heads';
import { Refusal } from '../../components/ui/refusal';
import { InstallationFields } from './installation-fields';
import type { PlanForm } from './plan-form';

export const PLAN_FORM = 'plan-form';

/** The row that keeps what was typed; it stands under the basics and under the age rules, and keeps both. */
export function KeepRow({ plan, closed }: { plan: PlanForm; closed: boolean }) {
  return (
    <div className="flex flex-wrap items-center gap-x-6 gap-y-2">
      <Action
        type="submit"
        form={PLAN_FORM}
        look="main"
        busy={plan.form.busy}
        reason={closed ? 'The installation is closed; nothing on it changes any more.' : undefined}
      >
        Keep it
      </Action>
      {plan.dirty && !closed && (
        <>
          <span role="status">Not kept yet.</span>
          <Action look="words" onClick={plan.reload}>
            Take it back
          </Action>
        </>
      )}
    </div>
  );
}

/** Name, venue, zone, unit, limits. */
export function BasicsSection({ plan, closed }: { plan: PlanForm; closed: boolean }) {
  const { form, values, set } = plan;
  return (
    <section className="grid gap-5" aria-labelledby="basics">
      <DimensionHead id="basics">The installation</DimensionHead>
      <form id={PLAN_FORM} className="grid gap-5" noValidate onSubmit={form.onSubmit}>
        <Refusal error={form.error} unplaced={form.unplaced} onReload={plan.reload} />
        <InstallationFields
          value={values.basics}
          onChange={(basics) => set({ basics })}
          problem={form.problem}
        />
        <Field
          className="sm:w-1/2 sm:pr-4"
          label="steps a person may have in hand at once"
          unit="steps"
          inputMode="numeric"
          value={values.maxInHand}
          onChange={(event) => set({ maxInHand: event.target.value })}
          error={form.problem('maxInHand')}
          hint="From 1 to 10. Two is usual: one being worked on, one drying."
        />
      </form>
      <KeepRow plan={plan} closed={closed} />
    </section>
  );
}
