import { EmptyNote } from '../../components/ui/note';
import { DimensionHead } from '../../components/ui/heads';
import { Figures } from '../../components/ui/figures';
import { Sheet } from '../../components/ui/sheet';
import { TimeScale, ToolOutLine } from '../../components/ui/tool-out-line';
import { formatDuration } from '../../lib/formats';
import { timeWords } from './back-by';
import { lineWindow } from './line-window';
import type { Crib } from './use-crib';

/** Every tool that is out, the soonest due first; what is over its time in madder. */
export function WhoHasWhat({ crib }: { crib: Crib }) {
  const { out, nameOf, stationName, now, zone } = crib;
  const { opens, closes, place } = lineWindow(crib);
  const when = (at: number) => timeWords(at, now, zone);
  return (
    <section aria-labelledby="who-has-what">
      <DimensionHead id="who-has-what" right={`${out.length} out, soonest back first`}>
        Who has what
      </DimensionHead>
      {out.length === 0 ? (
        <EmptyNote title="Every tool is in the crib." />
      ) : (
        <Sheet caption="Tools that are out" rows="fixed" className="tools-out flowing">
          <thead>
            <tr>
              <th scope="col">number</th>
              <th scope="col">tool</th>
              <th scope="col">with</th>
              <th scope="col" className="tools-out-line">
                <span className="sr-only">time out</span>
                <TimeScale opens={opens} closes={closes} />
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
                <td>{tool.name}</td>
                <td data-label="with">
                  {nameOf(checkout.personId)}
                  {checkout.stationId && `, at ${stationName(checkout.stationId)}`}
                </td>
                <td className="tools-out-line">
                  <ToolOutLine
                    opens={opens}
                    closes={closes}
                    out={place(checkout.outAt)}
                    backBy={place(checkout.backBy)}
                    now={place(now)}
                    words={`out since ${when(checkout.outAt)}, ${late ? 'should have been back by' : 'back by'} ${when(checkout.backBy)}`}
                  />
                </td>
                <td data-label="back by" className="amount">
                  {late ? (
                    <strong className="text-held">
                      {formatDuration((now - checkout.backBy) / 1000)} over,{' '}
                      <Figures>{when(checkout.backBy)}</Figures>
                    </strong>
                  ) : (
                    <Figures>{when(checkout.backBy)}</Figures>
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
