const DIGIT = /\d/;

/** Figures that change or are compared: every digit in a cell of 0.625 em, since Lexend has no tabular figures. */
export function Figures({ children, className }: { children: string | number; className?: string }) {
  const text = String(children);
  return (
    <span className={['figures', className].filter(Boolean).join(' ')}>
      <span className="sr-only">{text}</span>
      <span aria-hidden="true" className="figures-shown">
        {Array.from(text, (character, i) =>
          DIGIT.test(character) ? (
            <span key={i} className="figure">
              {character}
            </span>
          ) : (
            character
          ),
        )}
      </span>
    </span>
  );
}
