/** Whether names were asked for: only by this very word, so that a mistyped address leaves them out. */
export const isWithNames = (url: string): boolean => new URL(url).searchParams.get('names') === 'yes';
