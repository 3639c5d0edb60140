const ENTITIES: Record<string, string> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'", '#x27': "'", '#39': "'" };

const fromEntities = (text: string) =>
  text.replaceAll(/&(#x?[0-9a-f]+|[a-z]+);/gi, (whole, name: string) => {
    if (ENTITIES[name.toLowerCase()]) return ENTITIES[name.toLowerCase()]!;
    const code = name.startsWith('#x') ? parseInt(name.slice(2), 16) : name.startsWith('#') ? Number(name.slice(1)) : NaN;
    return Number.isFinite(code) ? String.fromCodePoint(code) : whole;
  });

const fromJsonEscapes = (text: string) => text.replaceAll(/\\u([0-9a-f]{4})/gi, (_, hex: string) => String.fromCharCode(parseInt(hex, 16))).replaceAll(/\\(["\\/])/g, '$1');

const fromUrl = (text: string) => text.replaceAll(/(?:%[0-9a-f]{2})+/gi, (part) => Buffer.from(part.replaceAll('%', ''), 'hex').toString('utf8'));

/** What long runs of base64 (either alphabet) hold. */
const fromBase64 = (text: string) =>
  [...text.matchAll(/[A-Za-z0-9+/_-]{16,}={0,2}/g)].map((match) => Buffer.from(match[0].replaceAll('-', '+').replaceAll('_', '/'), 'base64').toString('latin1')).join('\n');

/** The bytes of an answer in every reading in which something could hide. */
export function readings(bytes: Uint8Array): string[] {
  const text = Buffer.from(bytes).toString('utf8');
  const unescaped = fromJsonEscapes(text);
  return [text, unescaped, fromJsonEscapes(unescaped), fromEntities(text), fromUrl(text), fromBase64(text), Buffer.from(bytes).toString('utf16le')];
}

/** Which of the strings stand in the bytes, in any reading. */
export const findIn = (bytes: Uint8Array, strings: readonly string[]): string[] => {
  const all = readings(bytes).join('\n').toLowerCase();
  return strings.filter((string) => all.includes(string.toLowerCase()));
};
