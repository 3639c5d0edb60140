import type { Config } from 'tailwindcss';

const COLOURS = [
  'ground', 'stone', 'stone-2', 'rule', 'firm', 'ctl', 'ink', 'ink-2', 'ink-3', 'code', 'press', 'on-press',
  'mal', 'mal-wash', 'warn', 'warn-wash', 'd1', 'd2', 'd3', 'd4', 'd5', 'd6',
] as const;
const STEPS = ['1', '2', '3', '4', '5', '6', '7', '8'] as const;
const SIZES = ['13', '14', '16', '18', '20', '24', '28', '36', '44'] as const;

const fromTokens = (names: readonly string[], prefix = '') => Object.fromEntries(names.map((name) => [name, `var(--${prefix}${name})`]));

/** Every value comes from app/tokens.css: components can't reach for a colour or size of their own. */
const config: Config = {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    colors: { ...fromTokens(COLOURS), transparent: 'transparent', current: 'currentColor' },
    spacing: { 0: '0', px: '1px', ...fromTokens(STEPS, 's-'), touch: 'var(--touch)', 'touch-desk': 'var(--touch-desk)' },
    fontFamily: { slab: 'var(--f-slab)', sans: 'var(--f-sans)' },
    fontSize: fromTokens(SIZES, 't-'),
    fontWeight: { text: 'var(--w-text)', mid: 'var(--w-mid)', strong: 'var(--w-strong)', slab: 'var(--w-slab)', code: 'var(--w-code)' },
    borderRadius: { none: 'var(--r-0)', DEFAULT: 'var(--r-1)', full: 'var(--r-ring)' },
    screens: { sm: '600px', md: '820px', lg: '1080px' },
  },
};

export default config;
