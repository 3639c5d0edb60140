const LENGTH_MAX = 40;

/** A name as it stands in addresses: lower-case latin letters, digits and hyphens; `cellar` when nothing is left. */
export function slugOf(name: string): string {
  const plain = name
    .normalize('NFKD')
    .replace(/\p{Diacritic}/gu, '')
    .toLowerCase()
    .replace(/['’]/g, '')
    .replace(/[^a-z0-9]+/g, '-')
    .slice(0, LENGTH_MAX)
    .replace(/^-+|-+$/g, '');
  return plain || 'cellar';
}
