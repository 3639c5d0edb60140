import 'server-only';
import { cookies, headers } from 'next/headers';
import { LANGUAGE_COOKIE, pickLocale, type Locale } from './locales';
import { wordlist } from './wordlists';
import { wordsOf, type Area, type Wordlist, type Words } from './words';

/** The language of this request: the one chosen on the device, else the browser's. */
export async function requestLocale(): Promise<Locale> {
  return pickLocale((await cookies()).get(LANGUAGE_COOKIE)?.value, (await headers()).get('accept-language'));
}

/** The words of a phone page for the server's own use and, as a list, for the browser's. */
export async function phoneWords(...areas: Area[]): Promise<{ t: Words; list: Wordlist }> {
  const list = wordlist(await requestLocale(), ['common', ...areas]);
  return { t: wordsOf(list), list };
}
