import type { Locale } from '../i18n/locales';
import english from './lexicon.json';
import es from './lexicon.es.json';
import fr from './lexicon.fr.json';

interface Translation {
  entries: Readonly<Record<string, { name: string; definition: string }>>;
  anchors: Readonly<Record<string, string>>;
}

const TRANSLATIONS: Partial<Record<Locale, Translation>> = { es, fr };
const ENGLISH = new Map(english.map((entry) => [entry.id, entry]));

/** What a panelist reads of a line of the ballot. */
export interface LineWords {
  name: string;
  definition: string;
  lowAnchor: string;
  highAnchor: string;
}

/**
 * A ballot line in another language, each part on its own: the built-in lexicon's words are translated,
 * what the cellar has worded itself stays as it is.
 * @param key the built-in entry behind the line, or null for a descriptor of the cellar's own
 */
export function translateLine<T extends LineWords>(line: T, key: string | null, locale: Locale): T {
  const translation = TRANSLATIONS[locale];
  if (!translation) return line;
  const own = key === null ? undefined : ENGLISH.get(key);
  const entry = key === null ? undefined : translation.entries[key];
  return {
    ...line,
    name: own && entry && own.name === line.name ? entry.name : line.name,
    definition: own && entry && own.definition === line.definition ? entry.definition : line.definition,
    lowAnchor: translation.anchors[line.lowAnchor] ?? line.lowAnchor,
    highAnchor: translation.anchors[line.highAnchor] ?? line.highAnchor,
  };
}

/** Other words for a built-in entry, in English and only there: the translations have none. */
export const synonymsOf = (key: string | null, locale: Locale): readonly string[] => (locale === 'en' && key !== null ? (ENGLISH.get(key)?.synonyms ?? []) : []);
