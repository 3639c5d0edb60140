'use client';

import { useEffect, useRef, useState } from 'react';
import { useRouter } from 'next/navigation';
import { useWords } from '@/components/i18n/words';
import { LANGUAGE_COOKIE, LOCALE_NAMES, LOCALES, type Locale } from '@/lib/i18n/locales';
import { MODE_COOKIE } from '@/lib/mode';
import { CONTRAST_COOKIE, HAND_COOKIE, SOUND_KEY } from '@/lib/phone/settings';

const YEAR_S = 365 * 24 * 60 * 60;

const remember = (name: string, value: string): void => {
  document.cookie = `${name}=${value}; path=/; max-age=${YEAR_S}; samesite=lax`;
};

/** Sets a property of the whole page at once and remembers it on this device. */
function choose(what: 'mode' | 'contrast' | 'hand', cookie: string, value: string): void {
  document.documentElement.dataset[what] = value;
  remember(cookie, value);
}

function readSound(): boolean {
  try {
    return localStorage.getItem(SOUND_KEY) === 'on';
  } catch {
    return false;
  }
}

/** How this device's screen should be: light, contrast, hand, sound, language. */
export function ViewMenu() {
  const t = useWords();
  const router = useRouter();
  const menu = useRef<HTMLDetailsElement>(null);
  const [hasSound, setSound] = useState(false);
  useEffect(() => {
    // Only the browser knows; the first paint must equal the server's.
    // eslint-disable-next-line react-hooks/set-state-in-effect
    setSound(readSound());
  }, []);
  const onSound = (isOn: boolean) => {
    setSound(isOn);
    try {
      localStorage.setItem(SOUND_KEY, isOn ? 'on' : 'off');
    } catch {
      // A phone that keeps nothing stays silent.
    }
  };
  const onLanguage = (locale: Locale) => {
    remember(LANGUAGE_COOKIE, locale);
    router.refresh();
  };
  return (
    <details className="view-menu" ref={menu} onKeyDown={(event) => event.key === 'Escape' && menu.current?.removeAttribute('open')}>
      <summary>{t('common.view')}</summary>
      <div className="view-panel stack tight">
        <fieldset className="field">
          <legend className="legend">{t('common.language')}</legend>
          <div className="row wrap">
            {LOCALES.map((locale) => (
              <button key={locale} type="button" lang={locale} className="btn" aria-pressed={t.locale === locale} onClick={() => onLanguage(locale)}>{LOCALE_NAMES[locale]}</button>
            ))}
          </div>
        </fieldset>
        <fieldset className="field">
          <legend className="legend">{t('common.light')}</legend>
          <div className="row wrap">
            <button type="button" className="btn mode-p" onClick={() => choose('mode', MODE_COOKIE, 'paper')}>{t('common.paper')}</button>
            <button type="button" className="btn mode-c" onClick={() => choose('mode', MODE_COOKIE, 'cellar')}>{t('common.cellar')}</button>
          </div>
        </fieldset>
        <fieldset className="field">
          <legend className="legend">{t('common.contrast')}</legend>
          <div className="row wrap">
            <button type="button" className="btn contrast-usual" onClick={() => choose('contrast', CONTRAST_COOKIE, 'usual')}>{t('common.usual')}</button>
            <button type="button" className="btn contrast-strong" onClick={() => choose('contrast', CONTRAST_COOKIE, 'strong')}>{t('common.strong')}</button>
          </div>
        </fieldset>
        <fieldset className="field">
          <legend className="legend">{t('common.hand')}</legend>
          <div className="row wrap">
            <button type="button" className="btn hand-left" onClick={() => choose('hand', HAND_COOKIE, 'left')}>{t('common.handLeft')}</button>
            <button type="button" className="btn hand-right" onClick={() => choose('hand', HAND_COOKIE, 'right')}>{t('common.handRight')}</button>
          </div>
        </fieldset>
        <label className="tick-row"><input type="checkbox" checked={hasSound} onChange={(event) => onSound(event.target.checked)} /><span>{t('common.sound')}</span></label>
        <button type="button" className="btn wide" onClick={() => menu.current?.removeAttribute('open')}>{t('common.close')}</button>
      </div>
    </details>
  );
}
