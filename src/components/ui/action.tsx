import { useId } from 'react';
import type { MouseEvent, ReactNode, Ref } from 'react';
import { Link } from 'react-router-dom';

export type ActionProps = {
  children: ReactNode;
  /** `main` is the one thing to do here, `crossed` another, `plain` in a row of several, `words` an underlined word. */
  look?: 'main' | 'crossed' | 'plain' | 'words';
  /** desk 36, phone 48, glove 64 px; left out, it follows the device. */
  size?: 'desk' | 'phone' | 'glove';
  /** A second, smaller line: what happens then. */
  detail?: ReactNode;
  /** Makes it a link inside the application. */
  to?: string;
  /** Makes it a link to a file or another page. */
  href?: string;
  download?: boolean;
  onClick?: (event: MouseEvent<HTMLElement>) => void;
  type?: 'button' | 'submit';
  /** Cannot be used now. Say why in `reason`, or close by. */
  disabled?: boolean;
  /** Why it cannot be used now; it then stays reachable by the keyboard and says so. */
  reason?: string;
  /** Something is under way: it keeps its words and takes no second press. */
  busy?: boolean;
  /** Fills the width of its column. */
  wide?: boolean;
  /** For those who do not see what is beside it: `Take L-15 glue out`. Starts with the words shown. */
  label?: string;
  pressed?: boolean;
  expanded?: boolean;
  controls?: string;
  autoFocus?: boolean;
  form?: string;
  ref?: Ref<HTMLButtonElement>;
  className?: string;
};

/** Something a person can do, drawn as a pencil frame. Renders a button, or a link when it leads somewhere. */
export function Action({ ref, ...props }: ActionProps) {
  const { children, look = 'crossed', size, detail, to, href, wide, label, reason, busy, disabled } = props;
  const reasonId = useId();
  const off = disabled === true || reason !== undefined;
  const classes = ['action', props.className].filter(Boolean).join(' ');
  const face = (
    <>
      <span className="action-words">{children}</span>
      {detail !== undefined && <span className="action-detail">{detail}</span>}
    </>
  );
  const shared = {
    className: classes,
    'data-look': off && look !== 'words' ? 'off' : look,
    'data-size': size,
    'data-wide': wide ? '' : undefined,
    'aria-label': label,
  };
  if (to !== undefined && !off)
    return (
      <Link {...shared} to={to} onClick={props.onClick}>
        {face}
      </Link>
    );
  if (href !== undefined && !off)
    return (
      <a {...shared} href={href} download={props.download} onClick={props.onClick}>
        {face}
      </a>
    );
  const still = reason !== undefined || busy === true;
  const button = (
    <button
      {...shared}
      ref={ref}
      type={props.type ?? 'button'}
      form={props.form}
      autoFocus={props.autoFocus}
      disabled={disabled === true && reason === undefined}
      aria-disabled={still ? true : undefined}
      aria-busy={busy ? true : undefined}
      aria-pressed={props.pressed}
      aria-expanded={props.expanded}
      aria-controls={props.controls}
      aria-describedby={reason === undefined ? undefined : reasonId}
      onClick={(event) => {
        if (still) event.preventDefault();
        else props.onClick?.(event);
      }}
    >
      {face}
    </button>
  );
  if (reason === undefined) return button;
  return (
    <span className="action-with-reason" data-wide={wide ? '' : undefined}>
      {button}
      <span className="action-reason" id={reasonId}>
        {reason}
      </span>
    </span>
  );
}
