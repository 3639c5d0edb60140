import type { ReactNode } from 'react';
import { Code } from '@/components/ui/code';
import { Ring } from '@/components/ui/ring';

/** The glass to look for, as a stamped label: the largest thing on the screen. */
export function GlassLabel({ fields, code, done, total, foot }: { fields: string[]; code: string; done: number; total: number; foot: ReactNode }) {
  return (
    <div className="bench">
      <div className="label">
        <div className="fields">{fields.map((field) => <span key={field}>{field}</span>)}</div>
        <Code code={code} size="xl" />
        <div className="foot">
          <span className="glasses" role="img" aria-label={`glass ${done + 1} of ${total}`}>
            {Array.from({ length: total }, (_, i) => <Ring key={i} state={i < done ? 'done' : i === done ? 'open' : 'to-come'} />)}
          </span>
          <span>{foot}</span>
        </div>
      </div>
    </div>
  );
}
