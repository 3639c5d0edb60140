import compile from 'icu-minify/compile';
import type { Locale } from './locales';
import en from './messages/en.json';
import es from './messages/es.json';
import fr from './messages/fr.json';
import type { Area, Wordlist } from './words';

/** As plain JSON: what the compiler makes has objects that React can't hand to a browser. */
const compiled = (text: string): Wordlist['messages'][string] => JSON.parse(JSON.stringify(compile(text))) as Wordlist['messages'][string];

const MESSAGES: Record<Locale, typeof en> = { en, es, fr };

const kept = new Map<string, Wordlist>();

/** The compiled words of some areas in a language. `errors` always come along, as texts to look up. */
export function wordlist(locale: Locale, areas: readonly Area[]): Wordlist {
  const name = `${locale}/${areas.join()}`;
  const known = kept.get(name);
  if (known) return known;
  const messages = Object.fromEntries(
    areas.flatMap((area) => Object.entries(MESSAGES[locale][area]).map(([key, text]) => [`${area}.${key}`, compiled(text)] as const)),
  );
  const said = locale === 'en' ? {} : Object.fromEntries(Object.entries(en.errors).map(([key, text]) => [text, MESSAGES[locale].errors[key as keyof typeof en.errors]]));
  const list = { locale, messages, said };
  kept.set(name, list);
  return list;
}
