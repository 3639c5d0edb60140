import format, { type FormatValues } from 'icu-minify/format';
import type en from './messages/en.json';
import type { Locale } from './locales';

/** A message after compilation: what the formatter takes. */
type CompiledMessage = Parameters<typeof format>[0];

type Messages = typeof en;

/** A part of the messages: one screen's words. */
export type Area = keyof Messages;

/** "area.key" of every message there is. */
export type MessageKey = { [A in Area]: `${A}.${Extract<keyof Messages[A], string>}` }[Area];

/** Messages of one language in compiled form, by "area.key"; what a page hands to the browser. */
export interface Wordlist {
  readonly locale: Locale;
  readonly messages: Readonly<Record<string, CompiledMessage>>;
  /** English texts of the server (refusals, checks of forms) in this language. */
  readonly said: Readonly<Record<string, string>>;
}

type Values = Record<string, string | number>;

/** Says messages of a word list. */
export interface Words {
  (key: MessageKey, values?: Values): string;
  /** With `<b>` in it: `wrap` makes an element of what stands between. */
  rich<T>(key: MessageKey, values: Values, wrap: (chunks: (string | T)[]) => T): string | T | (string | T)[];
  /** A text that came from the server in English, in this language if it is known. */
  said(text: string): string;
  readonly locale: Locale;
}

const formatters = {
  getDateTimeFormat: (...args: ConstructorParameters<typeof Intl.DateTimeFormat>) => new Intl.DateTimeFormat(...args),
  getNumberFormat: (...args: ConstructorParameters<typeof Intl.NumberFormat>) => new Intl.NumberFormat(...args),
  getPluralRules: (...args: ConstructorParameters<typeof Intl.PluralRules>) => new Intl.PluralRules(...args),
};

/** The words of a list. A key that the list does not hold is shown as it is: a page forgot an area. */
export function wordsOf({ locale, messages, said }: Wordlist): Words {
  const make = <T>(key: MessageKey, values: FormatValues<T>) => {
    const message = messages[key];
    return message === undefined ? key : format<T>(message, locale, values, { formatters });
  };
  const words = (key: MessageKey, values: Values = {}) => {
    const text = make<string>(key, values);
    return Array.isArray(text) ? text.join('') : text;
  };
  return Object.assign(words, {
    rich: <T>(key: MessageKey, values: Values, wrap: (chunks: (string | T)[]) => T) => make<T>(key, { ...values, b: wrap }),
    said: (text: string) => said[text] ?? text,
    locale,
  });
}
