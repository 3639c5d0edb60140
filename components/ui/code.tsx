/** A three-digit code as a stamped label. Screen readers hear single digits; `label` says them in another language. */
export function Code({ code, size, label = 'code' }: { code: string; size: 's' | 'm' | 'l' | 'xl'; label?: string }) {
  return (
    <span className={`code code-${size}`} role="img" aria-label={`${label} ${[...code].join(' ')}`}>
      {[...code].map((digit, place) => (
        <i key={place} aria-hidden>{digit}</i>
      ))}
    </span>
  );
}
