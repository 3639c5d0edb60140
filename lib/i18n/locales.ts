/** Languages of what a panelist or a cellar hand sees. The desk is English. */
export const LOCALES = ['en', 'es', 'fr'] as const;

export type Locale = (typeof LOCALES)[number];

export const LANGUAGE_COOKIE = 'tercet-language';

/** Each language in its own words. */
export const LOCALE_NAMES: Record<Locale, string> = { en: 'English', es: 'Español', fr: 'Français' };

const isLocale = (value: string | undefined): value is Locale => LOCALES.some((locale) => locale === value);

/** The chosen language, else the first of the browser's list that there is, else English. */
export function pickLocale(chosen: string | undefined, acceptLanguage: string | null): Locale {
  if (isLocale(chosen)) return chosen;
  const wanted = (acceptLanguage ?? '')
    .split(',')
    .map((part) => {
      const [tag, ...parameters] = part.trim().split(';');
      const quality = parameters.map((parameter) => /^\s*q=([\d.]+)$/.exec(parameter)?.[1]).find(Boolean);
      return { language: tag!.split('-')[0]!.toLowerCase(), quality: quality === undefined ? 1 : Number(quality) };
    })
    .sort((a, b) => b.quality - a.quality);
  return wanted.map(({ language }) => language).find(isLocale) ?? 'en';
}
