import { useWords } from '@/components/i18n/words';

interface Props {
  name: string;
  value: number;
  /** Puts the line back to what it was before the last touch; null when there is nothing to take back. */
  onUndo: (() => void) | null;
  onStep(value: number): void;
  onClear(): void;
}

/** − + Undo and Clear stand in the foot and act on the line last touched, so that nothing jumps when a line is set. */
export function FineSteps({ name, value, onUndo, onStep, onClear }: Props) {
  const t = useWords();
  return (
    <div className="fine" role="group" aria-label={t('scale.fine', { name })}>
      <button type="button" className="btn" aria-label={t('scale.less', { name })} onClick={() => onStep(Math.max(0, value - 1))}>
        <svg width="20" height="20" aria-hidden><path d="M3 10h14" stroke="currentColor" strokeWidth={2} /></svg>
      </button>
      <button type="button" className="btn btn-bare" disabled={!onUndo} onClick={() => onUndo?.()}>{t('sheet.undo')}</button>
      <button type="button" className="btn btn-bare" aria-label={t('scale.clear', { name })} onClick={onClear}>{t('scale.clearShort')}</button>
      <button type="button" className="btn" aria-label={t('scale.more', { name })} onClick={() => onStep(Math.min(100, value + 1))}>
        <svg width="20" height="20" aria-hidden><path d="M3 10h14M10 3v14" stroke="currentColor" strokeWidth={2} /></svg>
      </button>
    </div>
  );
}
