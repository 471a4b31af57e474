import type { ReactNode } from 'react';
import { NavLink } from 'react-router-dom';
import { usePageTitle } from '../../lib/page-title';
import { BeeMark } from '../ui/bee-mark';
import { LinkWord } from './link-word';
import type { LinkState } from './link-word';
import { SkipLink } from './skip-link';

export type PhoneFrameProps = {
  /** The page's one h1. */
  title: string;
  /** First name and initial. */
  who?: string;
  link?: LinkState;
  /** Words of the link in the reader's language: `live, 14:07`, `no network`. */
  linkWords?: { live: string; broken: string };
  /** Something other than name and link at the right of the head. */
  aside?: ReactNode;
  ruler?: ReactNode;
  /** A stop, over everything. */
  stop?: ReactNode;
  /** The phone's screens, at most five; drawn as a bar at the foot. */
  items?: readonly { to: string; label: string; end?: boolean }[];
  navLabel?: string;
  skipWords?: string;
  children: ReactNode;
};

const PLAIN_WORDS = { live: 'live', broken: 'no network' };

/** The frame of phone pages: one column, the head, the day ruler, big things to do, the screens at the foot. */
export function PhoneFrame(props: PhoneFrameProps) {
  const { title, who, link, linkWords = PLAIN_WORDS, aside, ruler, stop, items = [], children } = props;
  usePageTitle(title);
  return (
    <div className="phone" data-nav={items.length > 0 ? '' : undefined}>
      <SkipLink>{props.skipWords}</SkipLink>
      {stop}
      <header className="phone-head">
        <BeeMark height={25} />
        <h1 className="phone-title" tabIndex={-1}>
          {title}
        </h1>
        <div className="phone-who">
          {aside}
          {who !== undefined && <strong>{who}</strong>}
          {link && <LinkWord link={link} words={linkWords} />}
        </div>
      </header>
      {ruler !== undefined && <div className="phone-ruler">{ruler}</div>}
      <main id="main" className="phone-main" tabIndex={-1}>
        {children}
      </main>
      {items.length > 0 && (
        <nav className="phone-nav" aria-label={props.navLabel ?? 'Screens'}>
          <ul>
            {items.map(({ to, label, end }) => (
              <li key={to}>
                <NavLink to={to} end={end} className="phone-item">
                  {label}
                </NavLink>
              </li>
            ))}
          </ul>
        </nav>
      )}
    </div>
  );
}
