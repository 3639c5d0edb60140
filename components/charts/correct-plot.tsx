/** Number correct on a line from 0 to n, with what guessing gives and what was needed. */
export function CorrectPlot({ n, correct, needed, chance }: { n: number; correct: number; needed: number | null; chance: number }) {
  const width = 320;
  const at = (value: number) => 12 + ((width - 24) * value) / n;
  const said = `${correct} of ${n} correct; guessing gives about ${(n * chance).toFixed(1)}; ${needed === null ? 'no number would have been enough' : `${needed} were needed`}.`;
  return (
    <svg width={width} height={84} viewBox={`0 0 ${width} 84`} role="img" aria-label={said} fontSize={13} fill="var(--ink-2)" style={{ maxWidth: '100%', height: 'auto' }}>
      <path d={`M${at(0)} 42H${at(n)}`} stroke="var(--ctl)" strokeWidth={2} />
      <path d={`M${at(0)} 35v14M${at(n)} 35v14`} stroke="var(--ctl)" />
      <text x={at(0)} y={64}>0</text>
      <text x={at(n)} y={64} textAnchor="end">{n}</text>
      <path d={`M${at(n * chance)} 32v20`} stroke="var(--ink-3)" strokeDasharray="3 3" strokeWidth={2} />
      <text x={at(n * chance)} y={80} textAnchor="middle">guessing</text>
      {needed !== null && (
        <>
          <path d={`M${at(needed)} 30v24`} stroke="var(--d3)" strokeWidth={3} />
          <text x={at(needed)} y={64} textAnchor="middle">needed</text>
        </>
      )}
      <circle cx={at(correct)} cy={42} r={7} fill="var(--d1)" />
      <text x={at(correct)} y={22} textAnchor="middle" fill="var(--ink)">{correct} correct</text>
    </svg>
  );
}
