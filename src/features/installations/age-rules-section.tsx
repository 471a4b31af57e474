import { formatLength, type LengthUnit } from '../../../shared/kernel/lengths';
import {
  AGE_BAND_FROM,
  AGE_BANDS,
  DEFAULT_AGE_RULES,
  oldEnough,
  type AgeBand,
  type AgeRule,
} from '../../../shared/safety';
import { SelectField } from '../../components/ui/field';
import { DimensionHead } from '../../components/ui/heads';
import { Sheet } from '../../components/ui/sheet';
import { KeepRow, PLAN_FORM } from './basics-section';
import type { PlanForm } from './plan-form';

const bandWords = (band: AgeBand): string =>
  band === 'under-9' ? 'every age' : `${AGE_BAND_FROM[band]} and over`;

/** Heights that are offered below the default, mm. */
const HEIGHTS = [1800, 1500, 1200, 900, 600, 300];

interface Choice {
  value: string;
  words: string;
}

/** What a rule can be set to: its default and everything stricter. */
function choicesOf(rule: AgeRule, now: string, unit: LengthUnit): Choice[] {
  const { limit } = rule;
  if (limit.kind === 'from-band')
    return AGE_BANDS.filter((band) => oldEnough(band, limit.band))
      .reverse()
      .map((band) => ({ value: band, words: bandWords(band) }));
  const heights = new Set([limit.mm, ...HEIGHTS.filter((mm) => mm < limit.mm), 0, Number(now)]);
  return [...heights]
    .sort((a, b) => b - a)
    .map((mm) => ({
      value: String(mm),
      words: mm === 0 ? 'under 18: no ladder at all' : `under 18: ${formatLength(mm, unit)}`,
    }));
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

const FOUNDED: Record<AgeRule['source']['status'], string> = {
  read: 'Read in the source.',
  'read, weak': 'Read in a weak source.',
  'read, by analogy': 'By analogy with the source.',
  own: 'Set by this product.',
};

/** The table of age rules: each default with its source, to be tightened, never loosened. */
export function AgeRulesSection({
  plan,
  unit,
  closed,
}: {
  plan: PlanForm;
  unit: LengthUnit;
  closed: boolean;
}) {
  const { values, set } = plan;
  return (
    <section className="grid gap-4" aria-labelledby="age-rules">
      <DimensionHead id="age-rules">Age rules</DimensionHead>
      <p className="max-w-words">
        You can make a rule stricter than its default, not looser. Local law and the venue may ask for more;
        they come first.
      </p>
      <Sheet caption="Age rules">
        <thead>
          <tr>
            <th scope="col">what</th>
            <th scope="col" className="w-72">
              who may
            </th>
            <th scope="col">where the default comes from</th>
          </tr>
        </thead>
        <tbody>
          {DEFAULT_AGE_RULES.map((rule) => {
            const now = values.limits[rule.key];
            const choices = choicesOf(rule, now, unit);
            return (
              <tr key={rule.key}>
                <th scope="row">
                  <span className="block whitespace-normal text-small font-medium desk:w-32">
                    {capital(rule.subject)}
                  </span>
                </th>
                <td>
                  <SelectField
                    form={PLAN_FORM}
                    label={<span className="sr-only">who may: {rule.subject}</span>}
                    value={now}
                    disabled={closed}
                    error={plan.ageProblem(rule.key)}
                    onChange={(event) =>
                      set({ limits: { ...values.limits, [rule.key]: event.target.value } })
                    }
                  >
                    {choices.map(({ value, words }, i) => (
                      <option key={value} value={value}>
                        {words}
                        {i === 0 ? ', default' : ''}
                      </option>
                    ))}
                  </SelectField>
                </td>
                <td className="text-small">
                  {rule.source.text}{' '}
                  <span className="text-pencil">
                    {FOUNDED[rule.source.status]} ({rule.source.edition})
                  </span>
                </td>
              </tr>
            );
          })}
        </tbody>
      </Sheet>
      <KeepRow plan={plan} closed={closed} />
    </section>
  );
}
