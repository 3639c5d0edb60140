interface Props {
  /** Where the session's results are handed out as files: `/api/v1/c/…/results`. */
  href: string;
}

/** The answers as files, and the bundle that computes the figures anew. */
export function TakeAway({ href }: Props) {
  const names = <span className="hint">Seats stand by number.</span>;
  return (
    <dl className="facts">
      <dt>For a spreadsheet</dt>
      <dd style={{ margin: 0 }}>
        <a href={`${href}/answers.xlsx`} download>Answers with samples, seats and report (XLSX)</a> {names} <a href={`${href}/answers.xlsx?names=yes`} download aria-label="With names (XLSX)">With names</a>
      </dd>
      <dt>For other programs</dt>
      <dd style={{ margin: 0 }}>
        <a href={`${href}/answers.csv`} download>Every answer that counts, one a row (CSV)</a> {names} <a href={`${href}/answers.csv?names=yes`} download aria-label="With names (CSV)">With names</a>
      </dd>
      <dt>To check our numbers</dt>
      <dd style={{ margin: 0 }}>
        <a href={`${href}/reproduce.zip`} download>Answers, figures, and a script for R that computes them anew (ZIP)</a>
      </dd>
    </dl>
  );
}
