import type { ReactNode } from 'react';
import { ApiError, NetworkError } from '../../lib/api';
import { Action } from './action';
import { Note } from './note';

export type RefusalProps = {
  error: unknown;
  /** Problems of fields that are not on the page. */
  unplaced?: readonly string[];
  /** Offered when the page is older than what the server has. */
  onReload?: () => void;
  actions?: ReactNode;
};

/** What a server said no to, where it belongs to no field. */
export function Refusal({ error, unplaced = [], onReload, actions }: RefusalProps) {
  if (unplaced.length > 0)
    return (
      <Note kind="refused" title="Something more needs another look." actions={actions}>
        <ul>
          {unplaced.map((words) => (
            <li key={words}>{words}</li>
          ))}
        </ul>
      </Note>
    );
  if (!error) return null;
  if (error instanceof ApiError) {
    const stale = error.code === 'STALE_PAGE' && onReload;
    return (
      <Note
        kind="refused"
        title={error.message}
        actions={stale ? <Action onClick={onReload}>Load the newer state</Action> : actions}
      />
    );
  }
  if (error instanceof NetworkError)
    return (
      <Note kind="no network" title="There is no network, or the server does not answer." actions={actions}>
        Nothing you typed is lost. Try again in a moment.
      </Note>
    );
  return (
    <Note kind="refused" title="This did not work, and the fault is ours." actions={actions}>
      Load the page again. If it happens again, tell an organiser what you did.
    </Note>
  );
}
