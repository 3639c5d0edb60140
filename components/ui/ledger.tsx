import type { ReactNode } from 'react';

/** A ledger page: rows of question (margin) and answer (right of the double rule). */
export function LedgerPage({ children }: { children: ReactNode }) {
  return <main className="page" id="main">{children}</main>;
}

/** The first row: what this page is, its heading, and what can be done here. */
export function LedgerHead({ margin, title, actions }: { margin: ReactNode; title: ReactNode; actions?: ReactNode }) {
  return (
    <>
      <div className="q">{margin}</div>
      <div className="a apart">
        <h1>{title}</h1>
        {actions && <div className="row wrap">{actions}</div>}
      </div>
    </>
  );
}

/** One question and its answer. */
export function LedgerRow({ question, note, children, id }: { question: ReactNode; note?: ReactNode; children: ReactNode; id?: string }) {
  return (
    <>
      <div className="line" />
      <div className="q" id={id}>
        <h2>{question}</h2>
        {note && <p className="note">{note}</p>}
      </div>
      <div className="a">{children}</div>
    </>
  );
}
