import type { ReactNode } from 'react';
import type { BriefingBody } from '../../../shared/safety';
import { DimensionHead } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';
import { SignalPanel } from '../../components/ui/signal-panel';
import { counted } from '../../lib/formats';
import { marksOf, type Mark } from './version-draft';

/** The text of a version as the room reads it, with what is new or has other words than before, and the right answers. */
export function VersionPreview({
  body,
  before,
  whatChanged,
}: {
  body: BriefingBody;
  before: BriefingBody;
  whatChanged: string;
}) {
  const { marks, gone } = marksOf(before, body);
  const markOf = (list: string, id: string) => marks.get(`${list}.${id}`);
  return (
    <article className="version-preview" aria-label="The text as people read it">
      {whatChanged.trim() !== '' && (
        <Note kind="ask" title={`What changed: ${whatChanged.trim()}`} announce={false} />
      )}
      <p className="text-small text-pencil">
        {marks.size === 0 && gone === 0
          ? 'The same words as before.'
          : `${counted(marks.size, 'entry', 'entries')} new or changed, ${gone} taken out.`}
      </p>
      {body.panels.map((panel) => (
        <Marked key={panel.id} mark={markOf('panels', panel.id)}>
          <SignalPanel word={panel.signalWord} title={panel.headline}>
            {panel.consequence !== '' && <p>{panel.consequence}</p>}
            {panel.avoid.map((line, i) => (
              <p key={i}>{line}</p>
            ))}
          </SignalPanel>
        </Marked>
      ))}
      <ol>
        {body.rules.map((rule, i) => (
          <li key={rule.id} className="grid grid-cols-[2rem_1fr] gap-3 border-b border-rule py-2">
            <span className="entry-number" aria-hidden="true">
              {i + 1}
            </span>
            <Marked mark={markOf('rules', rule.id)}>{rule.text}</Marked>
          </li>
        ))}
      </ol>
      <DimensionHead as="h3">First aid</DimensionHead>
      <ul className="grid gap-2">
        {body.firstAid.map((line) => (
          <li key={line.id}>
            <Marked mark={markOf('firstAid', line.id)}>{line.text}</Marked>
          </li>
        ))}
      </ul>
      <ul className="grid gap-2 text-pencil">
        {body.notes.map((note) => (
          <li key={note.id}>
            <Marked mark={markOf('notes', note.id)}>{note.text}</Marked>
          </li>
        ))}
      </ul>
      <DimensionHead as="h3" right={counted(body.questions.length, 'question')}>
        Question sheet
      </DimensionHead>
      <ol className="grid gap-4">
        {body.questions.map((question, i) => (
          <li key={question.id}>
            <Marked mark={markOf('questions', question.id)}>
              <p className="font-medium">
                {i + 1}. {question.text}
              </p>
              <ul>
                {question.options.map((option) => (
                  <li
                    key={option.id}
                    className={option.id === question.right ? 'font-semibold' : 'text-pencil'}
                  >
                    {option.text}
                    {option.id === question.right && ' (right)'}
                  </li>
                ))}
              </ul>
              {question.why !== '' && <p className="text-small text-pencil">{question.why}</p>}
            </Marked>
          </li>
        ))}
      </ol>
      <Marked mark={marks.get('closing')}>
        <p className="font-medium">{body.closing}</p>
      </Marked>
    </article>
  );
}

/** A line at the side and a word for what is new. */
function Marked({ mark, children }: { mark: Mark | undefined; children: ReactNode }) {
  if (mark === undefined) return <div>{children}</div>;
  return (
    <div className="marked-change">
      <span className="marked-change-word">{mark}</span>
      {children}
    </div>
  );
}
