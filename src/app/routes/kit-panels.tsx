import { Action } from '../../components/ui/action';
import { DimensionHead } from '../../components/ui/heads';
import { EmptyNote, Note } from '../../components/ui/note';
import { Sheet } from '../../components/ui/sheet';
import { SignalPanel } from '../../components/ui/signal-panel';
import { StopBanner } from '../../components/ui/stop-banner';
import { OutOfUseTag, TimeScale, ToolOutLine } from '../../components/ui/tool-out-line';
import { en } from '../../lib/messages/en';

const TOOLS = [
  { number: 'G-03', tool: 'hot-glue gun', who: 'Dag O', out: '12:20', backBy: '13:50' },
  { number: 'G-09', tool: 'hot-glue gun', who: 'Mei T', out: '13:20', backBy: '14:30' },
];

/** Notes, safety panels, a stop, tables and tags. */
export function KitPanels() {
  return (
    <>
      <DimensionHead>Notes</DimensionHead>
      <div className="grid gap-6 desk:grid-cols-2">
        <Note kind="taken" title="Yara Q was first." announce={false}>
          L-15 glue out has one place. Yara Q took it at 14:07:31, half a second before you. You still have
          V-09.
        </Note>
        <Note
          kind="refused"
          title="Not on circuit A."
          announce={false}
          actions={
            <>
              <Action look="words">Start again</Action>
              <Action look="main">Out at C-2</Action>
            </>
          }
        >
          It carries 1,900 W of its 1,920 W; this gun needs 100 W.
        </Note>
        <Note kind="no network" title="No network since 14:05." announce={false}>
          1 action waits on this phone. It is sent, once, as soon as the network is back. Keep working.
        </Note>
        <Note kind="ask" title="Which adult is with you?" announce={false}>
          They have to be on site.
        </Note>
        <Note kind="done" title="V-09 glue out is yours." announce={false}>
          Go to glue 3.
        </Note>
        <EmptyNote title="Nothing in hand.">Take something from the list below.</EmptyNote>
      </div>
      <DimensionHead>Signal words</DimensionHead>
      <div className="grid items-start gap-6 desk:grid-cols-4">
        <SignalPanel word="DANGER" title="What kills or maims if not avoided.">
          <p>White on red, with the alert symbol.</p>
        </SignalPanel>
        <SignalPanel word="WARNING" title="Burn hazard. Nozzle and glue are at 195 °C.">
          <p>Touching them can cause deep burns; glue sticks to skin and goes on burning.</p>
        </SignalPanel>
        <SignalPanel word="CAUTION" title="What could hurt a little.">
          <p>Black on yellow.</p>
        </SignalPanel>
        <SignalPanel word="NOTICE">
          <p>A gun drips. Keep the card under the nozzle or the bench is spoilt.</p>
        </SignalPanel>
      </div>
      <DimensionHead>A stop</DimensionHead>
      <StopBanner
        word={en.stop.word}
        scope="hot tools"
        since={en.stop.since('14:07')}
        what={en.stop.what('Smoke at glue 2.', 'Lena W', 'all hot tools')}
        steps={en.stop.makeSafe['hot-tools']}
        foot={en.stop.otherWork}
        actions={<Action look="main">{en.stop.iSaw}</Action>}
      />
      <DimensionHead right="31 out, soonest back first">Who has what</DimensionHead>
      <Sheet caption="Tools that are out" rows="fixed">
        <thead>
          <tr>
            <th scope="col">number</th>
            <th scope="col">tool</th>
            <th scope="col">with</th>
            <th scope="col">
              <span className="sr-only">out and back</span>
              <TimeScale opens="12:00" closes="18:30" />
            </th>
            <th scope="col" className="amount">
              back by
            </th>
          </tr>
        </thead>
        <tbody>
          {TOOLS.map(({ number, tool, who, out, backBy }) => (
            <tr key={number}>
              <th scope="row">{number}</th>
              <td>{tool}</td>
              <td data-label="with">{who}</td>
              <td>
                <ToolOutLine opens="12:00" closes="18:30" out={out} backBy={backBy} now="14:07" />
              </td>
              <td data-label="back by" className="amount">
                {backBy}
              </td>
            </tr>
          ))}
        </tbody>
      </Sheet>
      <div className="grid max-w-words gap-3">
        <OutOfUseTag
          tool="G-07 hot-glue gun"
          reason="Drips at the nozzle when upright."
          detail="Lena W, 13:58. Cleared only by Lena W or a second authorised person."
        />
        <OutOfUseTag
          tool="D-04 cordless driver"
          reason="Chuck does not hold."
          detail="Sol V, 11:40. Cleared only by Sol V or a second authorised person."
        />
      </div>
    </>
  );
}
