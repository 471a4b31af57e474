import type { ReactNode } from 'react';

export type SheetProps = {
  /** What the table lists, for those who do not see the page. */
  caption: string;
  /** thead and tbody; cells carry `data-label` with their column's word, shown when rows are stacked on a phone. */
  children: ReactNode;
  /** Rows of 37 px for lists that stay long; else the rows grow with their words. */
  rows?: 'fixed' | 'grow';
  className?: string;
};

/** A table with pencil lines. On a phone each row becomes a short list of its own. */
export function Sheet({ caption, children, rows = 'grow', className }: SheetProps) {
  return (
    <table className={['sheet', className].filter(Boolean).join(' ')} data-rows={rows}>
      <caption className="sr-only">{caption}</caption>
      {children}
    </table>
  );
}
