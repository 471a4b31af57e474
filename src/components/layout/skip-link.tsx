/** The first thing the keyboard reaches: past the frame to the page's own content. */
export function SkipLink({
  children = 'Go to the content',
  to = 'main',
}: {
  children?: string;
  to?: string;
}) {
  return (
    <a className="skip-link" href={`#${to}`}>
      {children}
    </a>
  );
}
