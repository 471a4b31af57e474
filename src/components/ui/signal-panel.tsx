import { useId } from 'react';
import type { ReactNode } from 'react';
import { SIGNAL_STYLE } from '../../../shared/safety/signal-words';
import type { SignalWord } from '../../../shared/safety/signal-words';

export type SignalPanelProps = {
  word: SignalWord;
  /** The hazard in a few words: `Burn hazard. Nozzle and glue are at 195 °C.` */
  title?: ReactNode;
  /** What it does to a person, and how to avoid it. */
  children: ReactNode;
};

/** The safety alert symbol: a triangle round an exclamation mark; white on red, black on orange and yellow. */
function AlertSymbol() {
  return (
    <svg className="signal-symbol" viewBox="0 0 32 28" aria-hidden="true">
      <path d="M16 0.5 31.5 27.5H0.5Z" fill="currentColor" />
      <path d="M14.2 9h3.6l-.7 9.6h-2.2Z" className="signal-mark" />
      <circle cx="16" cy="22.4" r="2" className="signal-mark" />
    </svg>
  );
}

/** A safety message panel after ANSI Z535.4; used for safety texts and for nothing else. */
export function SignalPanel({ word, title, children }: SignalPanelProps) {
  const id = useId();
  const { colour, alertSymbol } = SIGNAL_STYLE[word];
  return (
    <div className="signal" data-colour={colour} role="group" aria-labelledby={`${id} ${id}-title`}>
      <p className="signal-word" id={id}>
        {alertSymbol && <AlertSymbol />}
        <span>{word}</span>
      </p>
      <div className="signal-text">
        {title !== undefined && (
          <p className="signal-title" id={`${id}-title`}>
            {title}
          </p>
        )}
        {children}
      </div>
    </div>
  );
}
