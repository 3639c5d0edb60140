'use client';

import { useMemo } from 'react';
import { showPoints } from '@/lib/planner/format';
import { planProfiles, type ProfileQuestion } from '@/lib/planner/plan-profile';
import { profileSchema, readQuery, type Query } from '@/lib/planner/schema';
import type { Scatter } from '@/lib/planner/types';
import { ChoiceField, KeptFields, NumberField, WrongFields, type FormState } from './fields';
import { useLiveQuery } from './use-live-query';

/** A line of the ballot with the scatter of the cellar's own panel. */
export interface KnownLine extends Scatter {
  name: string;
  sessions: number;
}

interface Props {
  query: Query;
  kept: Query;
  panel: number;
  /** null: the person may not see results. */
  past: { lines: readonly KnownLine[]; sessions: number; leftOut: number } | null;
}

/** Where nothing is known of the panel: a range to choose from. Ours; no standard gives such figures. */
const STARTS: readonly (Scatter & { name: string })[] = [
  { name: 'A steady panel', repeatability: 5, disagreement: 3 },
  { name: 'A panel in training', repeatability: 10, disagreement: 7 },
  { name: 'A loose panel', repeatability: 15, disagreement: 12 },
];

/** More lines than this go under a fold. */
const AT_ONCE = 10;

type Row = Scatter & { name: string; sessions?: number };

function Rows({ rows, q, caption }: { rows: readonly Row[]; q: ProfileQuestion; caption: string }) {
  const plans = planProfiles(rows, q);
  return (
    <table className="ledger folds tight">
      <caption className="max-md:block">{caption}</caption>
      <thead>
        <tr><th scope="col">Line</th><th scope="col" className="num">Repeats scatter by</th><th scope="col" className="num">Panelists disagree by</th><th scope="col" className="num">Shown from</th><th scope="col" className="num n">Found 8 times in 10 from</th><th scope="col">From</th></tr>
      </thead>
      <tbody>
        {rows.map((row, i) => (
          <tr key={row.name}>
            <th scope="row">{row.name}</th>
            <td className="num" data-label="Repeats scatter by">{row.repeatability === 0 ? 'not known' : showPoints(row.repeatability)}</td>
            <td className="num" data-label="Panelists disagree by">{showPoints(row.disagreement)}</td>
            <td className="num" data-label="Shown from"><b className="mid">{showPoints(plans[i]!.shown)}</b></td>
            <td className="num n" data-label="Found 8 times in 10 from">{showPoints(plans[i]!.found)}</td>
            <td className="soft" data-label="From">{row.sessions === undefined ? '' : `${row.sessions} ${row.sessions === 1 ? 'session' : 'sessions'}`}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function PastRows({ past, q }: { past: NonNullable<Props['past']>; q: ProfileQuestion }) {
  const caption = `The cellar’s own panel, from its last ${past.sessions === 1 ? 'unsealed profile' : `${past.sessions} unsealed profiles`}; points of the line from 0 to 100`;
  const rest = past.lines.slice(AT_ONCE);
  return (
    <>
      <Rows rows={past.lines.slice(0, AT_ONCE)} q={q} caption={caption} />
      {rest.length > 0 && (
        <details>
          <summary className="link">{rest.length} more {rest.length === 1 ? 'line' : 'lines'}</summary>
          <div className="pt-3"><Rows rows={rest} q={q} caption="The other lines" /></div>
        </details>
      )}
      {past.leftOut > 0 && <p className="note">Left out: {past.leftOut === 1 ? 'one line that has' : `${past.leftOut} lines that have`} gaps or could not be tested.</p>}
    </>
  );
}

/** What is known of the panel, in words, where no line can be shown. */
function nothingKnown(past: Props['past']): string | null {
  if (!past) return 'Results of past sessions are not for your roles to see, so the range below has to do.';
  if (past.sessions === 0) return 'No profile has been unsealed yet, so nothing is known of this panel. After the first one its own figures stand here. Until then, choose from the range.';
  return past.lines.length === 0 ? 'The profiles so far have gaps in every line or could not be tested, so the panel’s scatter can’t be told from them. Choose from the range.' : null;
}

/** The planner of a profile: how far two means must lie apart, by line, for a panel and design. */
export function ProfilePlanner({ query: initial, kept, panel, past }: Props) {
  const { query, form: live, answer } = useLiveQuery(initial);
  const read = useMemo(() => readQuery(profileSchema(panel), query), [query, panel]);
  const form: FormState = { id: 'profile', query: initial, errors: read.ok ? {} : read.errors };
  const unknown = nothingKnown(past);
  const q = read.ok ? read.value : null;
  return (
    <div className="stack wide-gap">
      <form method="get" action="#panel-of-a-profile" className="stack" {...live}>
        <KeptFields query={kept} />
        <div className="grid-fields">
          <NumberField form={form} name="tasters" label="Panelists" fallback={Math.min(200, Math.max(2, panel))} />
          <NumberField form={form} name="wines" label="Samples" fallback={4} />
          <NumberField form={form} name="times" label="Times each is tasted" hint="Two or three show repeatability." fallback={2} />
          <NumberField form={form} name="palpha" label="Risk of a false “different”, α" fallback={0.05} />
          <ChoiceField form={form} name="rule" label="Pairs are compared by" options={[['tukey', 'Tukey: all pairs guarded'], ['lsd', 'LSD: each pair by itself']]} />
          <NumberField form={form} name="repeat" label="Your figure: repeats scatter by" hint="Standard deviation, points of 100." fallback={10} />
          <NumberField form={form} name="disagree" label="Your figure: panelists disagree by" hint="Standard deviation, points of 100." fallback={7} />
        </div>
        <div><button className="btn btn-main">Work out the difference</button></div>
      </form>
      <div ref={answer} tabIndex={-1} className="stack wide-gap" aria-label="The smallest difference" role="region">
        <WrongFields form={form} />
        {unknown && <p className="caution">{unknown}</p>}
        {q && !unknown && past && <PastRows past={past} q={q} />}
        {q && <Rows rows={[{ name: 'Your figures', ...q.scatter }, ...STARTS]} q={q} caption={`${unknown ? 'A range to choose from' : 'Beside it, a range'}: our own starting figures, no standard gives them`} />}
        <p className="note" style={{ maxWidth: '90ch' }}>
          Means are judged by the panelist × sample mean square, as in the results: repeatability² + times × disagreement². “Shown from”: means further apart are called different
          {q?.rule === 'lsd' ? ' by a t test of that pair alone; with many pairs false differences add up' : ' by Tukey’s rule, which guards all pairs together'}. “Found 8 times in 10”: the true difference that such a panel shows with a chance of 80 %.
          {' '}More tastings by the same people narrow their own scatter only; what they disagree in is narrowed by more people. Past figures hold as far as the same kind of people taste the same kind of wine.
        </p>
      </div>
    </div>
  );
}
