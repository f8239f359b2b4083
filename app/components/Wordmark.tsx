/** The mark: a hollow in the land with a cairn beside it. */
export function Mark({ size = 24 }: { size?: number }) {
  return (
    <svg width={size} height={size} viewBox="0 0 24 24" aria-hidden="true" className="mark">
      <path
        d="M1 8.5H5C9.2 8.5 8.6 18.5 12 18.5S14.8 8.5 19 8.5H23V23H1Z"
        fill="var(--color-land)"
        stroke="none"
      />
      <path
        d="M1 8.5H5C9.2 8.5 8.6 18.5 12 18.5S14.8 8.5 19 8.5H23"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.8"
        strokeLinecap="round"
      />
      <g fill="var(--color-heather)">
        <ellipse cx="12" cy="13.6" rx="3" ry="1.5" />
        <ellipse cx="12.3" cy="10.9" rx="2.2" ry="1.2" />
        <ellipse cx="11.9" cy="8.7" rx="1.4" ry="0.9" />
      </g>
    </svg>
  );
}

export function Wordmark() {
  return (
    <span className="wordmark">
      <Mark />
      Swale
    </span>
  );
}
