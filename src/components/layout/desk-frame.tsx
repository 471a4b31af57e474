import { useId, useState } from 'react';
import type { ReactNode } from 'react';
import { Link, NavLink, useLocation } from 'react-router-dom';
import { BeeMark } from '../ui/bee-mark';
import { Figures } from '../ui/figures';
import { LinkWord } from './link-word';
import type { LinkState } from './link-word';
import { NAV_GROUPS } from './nav-item';
import type { NavItem } from './nav-item';
import { SkipLink } from './skip-link';

/** The title block at the foot of the rule, as on a drawing. Left out parts are not drawn. */
export type TitleBlock = {
  installation?: string;
  /** `day 2 of 2, Sat 14 June` */
  day?: string;
  revision?: number;
  link?: LinkState;
  /** `Lena W, safety lead` */
  who?: string;
  /** Sign out, theme: links and buttons under the name. */
  more?: ReactNode;
};

export type DeskFrameProps = {
  items: readonly NavItem[];
  titleBlock: TitleBlock;
  /** Where the mark leads. */
  home?: string;
  /** The day ruler, on screens of the day. */
  ruler?: ReactNode;
  /** A stop, over everything. */
  stop?: ReactNode;
  children: ReactNode;
};

/** The frame of desk pages: a narrow rule with the screens as its ticks, a title block at its foot, the page beside it. */
export function DeskFrame({ items, titleBlock, home = '/', ruler, stop, children }: DeskFrameProps) {
  const { pathname } = useLocation();
  const menuId = useId();
  // The menu of a narrow window belongs to the page it was opened on: it closes when it has led somewhere.
  const [openOn, setOpenOn] = useState<string | null>(null);
  const open = openOn === pathname;
  return (
    <div className="desk">
      <SkipLink />
      <header className="desk-rule">
        <div className="desk-brand">
          <Link to={home} className="brand">
            <BeeMark />
            <span>Strutbee</span>
          </Link>
          {titleBlock.link && !titleBlock.link.live && (
            <span className="desk-link-narrow">
              <BrokenWord />
            </span>
          )}
          <button
            type="button"
            className="action desk-menu"
            data-look="plain"
            aria-expanded={open}
            aria-controls={menuId}
            onClick={() => {
              setOpenOn(open ? null : pathname);
            }}
          >
            {open ? 'Close' : 'Menu'}
          </button>
        </div>
        <div id={menuId} className="desk-fold" data-open={open ? '' : undefined}>
          {items.length > 0 && <RuleNav items={items} />}
          <TitleBlockView {...titleBlock} />
        </div>
      </header>
      <div className="desk-page">
        {stop}
        {ruler !== undefined && <div className="desk-ruler">{ruler}</div>}
        <main id="main" className="desk-main" tabIndex={-1}>
          {children}
        </main>
      </div>
    </div>
  );
}

const BrokenWord = () => <LinkWord link={{ live: false }} words={{ live: 'live', broken: 'no network' }} />;

/** The screens as ticks of a rule, under Before, On the day, After. */
function RuleNav({ items }: { items: readonly NavItem[] }) {
  return (
    <nav className="rule-nav" aria-label="Screens">
      {NAV_GROUPS.map((group) => {
        const inGroup = items.filter((item) => item.group === group);
        if (inGroup.length === 0) return null;
        return (
          <div key={group} className="rule-group">
            <p className="rule-head" id={`rule-${group.replaceAll(' ', '-')}`}>
              {group}
            </p>
            <ul aria-labelledby={`rule-${group.replaceAll(' ', '-')}`}>
              {inGroup.map(({ to, label, end }) => (
                <li key={to}>
                  <NavLink to={to} end={end} className="rule-item">
                    {label}
                  </NavLink>
                </li>
              ))}
            </ul>
          </div>
        );
      })}
    </nav>
  );
}

function TitleBlockView({ installation, day, revision, link, who, more }: TitleBlock) {
  return (
    <section className="title-block" aria-label="Title block">
      {(installation !== undefined || day !== undefined) && (
        <div className="title-row">
          {installation !== undefined && <p className="font-semibold">{installation}</p>}
          {day !== undefined && <p className="text-pencil">{day}</p>}
        </div>
      )}
      {(revision !== undefined || link) && (
        <dl className="title-row title-cells">
          {revision !== undefined && (
            <div>
              <dt>revision</dt>
              <dd>
                <Figures>{revision}</Figures>
              </dd>
            </div>
          )}
          {link && (
            <div>
              <dt>link</dt>
              <dd>
                <LinkWord
                  link={link}
                  words={{
                    live: 'live',
                    broken: `broken${link.live || !link.since ? '' : ` ${link.since}`}`,
                  }}
                />
              </dd>
            </div>
          )}
        </dl>
      )}
      {(who !== undefined || more !== undefined) && (
        <div className="title-row">
          {who !== undefined && <p>{who}</p>}
          {more}
        </div>
      )}
    </section>
  );
}
