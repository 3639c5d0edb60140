/** − + and Clear stand in the foot and act on the line last touched, so that nothing jumps when a line is set. */
export function FineSteps({ name, value, onStep, onClear }: { name: string; value: number; onStep(value: number): void; onClear(): void }) {
  return (
    <div className="fine" role="group" aria-label={`Fine steps for ${name}`}>
      <button type="button" className="btn" aria-label={`${name}: one less`} onClick={() => onStep(Math.max(0, value - 1))}>
        <svg width="20" height="20" aria-hidden><path d="M3 10h14" stroke="currentColor" strokeWidth={2} /></svg>
      </button>
      <button type="button" className="btn btn-bare" onClick={onClear}>Clear {name}</button>
      <button type="button" className="btn" aria-label={`${name}: one more`} onClick={() => onStep(Math.min(100, value + 1))}>
        <svg width="20" height="20" aria-hidden><path d="M3 10h14M10 3v14" stroke="currentColor" strokeWidth={2} /></svg>
      </button>
    </div>
  );
}
