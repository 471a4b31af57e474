import { useState } from 'react';
import type { BuildDayInput } from '../../../shared/contracts/installations';
import type { BuildDayRecord } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { DayRuler } from '../../components/ui/day-ruler';
import { DimensionHead } from '../../components/ui/heads';
import { EmptyNote } from '../../components/ui/note';
import { counted, formatDate } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import { BuildDayForm } from './build-day-form';
import { standing } from './standing';

const BLANK: BuildDayInput = {
  date: '',
  doors: '09:00',
  start: '09:30',
  clearUp: '17:30',
  end: '18:30',
  breaks: [{ from: '12:30', to: '13:15', label: 'lunch' }],
};

const longDate = (date: string): string => {
  const noon = Date.parse(`${date}T12:00:00Z`);
  const weekday = new Intl.DateTimeFormat('en-GB', { weekday: 'long', timeZone: 'UTC' }).format(noon);
  return `${weekday} ${formatDate(noon, 'UTC')}`;
};

/** The dated sessions, each drawn as a ruler. */
export function BuildDaysSection({ installationId, closed }: { installationId: string; closed: boolean }) {
  const days = standing(useLiveMap(installationId, 'buildDays'), (a, b) => a.date.localeCompare(b.date));
  const [editing, setEditing] = useState<string | null>(null);
  const path = `/installations/${installationId}/build-days`;
  return (
    <section className="grid gap-5" aria-labelledby="build-days" id="build-days-section">
      <DimensionHead id="build-days" right={counted(days.length, 'day')}>
        Build days
      </DimensionHead>
      {days.length === 0 && (
        <EmptyNote title="No build day yet.">
          Set the first one: its date and the times people need to know.
        </EmptyNote>
      )}
      {days.map((day) =>
        editing === day.id ? (
          <BuildDayForm
            key={day.id}
            initial={inputOf(day)}
            wish={{ method: 'PUT', path: `${path}/${day.id}` }}
            words="Keep this day"
            onDone={() => setEditing(null)}
            onCancel={() => setEditing(null)}
          />
        ) : (
          <article key={day.id} className="grid gap-2" aria-label={longDate(day.date)}>
            <div className="flex flex-wrap items-baseline gap-x-6 gap-y-1">
              <h3>{longDate(day.date)}</h3>
              {!closed && (
                <span className="flex flex-wrap gap-x-4">
                  <Action
                    look="words"
                    label={`Change ${longDate(day.date)}`}
                    onClick={() => setEditing(day.id)}
                  >
                    Change
                  </Action>
                  <ConfirmAction
                    words="Take out"
                    look="words"
                    label={`Take out ${longDate(day.date)}`}
                    title={`Take out ${longDate(day.date)}?`}
                    confirm="Take it out"
                    wish={{ method: 'DELETE', path: `${path}/${day.id}` }}
                  >
                    <p>Its times and breaks go. Everything else of the installation stays.</p>
                  </ConfirmAction>
                </span>
              )}
            </div>
            <DayRuler
              doors={day.doors}
              start={day.start}
              clearUp={day.clearUp}
              end={day.end}
              breaks={day.breaks}
            />
          </article>
        ),
      )}
      {editing === 'new' && (
        <BuildDayForm
          initial={BLANK}
          wish={{ method: 'POST', path }}
          words="Add this day"
          onDone={() => setEditing(null)}
          onCancel={() => setEditing(null)}
        />
      )}
      {editing === null && !closed && (
        <div>
          <Action onClick={() => setEditing('new')}>Add a build day</Action>
        </div>
      )}
    </section>
  );
}

const inputOf = ({ date, doors, start, clearUp, end, breaks }: BuildDayRecord): BuildDayInput => ({
  date,
  doors,
  start,
  clearUp,
  end,
  breaks: breaks.map(({ from, to, label }) => ({ from, to, label })),
});
