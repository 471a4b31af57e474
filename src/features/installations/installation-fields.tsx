import { useId } from 'react';
import { OptionStruts } from '../../components/ui/choices';
import { Field } from '../../components/ui/field';
import { typedNumber } from '../../lib/check-input';
import { formatTime } from '../../lib/formats';
import { serverNow } from '../../lib/server-clock';

/** What is typed about an installation. */
export interface Basics {
  name: string;
  venue: string;
  timeZone: string;
  unit: 'mm' | 'inch';
  hallLimit: string;
}

/** The basics as the contract names them. */
export const basicsInput = (basics: Basics) => ({
  ...basics,
  timeZone: basics.timeZone.trim(),
  hallLimit: typedNumber(basics.hallLimit),
});

const ZONES: readonly string[] = Intl.supportedValuesOf('timeZone');

/** The time there now, so that a wrong zone shows. */
function timeThere(zone: string): string {
  try {
    return `There it is ${formatTime(serverNow(), zone.trim())} now.`;
  } catch {
    return 'Of the venue. Begin to type a city.';
  }
}

/** Name, venue, time zone, unit and hall limit. */
export function InstallationFields({
  value,
  onChange,
  problem,
}: {
  value: Basics;
  onChange: (next: Basics) => void;
  problem: (path: string) => string | undefined;
}) {
  const zones = useId();
  const set = (part: Partial<Basics>) => onChange({ ...value, ...part });
  return (
    <div className="grid items-start gap-x-8 gap-y-5 sm:grid-cols-2">
      <Field
        label="name of the installation"
        value={value.name}
        onChange={(event) => set({ name: event.target.value })}
        error={problem('name')}
      />
      <Field
        label="venue"
        optional
        value={value.venue}
        onChange={(event) => set({ venue: event.target.value })}
        error={problem('venue')}
      />
      <div>
        <Field
          label="time zone"
          list={zones}
          autoComplete="off"
          spellCheck={false}
          value={value.timeZone}
          onChange={(event) => set({ timeZone: event.target.value })}
          error={problem('timeZone')}
          hint={timeThere(value.timeZone)}
        />
        <datalist id={zones}>
          {ZONES.map((zone) => (
            <option key={zone} value={zone} />
          ))}
        </datalist>
      </div>
      <Field
        label="the hall may hold"
        unit="people"
        inputMode="numeric"
        value={value.hallLimit}
        onChange={(event) => set({ hallLimit: event.target.value })}
        error={problem('hallLimit')}
        hint="As posted at its door. The muster desk lets in no more."
      />
      <OptionStruts<Basics['unit']>
        legend="lengths are shown in"
        columns={2}
        value={value.unit}
        onChange={(unit) => set({ unit })}
        error={problem('unit')}
        options={[
          { value: 'mm', label: 'millimetres' },
          { value: 'inch', label: 'inches' },
        ]}
      />
    </div>
  );
}
