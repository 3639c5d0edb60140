import type { ReactNode } from 'react';

/** What a list says while it has nothing: what would stand here, and the way to the first one. */
export function Empty({ children, action }: { children: ReactNode; action?: ReactNode }) {
  return (
    <div className="stack tight">
      <p className="soft">{children}</p>
      {action && <div>{action}</div>}
    </div>
  );
}
