/** A number of a JSON file as it is printed: how many decimals it has is how exactly it is known. */
export class Printed {
  readonly value: number;
  readonly decimals: number;
  constructor(readonly text: string) {
    this.value = Number(text);
    const [mantissa, exponent = '0'] = text.toLowerCase().split('e');
    this.decimals = (mantissa.split('.')[1] ?? '').length - Number(exponent);
  }
  /** One unit of the last printed decimal. */
  get unit(): number {
    return 10 ** -this.decimals;
  }
}

/** Parses JSON with every number kept as {@link Printed}. */
export function parsePrinted(text: string): unknown {
  const marked = text.replaceAll(/"(?:[^"\\]|\\.)*"|-?\d+(?:\.\d+)?(?:[eE][-+]?\d+)?/g, (token) => (token.startsWith('"') ? token : JSON.stringify({ printed: token })));
  return JSON.parse(marked, (_, value: unknown) => (value !== null && typeof value === 'object' && 'printed' in value ? new Printed(String(value.printed)) : value));
}

/** The same with every printed number as a plain number. */
export function plain(value: unknown): unknown {
  if (value instanceof Printed) return value.value;
  if (Array.isArray(value)) return value.map(plain);
  if (value === null || typeof value !== 'object') return value;
  return Object.fromEntries(Object.entries(value).map(([key, inner]) => [key, plain(inner)]));
}
