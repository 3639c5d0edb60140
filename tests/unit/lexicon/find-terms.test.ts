import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findTerms, stemOf, type Term } from '@/lib/lexicon/find-terms';
import lexicon from '@/lib/lexicon/lexicon.json';
import es from '@/lib/lexicon/lexicon.es.json';
import fr from '@/lib/lexicon/lexicon.fr.json';

const ENGLISH: Term[] = lexicon.map((entry, i) => ({ item: i + 1, name: entry.name, synonyms: entry.synonyms }));
const nameOf = (item: number) => ENGLISH[item - 1]!.name;
const named = (text: string) => findTerms(text, ENGLISH, 'en').filter((term) => !term.isNegated).map((term) => nameOf(term.item)).sort();
const denied = (text: string) => findTerms(text, ENGLISH, 'en').filter((term) => term.isNegated).map((term) => nameOf(term.item)).sort();

const FEW: Term[] = ['Pear', 'Vanilla', 'Black pepper', 'Pepper', 'Smoke', 'Cherry', 'Toffee'].map((name, i) => ({ item: i + 1, name, ...(name === 'Vanilla' && { synonyms: ['vanilla pod'] }) }));
const few = (text: string) => findTerms(text, FEW, 'en').map(({ item, isNegated }) => `${isNegated ? 'no ' : ''}${FEW[item - 1]!.name}`);

describe('words of the lexicon in a free note', () => {
  it.each([
    ['Pear, but no vanilla', ['Pear', 'no Vanilla']],
    ['no vanilla but pear', ['no Vanilla', 'Pear']],
    ['pears and cherries', ['Pear', 'Cherry']],
    ['black pepper', ['Black pepper']],
    ['a peppery end', ['Pepper']],
    ['smoky, not pear', ['Smoke', 'no Pear']],
    ['without any vanilla pods; smoke', ['no Vanilla', 'Smoke']],
    ['no vanilla or pear', ['no Vanilla', 'no Pear']],
    ['vanilla? No. Pear!', ['Vanilla', 'Pear']],
    ['no pear at first, then pear', ['Pear']],
    ['toffees', ['Toffee']],
    ['appear, spear, pearl', []],
    ['', []],
    ['👃🍐', []],
  ])('“%s”', (text, expected) => expect(few(text)).toEqual(expected));

  it('each entry of the built-in lexicon is found by its own name, and by each of its synonyms', () => {
    for (const entry of lexicon) {
      expect(named(`A bit of ${entry.name.toLowerCase()}.`), entry.name).toContain(entry.name);
      // A synonym that two entries share goes to one of them.
      for (const word of entry.synonyms) expect(named(`Some ${word} here`).length, `${entry.name}: ${word}`).toBeGreaterThan(0);
    }
  });

  it('each entry denied is not offered', () => {
    for (const entry of lexicon) expect(denied(`No ${entry.name.toLowerCase()}.`), entry.name).toContain(entry.name);
  });

  it('Spanish and French names are found in a sentence, and denied', () => {
    for (const [locale, list, no] of [['es', es, 'sin'], ['fr', fr, 'sans']] as const) {
      const terms = Object.values(list.entries).map((entry, i) => ({ item: i + 1, name: entry.name }));
      for (const { item, name } of terms) {
        const found = (text: string) => findTerms(text, terms, locale).find((term) => terms[term.item - 1]!.name === name || term.item === item);
        expect(found(`x ${name.toUpperCase()} y`)?.isNegated, `${locale} ${name}`).toBe(false);
        expect(found(`${no} ${name.toLowerCase()}`)?.isNegated, `${locale} ${no} ${name}`).toBe(true);
      }
    }
    expect(findTerms('des notes d’amande', [{ item: 1, name: 'Amande' }], 'fr')).toHaveLength(1);
  });

  it('never fails on any text, and quotes the text that it found', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme', maxLength: 300 }), (text) => {
        for (const term of findTerms(text, ENGLISH, 'en')) expect(text).toContain(term.said);
      }),
      { numRuns: 300, seed: 5 },
    );
    expect(stemOf('', 'en')).toBe('');
  });

  it('is quick enough to run at each key: 1,000 characters against the whole lexicon', () => {
    const text = `${'lemon and dark plum, no vanilla; '.repeat(30)}`;
    const began = performance.now();
    for (let i = 0; i < 20; i += 1) findTerms(text, ENGLISH, 'en');
    expect((performance.now() - began) / 20).toBeLessThan(40);
  });
});
