/** A three-digit code as a stamped label. Screen readers hear single digits. */
export function Code({ code, size }: { code: string; size: 's' | 'm' | 'l' | 'xl' }) {
  return (
    <span className={`code code-${size}`} role="img" aria-label={`code ${[...code].join(' ')}`}>
      {[...code].map((digit, place) => (
        <i key={place} aria-hidden>{digit}</i>
      ))}
    </span>
  );
}
