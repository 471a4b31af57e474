import type { ReactNode } from 'react';
import { usePageTitle } from '../../lib/page-title';

export type DimensionHeadProps = {
  children: ReactNode;
  as?: 'h2' | 'h3' | 'h4';
  /** What stands at the right end of the line: a count, a state. */
  right?: ReactNode;
  id?: string;
};

/** The head of a section: words on a dimension line. */
export function DimensionHead({ children, as: Level = 'h2', right, id }: DimensionHeadProps) {
  return (
    <div className="dimension-head">
      <Level id={id}>{children}</Level>
      {right !== undefined && <span className="dimension-head-right">{right}</span>}
    </div>
  );
}

export type PageHeadProps = {
  title: string;
  /** One line of figures or advice beside the title. */
  summary?: ReactNode;
  /** State counts or actions at the right. */
  aside?: ReactNode;
};

/** The head of a page; carries its one h1 and names the browser's tab. */
export function PageHead({ title, summary, aside }: PageHeadProps) {
  usePageTitle(title);
  return (
    <div className="page-head">
      <h1 className="page-title" tabIndex={-1}>
        {title}
      </h1>
      {summary !== undefined && <p className="page-summary">{summary}</p>}
      {aside !== undefined && <div className="page-aside">{aside}</div>}
    </div>
  );
}

/** The strut under a chosen filter or tool; put it inside something with a position. */
export function SelectionStrut() {
  return <span className="selection-strut" aria-hidden="true" />;
}

export type ChoiceRowProps<V extends string> = {
  /** What is chosen here, for those who do not see the row. */
  label: string;
  choices: readonly { value: V; label: ReactNode }[];
  value: V;
  onChange: (value: V) => void;
};

/** A row of filters or tools, one of them chosen. */
export function ChoiceRow<V extends string>({ label, choices, value, onChange }: ChoiceRowProps<V>) {
  return (
    <div className="choices" role="group" aria-label={label}>
      {choices.map((choice) => (
        <button
          key={choice.value}
          type="button"
          className="choice"
          aria-pressed={choice.value === value}
          onClick={() => {
            onChange(choice.value);
          }}
        >
          {choice.label}
          {choice.value === value && <SelectionStrut />}
        </button>
      ))}
    </div>
  );
}
