'use client';

import { useWords } from '@/components/i18n/words';
import type { ItemKind } from '@/db/enums';
import type { SheetItem } from '@/lib/ballots/types';
import { VALUE_RANGE } from '@/lib/ballots/types';
import type { KeptState } from '@/lib/offline/answers';
import { keptWord } from './words';

export type PointKind = Extract<ItemKind, 'category' | 'rate' | 'term' | 'just_right' | 'liking'>;

interface Props {
  line: SheetItem & { kind: PointKind };
  value: number | null;
  kept: KeptState | null;
  isClosed: boolean;
  onSet(value: number): void;
  onClear(): void;
}

const WORDS = { category: 'category', rate: 'rate', term: 'rate', just_right: 'right', liking: 'liking' } as const;

/** A scale of labelled points, none chosen beforehand; what is only rated where it applies can be left alone. */
export function PointScale({ line, value, kept, isClosed, onSet, onClear }: Props) {
  const t = useWords();
  const { low, high } = VALUE_RANGE[line.kind]!;
  const name = `point-${line.item}-${line.phase}`;
  const points = Array.from({ length: high - low + 1 }, (_, i) => low + i);
  return (
    <fieldset className={`item points ${value !== null ? 'set' : ''}`}>
      <legend className="visually-hidden">{line.kind === 'liking' ? t('points.overall') : line.name}</legend>
      <div className="head">
        <span className="name" aria-hidden>{line.kind === 'liking' ? t('points.overall') : line.name}</span>
        <span className="state hint">
          {value === null ? t(isClosed ? 'scale.notAnswered' : 'points.choose') : kept && keptWord(t, kept)}
          {value !== null && !isClosed && <button type="button" className="link" onClick={onClear}>{t('scale.clearShort')}<span className="visually-hidden"> {line.name}</span></button>}
        </span>
      </div>
      {line.kind !== 'liking' && line.definition && <p className="hint">{line.definition}</p>}
      <div className={line.kind === 'category' ? 'point-columns' : points.length > 4 ? 'stack tight' : 'point-row'}>
        {points.map((point) => (
          <label key={point} className="tick-row">
            <input type="radio" name={name} value={point} checked={value === point} disabled={isClosed} onChange={() => onSet(point)} />
            <span>{t(`${WORDS[line.kind]}.${point}` as 'category.0')}</span>
          </label>
        ))}
      </div>
    </fieldset>
  );
}
