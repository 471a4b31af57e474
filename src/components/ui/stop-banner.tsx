import type { ReactNode } from 'react';

export type StopBannerProps = {
  /** `Stop` in the reader's language. */
  word: string;
  /** What is stopped: `hot tools`, `glue 2`, `everything`. */
  scope: string;
  /** `since 14:07`. */
  since: string;
  /** What happened and who stopped it. */
  what: ReactNode;
  /** How to make safe, one thing each. */
  steps: readonly string[];
  /** What goes on and who lifts it; who has seen it. */
  foot?: ReactNode;
  actions?: ReactNode;
  /** banner over a page, page as the whole of a phone, wall on the projector. */
  size?: 'banner' | 'page' | 'wall';
};

/** The held strut in its largest size. */
function StopStrut() {
  return (
    <svg className="stop-strut" aria-hidden="true">
      <line x1="0" x2="100%" y1="50%" y2="50%" className="stop-line" />
      <line x1="50%" x2="50%" y1="4%" y2="96%" className="stop-bar" />
      <line x1="50%" x2="50%" y1="4%" y2="96%" className="stop-bar" />
      <circle cx="0" cy="50%" className="stop-joint" />
      <circle cx="100%" cy="50%" className="stop-joint" />
    </svg>
  );
}

/** A stop: madder over everything else, with what to do. */
export function StopBanner(props: StopBannerProps) {
  const { word, scope, since, what, steps, foot, actions, size = 'banner' } = props;
  return (
    <section className="stop" data-size={size} role="alert">
      <div className="stop-head">
        <strong className="stop-word">{word}</strong>
        <span className="stop-scope">
          <strong>{scope}</strong>
          <span>{since}</span>
        </span>
      </div>
      <StopStrut />
      <p className="stop-what">{what}</p>
      <ol className="stop-steps">
        {steps.map((step, i) => (
          <li key={step}>
            <span className="stop-number" aria-hidden="true">
              {i + 1}
            </span>
            <span>{step}</span>
          </li>
        ))}
      </ol>
      {foot !== undefined && <div className="stop-foot">{foot}</div>}
      {actions !== undefined && <div className="stop-actions">{actions}</div>}
    </section>
  );
}
