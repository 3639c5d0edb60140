import type { ReactNode } from 'react';
import { Code } from '@/components/ui/code';
import { Ring } from '@/components/ui/ring';
import { useWords } from '@/components/i18n/words';

/** The glass to look for, as a stamped label: the largest thing on the screen. */
export function GlassLabel({ fields, code, done, total, foot }: { fields: string[]; code: string; done: number; total: number; foot: ReactNode }) {
  const t = useWords();
  return (
    <div className="bench">
      <div className="label">
        <div className="fields">{fields.map((field) => <span key={field}>{field}</span>)}</div>
        <Code code={code} size="xl" label={t('common.codeWord')} />
        <div className="foot">
          <span className="glasses" role="img" aria-label={t('sheet.glassOfLabel', { n: done + 1, total })}>
            {Array.from({ length: total }, (_, i) => <Ring key={i} state={i < done ? 'done' : i === done ? 'open' : 'to-come'} />)}
          </span>
          <span>{foot}</span>
        </div>
      </div>
    </div>
  );
}
