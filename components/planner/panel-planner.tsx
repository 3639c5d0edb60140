'use client';

import { useDeferredValue, useMemo } from 'react';
import { PowerCurve } from '@/components/charts/power-curve';
import { headlineOf, PROTOCOL_WORDS, sentencesOf, showChance } from '@/lib/planner/format';
import { planDiscrimination, type DiscriminationPlan, type DiscriminationQuestion } from '@/lib/planner/plan-discrimination';
import { discriminationSchema, readQuery, type Query } from '@/lib/planner/schema';
import { PLANNED_PROTOCOLS } from '@/lib/planner/types';
import { ChoiceField, KeptFields, NumberField, WrongFields, type FormState } from './fields';
import { useLiveQuery } from './use-live-query';

interface Props {
  query: Query;
  kept: Query;
  /** People that the plan begins with, and where that number comes from. */
  panel: number;
  panelHint: string;
}

function Table({ plan, isDifference }: { plan: DiscriminationPlan; isDifference: boolean }) {
  const mark = (n: number) => [n === plan.atHand.answers && 'at hand', n === plan.smallest?.answers && 'the smallest'].filter(Boolean).join(', ');
  const head = isDifference ? 'Right at least' : 'Right at most';
  return (
    <table className="ledger">
      <caption>The same in figures</caption>
      <thead><tr><th scope="col" className="num n">Answers</th><th scope="col" className="num n">{head}</th><th scope="col" className="num n">Chance</th><th scope="col">Which</th></tr></thead>
      <tbody>
        {plan.table.map(({ n, power, critical }) => (
          <tr key={n} className={mark(n) ? 'sel' : undefined}>
            <th scope="row" className="num n">{n.toLocaleString('en')}</th>
            <td className="num n">{critical ?? 'none'}</td>
            <td className="num n">{showChance(power, 1)}</td>
            <td>{mark(n)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function Planned({ q }: { q: DiscriminationQuestion }) {
  const plan = useMemo(() => planDiscrimination(q), [q]);
  const { atHand, smallest } = plan;
  const isDifference = q.aim === 'difference';
  const said = isDifference ? 'Chance of showing a difference of that size' : 'Chance of showing likeness when nobody tastes a difference';
  return (
    <>
      <div className="stack tight" aria-live="polite">
        <p className="verdict">{headlineOf(plan, q)}</p>
        {sentencesOf(plan, q).map((sentence) => <p key={sentence} style={{ maxWidth: '80ch' }}>{sentence}</p>)}
      </div>
      <div className="grid gap-5 lg:grid-cols-2">
        <div className="stack tight">
          <p className="mid">{said}</p>
          <PowerCurve curve={plan.curve} goal={plan.goal} atHand={{ n: atHand.answers, power: atHand.power }} smallest={smallest && { n: smallest.answers, power: isDifference ? smallest.power : plan.table.find((row) => row.n === smallest.answers)!.power }} said={said} />
        </div>
        <Table plan={plan} isDifference={isDifference} />
      </div>
      <ul className="stack tight">{plan.notes.map((note) => <li key={note} className="note" style={{ maxWidth: '90ch' }}>{note}</li>)}</ul>
    </>
  );
}

/** The planner of a discrimination test: risks and size in, the smallest panel and a live power curve out. */
export function PanelPlanner({ query: initial, kept, panel, panelHint }: Props) {
  const { query, form: live, answer } = useLiveQuery(initial);
  // Typing stays quick while a long curve is counted.
  const deferred = useDeferredValue(query);
  const read = useMemo(() => readQuery(discriminationSchema(panel), deferred), [deferred, panel]);
  const form: FormState = { id: 'panel', query: initial, errors: read.ok ? {} : read.errors };
  return (
    <div className="stack wide-gap">
      <form method="get" action="#panel-of-a-test" className="stack" {...live}>
        <KeptFields query={kept} />
        <div className="grid-fields">
          <ChoiceField form={form} name="protocol" label="Test" options={PLANNED_PROTOCOLS.map((value) => [value, PROTOCOL_WORDS[value]] as const)} />
          <ChoiceField form={form} name="aim" label="What is to be shown?" options={[['difference', 'a difference'], ['similarity', 'similarity']]} />
          <ChoiceField form={form} name="sided" label="Direction" hint="For a pair only." options={[['one', 'one, named beforehand'], ['two', 'both count']]} />
          <NumberField form={form} name="alpha" label="Risk of a false “different”, α" hint="0.05 is usual; 0.2 for similarity." fallback={0.05} />
          <NumberField form={form} name="beta" label="Risk of missing it, β" hint="0.1 to 0.2; for similarity 0.05, the risk of a false “alike”." fallback={0.2} />
          <ChoiceField form={form} name="by" label="The difference that matters is given as" options={[['pd', 'a share of people, pd'], ['dprime', 'd′']]} />
          <NumberField form={form} name="pd" label="Share who taste it, pd" hint="Under 0.25 small, above 0.35 large (common practice)." fallback={0.5} />
          <NumberField form={form} name="dprime" label="d′" hint="1 is slight, 2 is clear." fallback={1.5} />
          <NumberField form={form} name="replicates" label="Sets for each person" hint="One is the standard’s." fallback={1} />
          <NumberField form={form} name="panel" label="People at hand" hint={panelHint} fallback={panel} />
        </div>
        <div><button className="btn btn-main">Work it out</button></div>
      </form>
      <div ref={answer} tabIndex={-1} className="stack wide-gap" aria-label="The panel" role="region">
        <WrongFields form={form} />
        {read.ok && <Planned q={read.value} />}
      </div>
    </div>
  );
}
