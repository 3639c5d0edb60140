export type Shape = 'circle' | 'square' | 'triangle' | 'diamond' | 'cross' | 'bar';

/** How one sample is drawn everywhere on a page: never by colour alone. */
export interface SampleStyle {
  /** Name of a token: `--d1` … `--d6`. */
  colour: `--d${1 | 2 | 3 | 4 | 5 | 6}`;
  shape: Shape;
  /** Dash pattern of its line. */
  dash: number[];
  /** The second round of the six styles is drawn hollow. */
  isHollow: boolean;
}

const STYLES: readonly Omit<SampleStyle, 'isHollow'>[] = [
  { colour: '--d1', shape: 'circle', dash: [] },
  { colour: '--d2', shape: 'square', dash: [6, 3] },
  { colour: '--d3', shape: 'triangle', dash: [1.5, 3] },
  { colour: '--d4', shape: 'diamond', dash: [10, 3, 2, 3] },
  { colour: '--d5', shape: 'cross', dash: [3, 3] },
  { colour: '--d6', shape: 'bar', dash: [12, 4] },
];

const CONTROL = STYLES.length - 1;

/** A style for each sample, in the order given. A control keeps the bar; the others share the rest. */
export function stylesOf(samples: readonly { sample: number; isControl: boolean }[]): Map<number, SampleStyle> {
  const hasControl = samples.some((sample) => sample.isControl);
  const round = hasControl ? CONTROL : STYLES.length;
  let next = 0;
  return new Map(
    samples.map(({ sample, isControl }) => {
      const place = isControl ? CONTROL : next;
      if (!isControl) next += 1;
      return [sample, { ...STYLES[isControl ? CONTROL : place % round]!, isHollow: !isControl && place >= round }];
    }),
  );
}
