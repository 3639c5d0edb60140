/** Characters of one code: a phone's screen shows it large enough for another phone's camera. */
const CHUNK = 600;

const PATTERN = /^T1\.([a-z0-9]{6})\.(\d{1,3})\.(\d{1,3})\.([A-Za-z0-9_.-]+)$/;

/** Cuts a text into the texts of QR codes: "T1.<which>.<n>.<of how many>.<part>". */
export function toFrames(text: string, which: string): string[] {
  const total = Math.max(1, Math.ceil(text.length / CHUNK));
  return Array.from({ length: total }, (_, i) => `T1.${which}.${i + 1}.${total}.${text.slice(i * CHUNK, (i + 1) * CHUNK)}`);
}

/** The parts of handovers that a camera has seen so far. */
export interface Collected {
  readonly parts: ReadonlyMap<number, string>;
  readonly total: number;
  /** The whole text once every part is there. */
  readonly text: string | null;
}

/** Adds one scanned text to what is collected, by handover; a text that is no frame changes nothing. */
export function collect(seen: ReadonlyMap<string, Collected>, scanned: string): ReadonlyMap<string, Collected> {
  const match = PATTERN.exec(scanned.trim());
  if (!match) return seen;
  const [, which, n, of, part] = match as unknown as [string, string, string, string, string];
  const total = Number(of);
  const index = Number(n);
  if (index < 1 || index > total) return seen;
  const parts = new Map(seen.get(which)?.parts).set(index, part);
  const text = parts.size === total ? Array.from({ length: total }, (_, i) => parts.get(i + 1)!).join('') : null;
  return new Map(seen).set(which, { parts, total, text });
}
