/** The two lights of the screen: paper by day, a true-dark and dim one for the cellar. */
export type Mode = 'paper' | 'cellar';

export const MODE_COOKIE = 'tercet-mode';

/** The mode that a cookie's value names; paper for anything else. */
export const readMode = (value: string | undefined): Mode => (value === 'cellar' ? 'cellar' : 'paper');
