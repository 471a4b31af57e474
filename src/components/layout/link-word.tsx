import { BrokenStrut } from '../ui/strut-glyph';

/** The link to the server: live, or broken since a time. */
export type LinkState = { live: true } | { live: false; since?: string };

/** The link's state in a word; broken with its mark. */
export function LinkWord({ link, words }: { link: LinkState; words: { live: string; broken: string } }) {
  return (
    <span className="link-word" data-live={link.live ? '' : undefined} role="status">
      {!link.live && <BrokenStrut height={12} />}
      {link.live ? words.live : words.broken}
    </span>
  );
}
