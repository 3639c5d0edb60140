import type { SampleStyle, Shape } from './styles';

/** Half-heights that make the shapes look equally large. */
const PATHS: Record<Exclude<Shape, 'circle' | 'square' | 'bar'>, (x: number, y: number, r: number) => string> = {
  triangle: (x, y, r) => `M${x} ${y - r * 1.15}l${r * 1.1} ${r * 1.95}h${-2.2 * r}z`,
  diamond: (x, y, r) => `M${x} ${y - r * 1.25}l${r * 1.25} ${r * 1.25}l${-r * 1.25} ${r * 1.25}l${-r * 1.25} ${-r * 1.25}z`,
  cross: (x, y, r) => `M${x - r} ${y - r}l${2 * r} ${2 * r}M${x - r} ${y + r}l${2 * r} ${-2 * r}`,
};

/** A sample's shape at a point of a drawing. */
export function MarkerAt({ style, x, y, r = 4 }: { style: SampleStyle; x: number; y: number; r?: number }) {
  const colour = `var(${style.colour})`;
  const paint = style.shape === 'cross' || style.isHollow ? { fill: 'var(--ground)', stroke: colour, strokeWidth: 2 } : { fill: colour };
  if (style.shape === 'circle') return <circle cx={x} cy={y} r={r} {...paint} />;
  if (style.shape === 'square') return <rect x={x - r * 0.9} y={y - r * 0.9} width={r * 1.8} height={r * 1.8} {...paint} />;
  if (style.shape === 'bar') return <rect x={x - r * 0.55} y={y - r * 1.2} width={r * 1.1} height={r * 2.4} {...paint} />;
  return <path d={PATHS[style.shape](x, y, r)} {...paint} />;
}

/** A sample's shape beside its name. */
export function Marker({ style, size = 14 }: { style: SampleStyle; size?: number }) {
  return (
    <svg width={size} height={size} viewBox="0 0 14 14" aria-hidden style={{ flex: 'none' }}>
      <MarkerAt style={style} x={7} y={7} r={4.2} />
    </svg>
  );
}
