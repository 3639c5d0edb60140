import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { LOCALES, pickLocale } from '@/lib/i18n/locales';
import en from '@/lib/i18n/messages/en.json';
import es from '@/lib/i18n/messages/es.json';
import fr from '@/lib/i18n/messages/fr.json';
import { wordlist } from '@/lib/i18n/wordlists';
import { wordsOf, type Area, type MessageKey } from '@/lib/i18n/words';
import lexicon from '@/lib/lexicon/lexicon.json';
import lexiconEs from '@/lib/lexicon/lexicon.es.json';
import lexiconFr from '@/lib/lexicon/lexicon.fr.json';
import { translateLine } from '@/lib/lexicon/translate';

const root = fileURLToPath(new URL('../../../', import.meta.url));
const flat = (messages: object): Map<string, string> =>
  new Map(Object.entries(messages).flatMap(([area, keys]) => Object.entries(keys as Record<string, string>).map(([key, text]) => [`${area}.${key}`, text] as const)));
const ENGLISH = flat(en);
const OTHERS = { es: flat(es), fr: flat(fr) };

/** Names of the values that a message takes. */
const valuesOf = (text: string): string[] => [...new Set([...text.matchAll(/\{(\w+)(?=[,}])/g)].map(([, name]) => name!))].sort();

function sources(folder: string): string[] {
  return readdirSync(path.join(root, folder), { withFileTypes: true }).flatMap((entry) => {
    const file = path.join(folder, entry.name);
    return entry.isDirectory() ? sources(file) : /\.tsx?$/.test(entry.name) ? [readFileSync(path.join(root, file), 'utf8')] : [];
  });
}

describe('the messages of the phone', () => {
  it.each(['es', 'fr'] as const)('are all there in %s, not empty, with the same values', (locale) => {
    expect([...OTHERS[locale].keys()].sort()).toEqual([...ENGLISH.keys()].sort());
    for (const [key, text] of OTHERS[locale]) {
      expect(text.trim(), key).not.toBe('');
      expect(valuesOf(text), key).toEqual(valuesOf(ENGLISH.get(key)!));
    }
  });

  it.each(['es', 'fr'] as const)('are translated in %s: hardly one equals the English', (locale) => {
    const same = [...OTHERS[locale]].filter(([key, text]) => text === ENGLISH.get(key)).map(([key]) => key);
    // Words that the languages share.
    expect(same.filter((key) => !['common.codeWord', 'handover.codeOf', 'allergens.sulfites'].includes(key))).toEqual([]);
  });

  it.each(LOCALES)('can all be said in %s', (locale) => {
    const t = wordsOf(wordlist(locale, Object.keys(en) as Area[]));
    for (const [key, text] of ENGLISH) {
      const values = Object.fromEntries(valuesOf(text).map((name) => [name, ['n', 'total', 'value', 'receipt'].includes(name) ? 3 : 'x']));
      const said = [t.rich<string>(key as MessageKey, values, (chunks) => chunks.join(''))].flat().join('');
      expect(said, key).not.toMatch(/[{}<>]|undefined|^\w+\.\w+$/);
    }
  });

  it('speak of one and of many', () => {
    expect(wordsOf(wordlist('es', ['sheet']))('sheet.linesLeft', { n: 1 })).toBe('queda 1 línea');
    expect(wordsOf(wordlist('fr', ['sheet']))('sheet.linesLeft', { n: 2 })).toBe('reste 2 lignes');
    expect(wordsOf(wordlist('en', ['pick']))('pick.ordinal', { n: 2 })).toBe('2nd');
    expect(wordsOf(wordlist('fr', ['pick']))('pick.ordinal', { n: 1 })).toBe('1er');
  });

  it('hold every refusal in the very words of the server, so that it is found', () => {
    const code = sources('lib').join('\n');
    for (const text of Object.values(en.errors)) expect(code, text).toContain(text);
  });

  it('are all used', () => {
    const code = [...sources('components'), ...sources('app')].join('\n');
    // Keys that are put together at the place of use.
    const made = /^(phases|allergens|errors|ask|picked|choose|category|rate|right|liking)\.|^rest\.(then|go)|^sheet\.(plainHttp|install)$|^pull\.(sanitise|evaporate|vent|draw|close|note|thief|nail|spigot)$/;
    expect([...ENGLISH.keys()].filter((key) => !made.test(key) && !code.includes(`'${key}'`) && !code.includes(`"${key}"`))).toEqual([]);
  });
});

describe('the language of a device', () => {
  it.each([
    ['fr', 'en', 'fr'],
    [undefined, 'es-MX,es;q=0.9,en;q=0.8', 'es'],
    [undefined, 'de-CH,fr;q=0.8,en;q=0.9', 'en'],
    [undefined, 'de', 'en'],
    ['xx', null, 'en'],
    [undefined, 'fr;q=0.1,  ES;q=0.5', 'es'],
  ])('is chosen %s, asked %s: %s', (chosen, asked, locale) => expect(pickLocale(chosen, asked)).toBe(locale));
});

describe('the lexicon', () => {
  it.each([['es', lexiconEs], ['fr', lexiconFr]] as const)('has every name and definition in %s', (_, translation) => {
    expect(Object.keys(translation.entries)).toEqual(lexicon.map((entry) => entry.id));
    for (const { name, definition } of Object.values(translation.entries)) {
      expect(name.trim()).not.toBe('');
      expect(definition).toMatch(/\.$/);
    }
  });

  it('has both ends of every built-in line', () => {
    const anchors = /lowAnchor, highAnchor\] = .*?\['(\w+)', '([\w ]+)'\]|\['([\w ]+)', '([\w ]+)'\]/g;
    const used = [...readFileSync(path.join(root, 'lib/lexicon/fill.ts'), 'utf8').matchAll(anchors)].flatMap((match) => match.slice(1).filter(Boolean));
    expect(used.length).toBeGreaterThanOrEqual(10);
    for (const anchor of used) expect(lexiconFr.anchors).toHaveProperty(anchor);
  });

  it('translates what is built in and leaves the cellar’s own words', () => {
    const line = { name: 'Lemon', definition: 'As our grandmother’s tree.', lowAnchor: 'none', highAnchor: 'like the tree' };
    expect(translateLine(line, 'ar-lemon', 'fr')).toEqual({ name: 'Citron', definition: 'As our grandmother’s tree.', lowAnchor: 'rien', highAnchor: 'like the tree' });
    expect(translateLine({ ...line, name: 'Lemon curd' }, 'ar-lemon', 'es').name).toBe('Lemon curd');
    expect(translateLine(line, null, 'es').name).toBe('Lemon');
  });
});
