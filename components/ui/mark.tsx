/** The mark: two rings alike, the third open. */
export function Mark({ size = 25 }: { size?: number }) {
  return (
    <svg className="mark" width={size} height={size} viewBox="0 0 32 32" fill="none" stroke="currentColor" strokeWidth={2.5} aria-hidden>
      <path d="M21.89 8.29A5.9 5.9 0 1 1 16.31 2.71" />
      <circle cx="7.95" cy="22.55" r="5.9" />
      <circle cx="24.05" cy="22.55" r="5.9" />
    </svg>
  );
}

/** Mark and word, locked up. */
export function Word({ size = 25 }: { size?: number }) {
  return (
    <span className="word">
      <Mark size={size} />
      <span>Tercet</span>
    </span>
  );
}
