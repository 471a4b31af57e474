import type { ReactNode } from 'react';
import { AskStrut, BrokenStrut, StateGlyph } from './strut-glyph';

export type NoteKind = 'refused' | 'taken' | 'no network' | 'ask' | 'done';

export type NoteProps = {
  /** refused: a rule says no; taken: somebody was first; no network; ask: a question to answer; done. */
  kind: NoteKind;
  /** What happened, in a few words. */
  title: ReactNode;
  /** What it means for you and what to do next. */
  children?: ReactNode;
  /** The ways on, at the right or below. */
  actions?: ReactNode;
  /** False for a note that was there when the page came: it is then not read out by itself. */
  announce?: boolean;
};

function NoteGlyph({ kind }: { kind: NoteKind }) {
  switch (kind) {
    case 'refused':
      return <StateGlyph state="held" />;
    case 'taken':
      return <StateGlyph state="in hand" />;
    case 'no network':
      return <BrokenStrut />;
    case 'ask':
      return <AskStrut />;
    case 'done':
      return <StateGlyph state="passed" />;
  }
}

/** Something to tell a person: two pencil lines and a mark, never a tinted box. */
export function Note({ kind, title, children, actions, announce = true }: NoteProps) {
  const role = kind === 'refused' || kind === 'taken' ? 'alert' : 'status';
  return (
    <div className="note" data-kind={kind} role={announce ? role : undefined}>
      <span className="note-glyph">
        <NoteGlyph kind={kind} />
      </span>
      <div className="note-words">
        <p className="note-title">{title}</p>
        {children !== undefined && <div className="note-text">{children}</div>}
      </div>
      {actions !== undefined && <div className="note-actions">{actions}</div>}
    </div>
  );
}

/** Nothing here yet, and what would bring something here. */
export function EmptyNote({ title, children }: { title: ReactNode; children?: ReactNode }) {
  return (
    <div className="empty-note">
      <StateGlyph state="waiting" height={24} />
      <div>
        <p className="font-medium">{title}</p>
        {children !== undefined && <div className="text-pencil">{children}</div>}
      </div>
    </div>
  );
}
