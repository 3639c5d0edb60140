/** What a device remembers of how its screen should be. */
export const CONTRAST_COOKIE = 'tercet-contrast';
export const HAND_COOKIE = 'tercet-hand';
/** In local storage: only the browser makes the sound. */
export const SOUND_KEY = 'tercet-sound';

/** Set by `proxy.ts` on pages in the device's language; only the page's `lang` hangs on it. */
export const PHONE_HEADER = 'x-tercet-phone';

export type Contrast = 'usual' | 'strong';
export type Hand = 'right' | 'left';

export const readContrast = (value: string | undefined): Contrast => (value === 'strong' ? 'strong' : 'usual');
export const readHand = (value: string | undefined): Hand => (value === 'left' ? 'left' : 'right');
