/** A hash in groups of four, or its ends only. */
export function Hash({ hex, short = false }: { hex: string; short?: boolean }) {
  const groups = hex.match(/.{1,4}/g) ?? [];
  const shown = short ? [...groups.slice(0, 2), '…', ...groups.slice(-2)] : groups;
  return <span title={hex}>{shown.join(' ')}</span>;
}
