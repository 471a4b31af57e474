/** The product's mark: a bee whose body is a strut and whose wings are frames. */
export function BeeMark({ height = 22 }: { height?: number }) {
  return (
    <svg
      className="bee"
      width={(height * 99) / 75}
      height={height}
      viewBox="0 0 99 75"
      fill="currentColor"
      stroke="currentColor"
      aria-hidden="true"
    >
      <g fill="none">
        <path strokeWidth="3.6" d="M43.4 53 11.5 27.4 30.2 7.1ZM43.4 53 48.4 7 74.5 15.1Z" />
        <path strokeWidth="12" d="M9.5 64 87.5 48.5" />
      </g>
      <g stroke="none">
        <circle cx="11.5" cy="27.4" r="5.2" />
        <circle cx="30.2" cy="7.1" r="5.2" />
        <circle cx="48.4" cy="7" r="5.2" />
        <circle cx="74.5" cy="15.1" r="5.2" />
        <circle cx="9.5" cy="64" r="9.4" />
        <circle cx="87.5" cy="48.5" r="11.2" />
      </g>
    </svg>
  );
}
