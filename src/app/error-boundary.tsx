import { Component } from 'react';
import type { ErrorInfo, ReactNode } from 'react';
import { isRouteErrorResponse, useRouteError } from 'react-router-dom';
import { Action } from '../components/ui/action';
import { BeeMark } from '../components/ui/bee-mark';
import { BrokenStrut } from '../components/ui/strut-glyph';
import { Component as NotFound } from './routes/not-found';

/** A part of the application that could not be fetched: the network is gone, or a newer version was put up meanwhile. */
const isLoadFailure = (error: unknown): boolean =>
  error instanceof Error && /dynamically imported module|module script|Failed to fetch/i.test(error.message);

function Broken({ error }: { error: unknown }) {
  const unloaded = isLoadFailure(error);
  return (
    <main id="main" className="mx-auto grid max-w-words gap-4 p-5">
      <p className="flex items-center gap-3">
        <BeeMark /> Strutbee
      </p>
      <h1 className="page-title">{unloaded ? 'This page did not arrive.' : 'This page broke.'}</h1>
      <p className="flex items-center gap-3">
        <BrokenStrut /> Nothing that you did before is lost.
      </p>
      <p>
        {unloaded
          ? 'The network may be gone, or Strutbee was renewed meanwhile. Load it again when you have network.'
          : 'The fault is ours, not yours. Load it again. If it breaks again, the muster desk can do the same thing for you; tell them which page it was.'}
      </p>
      <p className="flex flex-wrap gap-4">
        <Action
          look="main"
          onClick={() => {
            window.location.reload();
          }}
        >
          Load it again
        </Action>
        <Action look="plain" href="/">
          Go to the start
        </Action>
      </p>
    </main>
  );
}

/** What the router shows when a page throws or an address leads nowhere. */
export function RouteError() {
  const error = useRouteError();
  if (isRouteErrorResponse(error) && error.status === 404) return <NotFound />;
  return <Broken error={error} />;
}

type State = { error: unknown; broken: boolean };

/** Round everything: whatever throws outside a page still ends in words that help. */
export class ErrorBoundary extends Component<{ children: ReactNode }, State> {
  override state: State = { error: null, broken: false };

  static getDerivedStateFromError(error: unknown): State {
    return { error, broken: true };
  }

  override componentDidCatch(error: Error, info: ErrorInfo): void {
    console.error(error, info.componentStack);
  }

  override render(): ReactNode {
    return this.state.broken ? <Broken error={this.state.error} /> : this.props.children;
  }
}
