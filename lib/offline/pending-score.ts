/** A line and the value that it stands at while a finger or a key still moves it. */
export interface Draft {
  readonly item: number;
  readonly value: number;
}

/**
 * Keys and fine steps come in bursts, and only the last value of a burst is kept. Taps may follow each
 * other faster than a slow phone draws, so what is pending stands here and not in what was last drawn.
 */
export class PendingScore {
  private draft: Draft | null = null;
  private timer: ReturnType<typeof setTimeout> | undefined;

  /**
   * @param keep takes a settled value, once
   * @param onChange hears of every change of the draft
   */
  constructor(
    private readonly burstMs: number,
    private readonly keep: (draft: Draft) => void,
    private readonly onChange: (draft: Draft | null) => void,
  ) {}

  /** The draft of this line, or null. */
  of(item: number): Draft | null {
    return this.draft?.item === item ? this.draft : null;
  }

  /** Moves a line; what another line had pending is kept first. */
  set(item: number, value: number): void {
    this.settleOthers(item);
    this.put({ item, value });
    this.timer = setTimeout(() => this.settle(), this.burstMs);
  }

  /** Keeps what is pending now. */
  settle(): void {
    const settled = this.draft;
    this.put(null);
    if (settled) this.keep(settled);
  }

  /** Keeps what is pending on any line but this. */
  settleOthers(item: number): void {
    if (this.draft && this.draft.item !== item) this.settle();
  }

  /** Forgets what is pending on a line: it was cleared or taken back. Another line's is kept. */
  drop(item: number): void {
    this.settleOthers(item);
    this.put(null);
  }

  private put(draft: Draft | null): void {
    clearTimeout(this.timer);
    this.draft = draft;
    this.onChange(draft);
  }
}
