/** The part of jsdom that the tests use; it comes without types. */
declare module 'jsdom' {
  export class JSDOM {
    constructor(html: string, options?: { url?: string });
    readonly window: Window & typeof globalThis;
  }
}
