import type { ReactNode } from 'react';
import { Word } from './mark';
import { ModeSwitch } from './mode-switch';

/** A narrow page before anything else: sign in, set a password, join. */
export function Door({ title, children }: { title: ReactNode; children: ReactNode }) {
  return (
    <div className="phone">
      <header className="bar"><span style={{ fontSize: '1.125rem' }}><Word size={20} /></span><ModeSwitch /></header>
      <main className="phone-body" id="main">
        <h1>{title}</h1>
        {children}
      </main>
    </div>
  );
}
