import type { Locale } from '../i18n/locales';

/** A word of the lexicon with what else it is called. */
export interface Term {
  item: number;
  name: string;
  synonyms?: readonly string[];
}

export interface FoundTerm {
  item: number;
  /** The words of the text that named it, as they were written. */
  said: string;
  /** "no vanilla", "sin vainilla": named as absent. */
  isNegated: boolean;
}

/** Words that turn what follows into its absence, up to the next clause. */
const NEGATIONS: Record<Locale, readonly string[]> = {
  en: ['no', 'not', 'without', 'never', 'lacks', 'lacking', 'nor', 'neither', 'hardly', 'isnt', 'doesnt', 'absent', 'zero'],
  es: ['no', 'sin', 'ni', 'nada', 'tampoco', 'falta', 'ausente'],
  fr: ['pas', 'sans', 'ni', 'aucun', 'aucune', 'jamais', 'guere', 'point', 'manque'],
};

/** Words that end the reach of a negation: "no vanilla but pear". */
const TURNS: Record<Locale, readonly string[]> = { en: ['but', 'yet', 'though', 'however', 'with', 'then', 'only', 'just'], es: ['pero', 'aunque', 'sino', 'con', 'luego'], fr: ['mais', 'avec', 'puis', 'quoique'] };

/** How many words after a negation it still reaches. */
const REACH = 4;

/** Endings that a word may have or lack, longest first. Light on purpose: what is found is confirmed by the panelist. */
const ENDINGS: Record<Locale, readonly string[]> = {
  en: ['iness', 'ness', 'like', 'ish', 'ies', 'ing', 'es', 'ed', 'y', 's', 'e'],
  es: ['idad', 'osas', 'osos', 'ados', 'adas', 'ado', 'ada', 'oso', 'osa', 'es', 'os', 'as', 's', 'o', 'a', 'e'],
  fr: ['ements', 'ement', 'euses', 'euse', 'eux', 'ees', 'es', 'ee', 's', 'x', 'e'],
};

/** Shortest stem that may be left. */
const SHORTEST = 3;

const bare = (word: string): string => word.normalize('NFD').replace(/\p{M}/gu, '').replace(/['’]/g, '').toLowerCase();

/** A word without accents, capitals and common endings. */
export function stemOf(word: string, locale: Locale): string {
  const plain = bare(word);
  const ending = ENDINGS[locale].find((end) => plain.endsWith(end) && plain.length - end.length >= SHORTEST);
  const stem = ending ? plain.slice(0, -ending.length) : plain;
  // "berries" and "berry", "toffee" and "toffees".
  return stem.replace(/(.)\1$/, '$1');
}

interface Token {
  word: string;
  stem: string;
  start: number;
  end: number;
  /** Counts up at each full stop, comma or "but". */
  clause: number;
}

/** Elided articles of French stay apart from their noun: "d’amande". */
const WORD = /[\p{L}\p{N}]+(?:['’](?=t\b)[\p{L}]+)?/gu;

function tokensOf(text: string, locale: Locale): Token[] {
  const tokens: Token[] = [];
  let clause = 0;
  let last = 0;
  for (const match of text.matchAll(WORD)) {
    const between = text.slice(last, match.index);
    const plain = bare(match[0]);
    if (/[.;:!?\n]/.test(between) || TURNS[locale].includes(plain)) clause += 1;
    // A comma goes on with what was denied only when "or" or "nor" follows; otherwise it turns.
    else if (/,/.test(between) && !['or', 'nor', 'ni', 'o', 'ou'].includes(plain)) clause += 1;
    last = match.index + match[0].length;
    tokens.push({ word: match[0], stem: stemOf(match[0], locale), start: match.index, end: last, clause });
  }
  return tokens;
}

/**
 * Finds the words of the lexicon in a free text: names and synonyms, of one word or several, with other
 * endings, without accents. The longest name wins where several fit ("black pepper" before "pepper"). Each word
 * once; said as absent only if it is nowhere said as present.
 */
export function findTerms(text: string, terms: readonly Term[], locale: Locale): FoundTerm[] {
  const tokens = tokensOf(text, locale);
  const names = terms
    .flatMap((term) => [term.name, ...(term.synonyms ?? [])].map((name, i) => ({ item: term.item, isSynonym: i > 0, stems: [...name.matchAll(WORD)].map(([word]) => stemOf(word, locale)) })))
    .filter(({ stems }) => stems.length > 0)
    // An entry's own name comes before another entry's synonym.
    .sort((a, b) => b.stems.length - a.stems.length || Number(a.isSynonym) - Number(b.isSynonym));
  const byStem = new Map<string, typeof names>();
  for (const name of names) byStem.set(name.stems[0]!, [...(byStem.get(name.stems[0]!) ?? []), name]);
  const found = new Map<number, FoundTerm>();
  for (let i = 0; i < tokens.length; i += 1) {
    const name = byStem.get(tokens[i]!.stem)?.find(({ stems }) => stems.every((stem, k) => tokens[i + k]?.stem === stem));
    if (!name) continue;
    const end = tokens[i + name.stems.length - 1]!;
    const isNegated = tokens.slice(Math.max(0, i - REACH), i).some((token) => token.clause === tokens[i]!.clause && NEGATIONS[locale].includes(bare(token.word)));
    const before = found.get(name.item);
    if (!before || (before.isNegated && !isNegated)) found.set(name.item, { item: name.item, said: text.slice(tokens[i]!.start, end.end), isNegated });
    i += name.stems.length - 1;
  }
  return [...found.values()];
}
