/** A code in large cells, read out letter by letter. */
export function BigCode({ code }: { code: string }) {
  return (
    <p className="big-code">
      <span className="sr-only">{code.split('').join(' ')}</span>
      {code.split('').map((character, i) => (
        <span key={i} className="big-code-cell" aria-hidden="true">
          {character}
        </span>
      ))}
    </p>
  );
}
