import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

// WCAG 2.2, 1.4.3 and 1.4.11: 4.5:1 for text, 3:1 for controls and data. Luminance as the standard defines it.
const css = readFileSync('app/tokens.css', 'utf8');
const coloursIn = (text: string) => Object.fromEntries([...text.matchAll(/--([\w-]+):\s*(#[0-9a-f]{6})/g)].map((match) => [match[1]!, match[2]!]));
const split = css.indexOf("[data-mode='cellar'] {");
const paper = coloursIn(css.slice(0, split));
const cellar = { ...paper, ...coloursIn(css.slice(split)) };

const channel = (value: number) => (value / 255 <= 0.04045 ? value / 255 / 12.92 : ((value / 255 + 0.055) / 1.055) ** 2.4);
const channelsOf = (hex: string) => [1, 3, 5].map((at) => channel(parseInt(hex.slice(at, at + 2), 16)));
const luminance = (hex: string) => channelsOf(hex).reduce((sum, value, i) => sum + value * [0.2126, 0.7152, 0.0722][i]!, 0);
function ratio(a: string, b: string): number {
  const [high, low] = [luminance(a), luminance(b)].sort((x, y) => y - x) as [number, number];
  return (high + 0.05) / (low + 0.05);
}

const TEXT: [string, string][] = [
  ...['ground', 'stone', 'stone-2'].flatMap((ground): [string, string][] => [['ink', ground], ['ink-2', ground]]),
  ['ink-3', 'ground'], ['ink-3', 'stone'], ['code', 'ground'], ['mal', 'ground'], ['mal', 'stone'], ['mal', 'mal-wash'], ['ink', 'mal-wash'],
  ['warn', 'ground'], ['warn', 'warn-wash'], ['warn', 'stone'], ['ink', 'warn-wash'], ['on-press', 'press'],
];
const CONTROLS: [string, string][] = [['ctl', 'ground'], ['ctl', 'stone'], ['firm', 'ground'], ['firm', 'stone'], ...[1, 2, 3, 4, 5, 6].map((k): [string, string] => [`d${k}`, 'ground'])];

describe.each([['paper', paper], ['cellar', cellar]] as const)('%s', (_, tokens: Record<string, string>) => {
  it.each(TEXT)('text %s on %s is at least 4.5:1', (front, back) => {
    expect(ratio(tokens[front]!, tokens[back]!)).toBeGreaterThanOrEqual(4.5);
  });
  it.each(CONTROLS)('control or data %s on %s is at least 3:1', (front, back) => {
    expect(ratio(tokens[front]!, tokens[back]!)).toBeGreaterThanOrEqual(3);
  });
});

it('the formula gives 21:1 for black on white (WCAG 2.2)', () => {
  expect(ratio('#000000', '#ffffff')).toBeCloseTo(21, 10);
});
