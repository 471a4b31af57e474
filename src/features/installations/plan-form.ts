import { useState } from 'react';
import { editInstallationSchema } from '../../../shared/contracts/installations';
import type { InstallationRecord } from '../../../shared/contracts/live';
import { DEFAULT_AGE_RULES, type AgeRuleKey } from '../../../shared/safety';
import { limitValue } from '../../../shared/safety/age-rules';
import { checkInput, typedNumber } from '../../lib/check-input';
import { useForm, type Form } from '../../lib/use-form';
import { basicsInput, type Basics } from './installation-fields';

/** Limits as they stand in the form, by rule: bands, or whole millimetres. */
export type Limits = Record<AgeRuleKey, string>;

interface Values {
  basics: Basics;
  maxInHand: string;
  limits: Limits;
}

function valuesOf(record: InstallationRecord): Values {
  const changed = new Map(record.settings.ageChanges.map(({ key, value }) => [key, value]));
  const limits = Object.fromEntries(
    DEFAULT_AGE_RULES.map((rule) => [rule.key, changed.get(rule.key) ?? limitValue(rule)]),
  ) as Limits;
  const { name, venue, timeZone, unit, hallLimit, settings } = record;
  return {
    basics: { name, venue, timeZone, unit, hallLimit: String(hallLimit) },
    maxInHand: String(settings.maxInHand),
    limits,
  };
}

export interface PlanForm {
  form: Form;
  values: Values;
  set: (part: Partial<Values>) => void;
  /** Something differs from what is kept. */
  dirty: boolean;
  /** The problem of one age rule. */
  ageProblem: (key: AgeRuleKey) => string | undefined;
  /** Take what the server has, and forget what was typed. */
  reload: () => void;
}

/** Rules that are stricter than their defaults, in the order of the table. */
const changesOf = (limits: Limits) =>
  DEFAULT_AGE_RULES.filter((rule) => limits[rule.key] !== limitValue(rule)).map((rule) => ({
    key: rule.key,
    value: limits[rule.key],
  }));

/**
 * Basics and rules of an installation in one form with one revision. While nothing is typed it follows the live record; once
 * something is, it keeps the revision it was filled from, so that nobody's change is lost.
 */
export function usePlanForm(record: InstallationRecord): PlanForm {
  const [draft, setDraft] = useState<{ values: Values; revision: number } | null>(null);
  const values = draft?.values ?? valuesOf(record);
  const form = useForm({
    request: () => {
      const checked = checkInput(editInstallationSchema, {
        ...basicsInput(values.basics),
        maxInHand: typedNumber(values.maxInHand),
        ageChanges: changesOf(values.limits),
        revision: draft?.revision ?? record.revision,
      });
      return 'problems' in checked
        ? checked
        : { method: 'PUT', path: `/installations/${record.id}`, body: checked.body };
    },
    onDone: () => setDraft(null),
  });
  return {
    form,
    values,
    set: (part) => setDraft({ values: { ...values, ...part }, revision: draft?.revision ?? record.revision }),
    dirty: draft !== null && JSON.stringify(draft.values) !== JSON.stringify(valuesOf(record)),
    ageProblem: (key) => {
      const index = changesOf(values.limits).findIndex((change) => change.key === key);
      return index < 0 ? undefined : form.problem(`ageChanges.${index}.value`);
    },
    reload: () => {
      setDraft(null);
      form.clear();
    },
  };
}
