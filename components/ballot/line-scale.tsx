'use client';

import { memo, useRef, useState, type FocusEvent, type KeyboardEvent, type PointerEvent, type TouchEvent } from 'react';
import { useWords } from '@/components/i18n/words';
import { Ring } from '@/components/ui/ring';
import type { SheetItem } from '@/lib/ballots/types';
import type { KeptState } from '@/lib/offline/answers';
import { afterPaint } from '@/lib/phone/after-paint';
import { feel } from '@/lib/phone/feel';
import { keptWord } from './words';

/** A finger that moved less than this has tapped; one that moved sideways further is dragging. */
const DRAG_PX = 6;

interface Props {
  line: SheetItem;
  value: number | null;
  kept: KeptState | null;
  isActive: boolean;
  isClosed: boolean;
  /** The same functions at every render: a ballot of forty lines paints the one that changed. */
  onSet(item: number, value: number): void;
  onClear(item: number): void;
  onTouch(item: number): void;
}

const gripAt = (value: number | null) => ({ left: `${value ?? 50}%`, visibility: value === null ? ('hidden' as const) : ('visible' as const) });

/** What a key does to the value; the first arrow sets the middle. Null for keys that do nothing here. */
function keyStep(key: string, value: number | null): number | null {
  const from = value ?? 50;
  const step = (by: number) => (value === null ? 50 : Math.min(100, Math.max(0, from + by)));
  switch (key) {
    case 'ArrowRight':
    case 'ArrowUp':
      return step(1);
    case 'ArrowLeft':
    case 'ArrowDown':
      return step(-1);
    case 'PageUp':
      return step(10);
    case 'PageDown':
      return step(-10);
    case 'Home':
      return 0;
    case 'End':
      return 100;
    default:
      return null;
  }
}

/**
 * An unstructured line from 0 to 100 with words at its ends. Untouched it has no ring and no value.
 * A tap or a sideways drag sets it; a finger that scrolls the page changes nothing.
 */
export const LineScale = memo(function LineScale({ line, value, kept, isActive, isClosed, onSet, onClear, onTouch }: Props) {
  const t = useWords();
  const track = useRef<HTMLDivElement>(null);
  const grip = useRef<HTMLSpanElement>(null);
  const start = useRef<{ x: number; isDragging: boolean } | null>(null);
  const [preview, setPreview] = useState<number | null>(null);
  const [isTouching, setTouching] = useState(false);
  // The finger's own value until the sheet has taken it.
  if (preview !== null && !isTouching && preview === value) setPreview(null);
  const shown = preview ?? value;
  const nameId = `line-${line.item}-${line.phase}`;

  const valueAt = (clientX: number): number => {
    const { left, width } = track.current!.getBoundingClientRect();
    return Math.round(Math.min(1, Math.max(0, (clientX - left) / width)) * 100);
  };
  const onPointerDown = (event: PointerEvent) => {
    if (isClosed || event.button > 0) return;
    start.current = { x: event.clientX, isDragging: false };
  };
  const onPointerMove = (event: PointerEvent<HTMLDivElement>) => {
    if (!start.current) return;
    if (!start.current.isDragging && Math.abs(event.clientX - start.current.x) > DRAG_PX) {
      start.current.isDragging = true;
      setTouching(true);
      event.currentTarget.setPointerCapture(event.pointerId);
    }
    if (start.current.isDragging) setPreview(valueAt(event.clientX));
  };
  const onPointerUp = (event: PointerEvent) => {
    if (!start.current) return;
    start.current = null;
    const next = valueAt(event.clientX);
    // The grip moves before React draws anything: on a slow phone that is a third of the wait for the paint.
    Object.assign(grip.current!.style, gripAt(next));
    afterPaint(() => {
      setTouching(false);
      setPreview(next === value ? null : next);
      feel();
      onSet(line.item, next);
    });
  };
  const onPointerCancel = () => {
    start.current = null;
    setTouching(false);
    setPreview(null);
  };
  // No mouse events after a touch: on a slow phone they would hold up the paint.
  const onTouchEnd = (event: TouchEvent) => event.cancelable && event.preventDefault();
  const onFocus = (event: FocusEvent) => {
    // A finger's focus changes nothing before the finger has set something.
    if (event.currentTarget.matches(':focus-visible')) onTouch(line.item);
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (isClosed) return;
    if (event.key === 'Delete' || event.key === 'Backspace') {
      event.preventDefault();
      return onClear(line.item);
    }
    const next = keyStep(event.key, value);
    if (next === null) return;
    event.preventDefault();
    onTouch(line.item);
    onSet(line.item, next);
  };

  return (
    <section className={`item ${shown !== null ? 'set' : ''}`}>
      <div className="head">
        <span className="name" id={nameId}>{line.name}</span>
        {shown === null ? (
          <span className="state hint">{isClosed ? t('scale.notAnswered') : t('scale.touch')}</span>
        ) : (
          <span className="state">
            <Ring state={kept === 'received' || isClosed ? 'done' : 'open'} size={kept === 'received' ? 11 : 14} />
            {isTouching ? '' : preview !== null ? keptWord(t, 'saving') : isClosed ? t('scale.closed') : kept && keptWord(t, kept)}
            <span className="val">{shown}</span>
          </span>
        )}
      </div>
      <div
        className="scale" ref={track} role="slider" tabIndex={isClosed ? -1 : 0} aria-labelledby={nameId} aria-disabled={isClosed || undefined}
        aria-valuemin={0} aria-valuemax={100} aria-valuenow={shown ?? 0} aria-valuetext={shown === null ? t('scale.notSet') : t('scale.valueText', { value: shown, low: line.lowAnchor, high: line.highAnchor })}
        onPointerDown={onPointerDown} onPointerMove={onPointerMove} onPointerUp={onPointerUp} onPointerCancel={onPointerCancel} onTouchEnd={onTouchEnd} onKeyDown={onKeyDown} onFocus={onFocus}
      >
        <i className="end" />
        <i className="end r" />
        <span className="grip" ref={grip} style={gripAt(shown)}><Grip isReceived={kept === 'received' || isClosed} isActive={isActive} /></span>
      </div>
      <div className="words"><span>{line.lowAnchor}</span><span>{line.highAnchor}</span></div>
    </section>
  );
});

function Grip({ isReceived, isActive }: { isReceived: boolean; isActive: boolean }) {
  const stroke = isReceived && !isActive ? 'var(--ink)' : 'var(--mal)';
  return (
    <svg width="36" height="36" viewBox="0 0 36 36" aria-hidden>
      <circle cx="18" cy="18" r="12" fill="var(--ground)" />
      {isReceived ? <circle cx="18" cy="18" r="10.5" fill="none" stroke={stroke} strokeWidth={3} /> : <path d="M28.34 16.18A10.5 10.5 0 1 1 19.82 7.66" fill="none" stroke={stroke} strokeWidth={3} />}
      <path d="M18 11v14" stroke={stroke} strokeWidth={1.5} />
    </svg>
  );
}
