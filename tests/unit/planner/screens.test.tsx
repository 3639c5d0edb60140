import { renderToStaticMarkup } from 'react-dom/server';
import { JSDOM } from 'jsdom';
import { describe, expect, it } from 'vitest';
import { Chooser } from '@/components/planner/chooser';
import { PanelPlanner } from '@/components/planner/panel-planner';
import { ProfilePlanner, type KnownLine } from '@/components/planner/profile-planner';
import { splitQuery } from '@/lib/planner/queries';

const show = (element: React.ReactElement): Document => new JSDOM(renderToStaticMarkup(element)).window.document;
const words = (document: Document): string => document.body.textContent.replace(/\s+/g, ' ');

describe('the questions', () => {
  it('link each method to the design and each test to its panel, with the questions kept', () => {
    const page = show(<Chooser home="/c/x" query={{ question: 'difference', samples: '2', people: '40', size: 'middling' }} kept={{ pd: '0.4' }} />);
    expect(page.querySelector('a[href="/c/x/sessions/new?method=tetrad"]')).not.toBeNull();
    const plan = [...page.querySelectorAll('a')].find((a) => a.textContent === 'Plan its panel: Tetrad')!;
    expect(plan.getAttribute('href')).toMatch(/^\?question=difference&samples=2&people=40&size=middling&protocol=tetrad&by=dprime&dprime=1.5&panel=40#/);
    expect(page.querySelector<HTMLInputElement>('input[type=hidden][name=pd]')!.value).toBe('0.4');
  });

  it('open what doesn’t fit when nothing does, and say how far the wine reaches', () => {
    const page = show(<Chooser home="/c/x" query={{ question: 'taste', samples: '4', wine: '20' }} kept={{}} />);
    expect(words(page)).toContain('As asked, nothing fits.');
    expect(words(page)).toContain('Too little wine: 20 mL of each reaches for 0 people');
    expect([...page.querySelectorAll('details')].at(-1)!.hasAttribute('open')).toBe(true);
    expect(page.querySelectorAll('a[href^="/c/x/sessions/new"]')).toHaveLength(5);
  });
});

describe('the panel of a test', () => {
  it('gives a span and no false order with several sets', () => {
    for (let panel = 1; panel <= 40; panel += 1) {
      const text = words(show(<PanelPlanner query={{ replicates: '2', panel: String(panel), pd: '0.3' }} kept={{}} panel={8} panelHint="" />));
      const [, low, high] = /chance of (?:under )?(\d+) % to (?:under )?(\d+) %/.exec(text) ?? [null, '0', '0'];
      expect(Number(low)).toBeLessThanOrEqual(Number(high));
    }
  });

  it('keeps what was typed and names the field', () => {
    const page = show(<PanelPlanner query={{ alpha: 'zero' }} kept={{}} panel={8} panelHint="" />);
    const field = page.querySelector<HTMLInputElement>('#panel-alpha')!;
    expect([field.value, field.getAttribute('aria-invalid')]).toEqual(['zero', 'true']);
    expect(page.getElementById(field.getAttribute('aria-describedby')!.split(' ').at(-1)!)!.textContent).toBe('α: a number from 0.001 to 0.5');
    expect(page.querySelector('.summary a')!.getAttribute('href')).toBe('#panel-alpha');
    expect(page.querySelector('table')).toBeNull();
  });
});

describe('the panel of a profile', () => {
  const lines: KnownLine[] = Array.from({ length: 25 }, (_, i) => ({ name: `Line ${i + 1}`, sessions: 2, repeatability: 6, disagreement: 4 }));
  const ask = (past: Parameters<typeof ProfilePlanner>[0]['past']) => show(<ProfilePlanner query={{}} kept={{}} panel={9} past={past} />);

  it('folds a long list', () => {
    const page = ask({ lines, sessions: 3, leftOut: 2 });
    expect(page.querySelector('summary')!.textContent).toBe('15 more lines');
    expect(page.querySelectorAll('details tbody tr')).toHaveLength(15);
    expect(words(page)).toContain('2 lines that have gaps');
  });

  it.each([
    ['no profile yet', { lines: [], sessions: 0, leftOut: 0 }, 'No profile has been unsealed yet'],
    ['only gaps', { lines: [], sessions: 2, leftOut: 9 }, 'have gaps in every line'],
    ['no right to see results', null, 'not for your roles to see'],
  ])('with %s gives a range and says why', (_, past, said) => {
    const text = words(ask(past));
    expect(text).toContain(said);
    expect(text).toContain('A range to choose from');
  });
});

describe('the address of three forms', () => {
  it('is parted by field, and strange names are dropped', () => {
    expect(splitQuery({ question: 'order', pd: '0.3', rule: 'lsd', x: '1' }, 'panel')).toEqual({ own: { pd: '0.3' }, others: { question: 'order', rule: 'lsd' } });
  });
});
