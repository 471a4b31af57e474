import { EmptyNote } from '../../components/ui/note';
import { DimensionHead } from '../../components/ui/heads';
import { Figures } from '../../components/ui/figures';
import { Sheet } from '../../components/ui/sheet';
import { TimeScale, ToolOutLine } from '../../components/ui/tool-out-line';
import { counted, formatDuration, formatTime, minutesBetween, minutesOf, timeOfDay } from '../../lib/formats';
import type { Crib } from './use-crib';

const HOUR = 60;

/** The hours that the lines of tools stretch over: from the first lent to the last due, or the build day. */
function windowOf({ out, day, now, zone }: Crib): { opens: string; closes: string } {
  const from = Math.min(now, ...out.map(({ checkout }) => checkout.outAt));
  const to = Math.max(now, ...out.map(({ checkout }) => checkout.backBy));
  const opens = timeOfDay(Math.floor(minutesOf(formatTime(from, zone)) / HOUR) * HOUR);
  const last = timeOfDay(Math.ceil((minutesOf(formatTime(to, zone)) + 1) / HOUR) * HOUR);
  const longEnough = day && minutesBetween(opens, day.clearUp) > minutesBetween(opens, last);
  return { opens, closes: longEnough ? day.clearUp : last };
}

/** Every tool that is out, the soonest due first; what is over its time in madder. */
export function WhoHasWhat({ crib }: { crib: Crib }) {
  const { out, nameOf, stationName, now, zone } = crib;
  const hours = windowOf(crib);
  const time = (at: number) => formatTime(at, zone);
  return (
    <section aria-labelledby="who-has-what">
      <DimensionHead id="who-has-what" right={`${out.length} out, soonest back first`}>
        Who has what
      </DimensionHead>
      {out.length === 0 ? (
        <EmptyNote title="Every tool is in the crib." />
      ) : (
        <Sheet caption="Tools that are out" rows="fixed" className="tools-out">
          <thead>
            <tr>
              <th scope="col">number</th>
              <th scope="col">tool</th>
              <th scope="col">with</th>
              <th scope="col" className="tools-out-line">
                <span className="sr-only">time out</span>
                <TimeScale {...hours} />
              </th>
              <th scope="col" className="amount">
                back by
              </th>
            </tr>
          </thead>
          <tbody>
            {out.map(({ checkout, tool, late }) => (
              <tr key={checkout.id}>
                <th scope="row">{tool.number}</th>
                <td data-label="tool">{tool.name}</td>
                <td data-label="with">
                  {nameOf(checkout.personId)}
                  {checkout.stationId && `, at ${stationName(checkout.stationId)}`}
                </td>
                <td className="tools-out-line">
                  <ToolOutLine
                    out={time(checkout.outAt)}
                    backBy={time(checkout.backBy)}
                    now={time(now)}
                    {...hours}
                  />
                </td>
                <td data-label="back by" className="amount">
                  {late ? (
                    <strong className="text-held">
                      {formatDuration((now - checkout.backBy) / 1000)} over,{' '}
                      <Figures>{time(checkout.backBy)}</Figures>
                    </strong>
                  ) : (
                    <Figures>{time(checkout.backBy)}</Figures>
                  )}
                </td>
              </tr>
            ))}
          </tbody>
        </Sheet>
      )}
    </section>
  );
}

/** The same by person: whom to ask before they go home. */
export function WhatEachHas({ crib }: { crib: Crib }) {
  const byPerson = new Map<string, string[]>();
  for (const { checkout, tool } of crib.out) {
    const list = byPerson.get(checkout.personId) ?? [];
    list.push(tool.number);
    byPerson.set(checkout.personId, list);
  }
  const people = [...byPerson]
    .map(([id, numbers]) => ({ id, name: crib.nameOf(id), numbers }))
    .sort((a, b) => a.name.localeCompare(b.name, 'en'));
  if (people.length === 0) return null;
  return (
    <section aria-labelledby="what-each-has">
      <DimensionHead id="what-each-has" right={counted(people.length, 'person', 'people')}>
        What each has
      </DimensionHead>
      <dl className="muster-duties">
        {people.map(({ id, name, numbers }) => (
          <div key={id}>
            <dt>{name}</dt>
            <dd>{numbers.join(', ')}</dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
