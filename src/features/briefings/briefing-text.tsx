import type { BriefingTextView } from '../../../shared/contracts/safety';
import { DimensionHead } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';
import { SignalPanel } from '../../components/ui/signal-panel';
import { useMessages } from '../../lib/messages';

/** The text of one version: what changed, signal panels, numbered rules, first aid, notes, who comes first. */
export function BriefingText({ view, since }: { view: BriefingTextView; since: string }) {
  const { briefing: words } = useMessages();
  const { body } = view;
  return (
    <article className="grid gap-6" aria-labelledby="briefing-title">
      <div>
        <h2 className="bench-code" id="briefing-title">
          {view.title}
        </h2>
        <p className="text-pencil">{words.version(view.version, since)}</p>
      </div>
      {view.whatChanged && <Note kind="ask" title={words.changed(view.whatChanged)} announce={false} />}
      {body.panels.map((panel) => (
        <SignalPanel key={panel.id} word={panel.signalWord} title={panel.headline}>
          {panel.consequence !== '' && <p>{panel.consequence}</p>}
          {panel.avoid.map((line) => (
            <p key={line}>{line}</p>
          ))}
        </SignalPanel>
      ))}
      <ol>
        {body.rules.map((rule, index) => (
          <li key={rule.id} className="grid grid-cols-[2.5rem_1fr] gap-3 border-b border-rule py-3">
            <span className="bench-number" aria-hidden="true">
              {index + 1}
            </span>
            <span>{rule.text}</span>
          </li>
        ))}
      </ol>
      <section aria-labelledby="briefing-first-aid">
        <DimensionHead id="briefing-first-aid">{words.firstAid}</DimensionHead>
        <ul className="mt-3 grid gap-3">
          {body.firstAid.map((line) => (
            <li key={line.id}>{line.text}</li>
          ))}
        </ul>
      </section>
      {body.notes.length > 0 && (
        <ul className="grid gap-3 text-pencil">
          {body.notes.map((note) => (
            <li key={note.id}>{note.text}</li>
          ))}
        </ul>
      )}
      <p className="font-medium">{body.closing}</p>
    </article>
  );
}
