import { JSDOM } from 'jsdom';

export interface Page {
  status: number;
  /** Where the redirects ended. */
  url: string;
  headers: Headers;
  html: string;
  /** Parsed at the first use. Scripts don't run. */
  document: Document;
  /** The words of the page, white space folded. */
  text: string;
}

type Fields = Record<string, string | number | boolean | readonly string[]>;

const MAX_REDIRECTS = 10;

/**
 * A small browser without scripts: keeps cookies, sends `Origin` as browsers do, follows
 * redirects, submits the forms it finds. One a person.
 */
export class Client {
  readonly cookies = new Map<string, string>();

  constructor(readonly base: string, private readonly extraHeaders: Record<string, string> = {}) {}

  /** One request, cookies kept, redirects not followed. */
  async request(path: string, init: RequestInit = {}): Promise<Response> {
    const url = new URL(path, this.base);
    const headers = new Headers({ ...this.extraHeaders, ...(init.headers as Record<string, string>) });
    if (this.cookies.size > 0) headers.set('cookie', [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; '));
    const answer = await fetch(url, { ...init, headers, redirect: 'manual' });
    for (const line of answer.headers.getSetCookie()) this.keep(line);
    return answer;
  }

  private keep(line: string): void {
    const [pair = '', ...attributes] = line.split(';');
    const at = pair.indexOf('=');
    const name = pair.slice(0, at).trim();
    const value = pair.slice(at + 1).trim();
    const isEnded = attributes.some((a) => /^\s*max-age=(0|-\d+)\s*$/i.test(a)) || value === '';
    if (isEnded) this.cookies.delete(name);
    else this.cookies.set(name, value);
  }

  /** A page, redirects followed. */
  async get(path: string, headers: Record<string, string> = {}): Promise<Page> {
    return this.follow(await this.request(path, { headers: { accept: 'text/html', ...headers } }), new URL(path, this.base).href);
  }

  private async follow(first: Response, from: string): Promise<Page> {
    let answer = first;
    let url = from;
    for (let hop = 0; answer.status >= 300 && answer.status < 400 && answer.headers.has('location'); hop += 1) {
      if (hop === MAX_REDIRECTS) throw new Error(`too many redirects, last to ${url}`);
      await answer.arrayBuffer();
      url = new URL(answer.headers.get('location')!, url).href;
      if (!url.startsWith(this.base)) throw new Error(`redirected away from the server, to ${url}`);
      answer = await this.request(url, { headers: { accept: 'text/html' } });
    }
    return makePage(answer, url, await answer.text());
  }

  /**
   * Fills in and sends a form of the page, as a browser without JavaScript does: hidden fields and
   * present values included.
   * @param which a CSS selector of the form, or the text on its button
   * @param fields by name; `true` ticks a box, `false` leaves it out, a list ticks or sends several
   */
  async submitForm(page: Page, which: string, fields: Fields = {}): Promise<Page> {
    const { form, button } = findForm(page.document, which);
    const data = valuesOf(form, fields);
    if (button?.name) data.append(button.name, button.value);
    const action = new URL(button?.getAttribute('formaction') ?? form.getAttribute('action') ?? '', page.url);
    const method = (form.getAttribute('method') ?? 'get').toLowerCase();
    if (method === 'get') {
      action.search = new URLSearchParams([...data].map(([name, value]) => [name, String(value)])).toString();
      return this.get(action.href);
    }
    const answer = await this.request(action.href, { method: 'POST', body: data, headers: { accept: 'text/html', origin: this.base } });
    return this.follow(answer, action.href);
  }

  /** Posts JSON as the application's own scripts do. */
  async json(path: string, body: unknown, headers: Record<string, string> = {}): Promise<{ status: number; headers: Headers; body: unknown }> {
    const answer = await this.request(path, {
      method: 'POST',
      body: JSON.stringify(body),
      headers: { 'content-type': 'application/json', origin: this.base, 'sec-fetch-site': 'same-origin', ...headers },
    });
    return readJson(answer);
  }

  /** Gets JSON. */
  async getJson(path: string, headers: Record<string, string> = {}): Promise<{ status: number; headers: Headers; body: unknown }> {
    return readJson(await this.request(path, { headers: { accept: 'application/json', ...headers } }));
  }

  /** Signs in by the form. @throws when the sign-in form is shown again */
  async signIn(email: string, password: string): Promise<Page> {
    const page = await this.submitForm(await this.get('/sign-in'), 'Sign in', { email, password });
    if (new URL(page.url).pathname === '/sign-in') throw new Error(`sign-in refused: ${page.text.slice(0, 400)}`);
    return page;
  }
}

async function readJson(answer: Response): Promise<{ status: number; headers: Headers; body: unknown }> {
  const text = await answer.text();
  let body: unknown = text;
  try {
    body = JSON.parse(text);
  } catch {
    // Kept as text: the test sees what came.
  }
  return { status: answer.status, headers: answer.headers, body };
}

function makePage(answer: Response, url: string, html: string): Page {
  let parsed: Document | undefined;
  const document = () => (parsed ??= new JSDOM(html, { url }).window.document);
  return {
    status: answer.status, url, headers: answer.headers, html,
    get document() {
      return document();
    },
    get text() {
      const body = document().body.cloneNode(true) as HTMLElement;
      for (const hidden of body.querySelectorAll('script, style, template')) hidden.remove();
      return body.textContent.replace(/\s+/g, ' ').trim();
    },
  };
}

const label = (element: Element) => (element.getAttribute('aria-label') ?? element.textContent).replace(/\s+/g, ' ').trim();

function findForm(document: Document, which: string): { form: HTMLFormElement; button: HTMLButtonElement | null } {
  const buttons = [...document.querySelectorAll<HTMLButtonElement>('button:not([type=button]):not([type=reset])')];
  const button = buttons.find((b) => label(b) === which && b.form) ?? null;
  if (button?.form) return { form: button.form, button };
  let form: Element | null = null;
  try {
    form = document.querySelector(which);
  } catch {
    // Words, not a selector.
  }
  if (form?.tagName !== 'FORM') {
    throw new Error(`no form or button "${which}"; buttons: ${buttons.map(label).join(' | ') || 'none'}; page: ${document.body.textContent.replace(/\s+/g, ' ').slice(0, 300)}`);
  }
  const own = form.querySelector<HTMLButtonElement>('button:not([type=button]):not([type=reset])');
  return { form: form as HTMLFormElement, button: own };
}

/** What the form would send, with `fields` put in. @throws when the form lacks a named field */
function valuesOf(form: HTMLFormElement, fields: Fields): FormData {
  const data = new FormData();
  const given = new Map(Object.entries(fields));
  const seen = new Set<string>();
  for (const element of form.elements) {
    const input = element as HTMLInputElement;
    const { name, type } = input;
    if (!name || element.tagName === 'BUTTON' || element.tagName === 'FIELDSET' || input.disabled) continue;
    const wanted = given.get(name);
    if (type === 'checkbox' || type === 'radio') {
      seen.add(name);
      const isOn = wanted === undefined ? input.checked : typeof wanted === 'boolean' ? wanted : [wanted].flat().map(String).includes(input.value);
      if (isOn) data.append(name, input.value);
    } else if (!seen.has(name) && wanted !== undefined) {
      seen.add(name);
      for (const value of [wanted].flat()) data.append(name, String(value));
    } else if (wanted === undefined) {
      data.append(name, input.value);
    }
  }
  const missing = [...given.keys()].filter((name) => !seen.has(name));
  if (missing.length > 0) throw new Error(`the form has no field ${missing.join(', ')}; it has ${[...form.elements].map((e) => (e as HTMLInputElement).name).filter(Boolean).join(', ')}`);
  return data;
}
