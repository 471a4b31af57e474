import { useId, useState, type ReactNode } from 'react';
import { flushSync } from 'react-dom';
import { Action } from '../../components/ui/action';
import { DimensionHead } from '../../components/ui/heads';
import { FieldError } from '../../components/ui/measured';

export interface EntryListProps<T extends { id: string }> {
  title: string;
  /** What one entry is called: `rule`. */
  noun: string;
  entries: readonly T[];
  onChange: (entries: T[]) => void;
  blank: () => T;
  /** So many have to stay, and so many fit. */
  least?: number;
  most?: number;
  error?: string | undefined;
  hint?: ReactNode;
  children: (entry: T, index: number, change: (part: Partial<T>) => void) => ReactNode;
}

/** A list whose entries are added, moved and taken out with buttons; the focus stays with what was moved. */
export function EntryList<T extends { id: string }>(props: EntryListProps<T>) {
  const { title, noun, entries, onChange, blank, least = 0, most = 40, error, hint, children } = props;
  const own = useId();
  const [told, setTold] = useState('');
  const nameOf = (index: number) => `${noun} ${index + 1}`;
  const buttonId = (id: string, way: string) => `${own}-${id}-${way}`;
  const move = (index: number, by: 1 | -1) => {
    const next = [...entries];
    const [moved] = next.splice(index, 1);
    if (!moved) return;
    const at = index + by;
    next.splice(at, 0, moved);
    flushSync(() => {
      onChange(next);
      setTold(`It is now ${nameOf(at)} of ${next.length}.`);
    });
    // At either end the other button takes over.
    const way = at === 0 ? 'down' : at === next.length - 1 ? 'up' : by === 1 ? 'down' : 'up';
    document.getElementById(buttonId(moved.id, way))?.focus();
  };
  const add = () => {
    const entry = blank();
    flushSync(() => onChange([...entries, entry]));
    document
      .getElementById(buttonId(entry.id, 'fields'))
      ?.querySelector<HTMLElement>('input, textarea, select')
      ?.focus();
  };
  const takeOut = (index: number) => {
    flushSync(() => {
      onChange(entries.filter((_, i) => i !== index));
      setTold(`${nameOf(index)} is taken out. ${entries.length - 1} left.`);
    });
    document.getElementById(`${own}-list`)?.focus();
  };
  return (
    <section className="grid gap-2" aria-labelledby={`${own}-title`}>
      <DimensionHead id={`${own}-title`} right={entries.length}>
        {title}
      </DimensionHead>
      {hint !== undefined && <p className="text-small text-pencil">{hint}</p>}
      {error && <FieldError id={`${own}-error`}>{error}</FieldError>}
      <ol id={`${own}-list`} tabIndex={-1} aria-labelledby={`${own}-title`}>
        {entries.map((entry, i) => (
          <li key={entry.id} className="entry" aria-label={nameOf(i)}>
            <span className="entry-number" aria-hidden="true">
              {i + 1}
            </span>
            <div className="entry-fields" id={buttonId(entry.id, 'fields')}>
              {children(entry, i, (part) =>
                onChange(entries.map((other) => (other === entry ? { ...other, ...part } : other))),
              )}
            </div>
            <div className="entry-ways">
              <MoveButton
                id={buttonId(entry.id, 'up')}
                up
                off={i === 0}
                name={nameOf(i)}
                onClick={() => move(i, -1)}
              />
              <MoveButton
                id={buttonId(entry.id, 'down')}
                off={i === entries.length - 1}
                name={nameOf(i)}
                onClick={() => move(i, 1)}
              />
              {entries.length > least && (
                <Action look="words" label={`Take out ${nameOf(i)}`} onClick={() => takeOut(i)}>
                  Take out
                </Action>
              )}
            </div>
          </li>
        ))}
      </ol>
      <p className="sr-only" role="status">
        {told}
      </p>
      {entries.length < most && (
        <div>
          <Action look="plain" size="desk" onClick={add}>
            Add a {noun}
          </Action>
        </div>
      )}
    </section>
  );
}

function MoveButton({
  id,
  up = false,
  off,
  name,
  onClick,
}: {
  id: string;
  up?: boolean;
  off: boolean;
  name: string;
  onClick: () => void;
}) {
  return (
    <button
      type="button"
      id={id}
      className="action move-button"
      data-look={off ? 'off' : 'plain'}
      disabled={off}
      aria-label={`${up ? 'Up' : 'Down'}: ${name}`}
      onClick={onClick}
    >
      <svg width="14" height="14" viewBox="0 0 14 14" aria-hidden="true">
        <path
          d={up ? 'M7 13V2M2 7 7 2 12 7' : 'M7 1V12M2 7 7 12 12 7'}
          fill="none"
          stroke="currentColor"
          strokeWidth="1.6"
        />
      </svg>
    </button>
  );
}
