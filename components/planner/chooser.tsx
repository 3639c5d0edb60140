'use client';

import { useMemo } from 'react';
import { choose } from '@/lib/planner/choose';
import { SIZE_D_PRIME } from '@/lib/planner/effect';
import { people, QUESTION_WORDS, SIZE_WORDS } from '@/lib/planner/format';
import { NEEDS_OF } from '@/lib/planner/methods';
import { splitQuery } from '@/lib/planner/queries';
import { choosingSchema, readQuery, type Query } from '@/lib/planner/schema';
import { QUESTIONS, SIZES, type Choosing, type Misfit, type Offer } from '@/lib/planner/types';
import { ChoiceField, KeptFields, NumberField, TickField, WrongFields, type FormState } from './fields';
import { Offers } from './offers';
import { useLiveQuery } from './use-live-query';

interface Props {
  /** `/c/<cellar>` */
  home: string;
  query: Query;
  kept: Query;
}

function Remarks({ texts }: { texts: readonly string[] }) {
  return texts.map((text) => <span key={text} className="note" style={{ display: 'block' }}>{text}</span>);
}

/** Counted panels all say the same of themselves, once, under the tables. */
const basisOf = (offer: Offer): string[] => (offer.isCounted ? [] : [`Panelists: ${offer.basis}.`]);

const aboutOffer = (offer: Offer) => <>{offer.why}<Remarks texts={[...basisOf(offer), ...offer.cautions]} /></>;
const aboutMisfit = (misfit: Misfit) => (
  <>{misfit.reasons.map((reason) => <span key={reason} className="warn" style={{ display: 'block' }}>{reason}</span>)}<Remarks texts={[misfit.why, ...basisOf(misfit)]} /></>
);

/** Address of the panel planner with an offered test in it; null for methods that it doesn't plan. */
function planHrefOf({ method }: Offer, query: Query, { size, people: atHand }: Choosing): string | null {
  const { test } = NEEDS_OF[method];
  if (!test) return null;
  const own = splitQuery(query, 'choose').own;
  const address = new URLSearchParams(Object.entries(own).map(([name, value]) => [name, String(value)]));
  address.set('protocol', test.protocol);
  address.set('by', 'dprime');
  address.set('dprime', String(SIZE_D_PRIME[size]));
  if (test.twoSided) address.set('sided', 'two');
  if (atHand !== null) address.set('panel', String(atHand));
  return `?${address}#panel-of-a-test`;
}

function Found({ home, query, choosing }: { home: string; query: Query; choosing: Choosing }) {
  const { offers, misfits } = useMemo(() => choose(choosing), [choosing]);
  const links = {
    designHref: ({ method }: Offer) => `${home}/sessions/new?method=${method}`,
    planHref: (offer: Offer) => planHrefOf(offer, query, choosing),
  };
  const n = offers.length;
  const counted = [...offers, ...misfits].find((offer) => offer.isCounted);
  return (
    <>
      <p className="verdict">{n === 0 ? 'As asked, nothing fits. What stands in the way is said below.' : <>{n === 1 ? 'One method fits' : `${n} methods fit`}; <b>{offers[0]!.name.toLowerCase()}</b> first.</>}</p>
      {n > 0 && <Offers offers={offers} caption="For the usual panel, and in brackets for the fewest that are worth while. Wine with one spare glass." choose="Design it" about={aboutOffer} {...links} />}
      {misfits.length > 0 && (
        <details open={n === 0 || undefined}>
          <summary className="link">{n === 0 ? 'Methods that' : `${misfits.length} more`} would answer it, and {misfits.length === 1 && n > 0 ? 'doesn’t' : 'don’t'} fit what is at hand</summary>
          <div className="pt-3"><Offers offers={misfits} caption="You decide: each may be taken all the same." choose="Design it all the same" about={aboutMisfit} {...links} /></div>
        </details>
      )}
      <div className="stack tight note" style={{ maxWidth: '90ch' }}>
        {counted && <p>Panelists of a test are {counted.basis}.</p>}
        {choosing.people !== null && <p>Counted for {people(choosing.people)} who can taste.</p>}
      </div>
    </>
  );
}

/** A few plain questions, and the methods that fit, counted while they are answered. */
export function Chooser({ home, query: initial, kept }: Props) {
  const { query, form: live, answer } = useLiveQuery(initial);
  const read = useMemo(() => readQuery(choosingSchema, query), [query]);
  const form: FormState = { id: 'choose', query: initial, errors: read.ok ? {} : read.errors };
  return (
    <div className="stack wide-gap">
      <form method="get" className="stack" {...live}>
        <KeptFields query={kept} />
        <div className="grid-fields">
          <ChoiceField form={form} name="question" label="What do you want to know?" options={QUESTIONS.map((value) => [value, QUESTION_WORDS[value]] as const)} />
          <NumberField form={form} name="samples" label="How many samples?" fallback={2} />
          <NumberField form={form} name="wine" label="Wine of each sample, mL" hint="Empty: enough." />
          <NumberField form={form} name="people" label="People who can taste" hint="Empty: not known yet." />
          <ChoiceField form={form} name="size" label="How large a difference matters?" hint="For tests of difference." options={(['middling', ...SIZES.filter((size) => size !== 'middling')] as const).map((value) => [value, SIZE_WORDS[value]] as const)} />
          <TickField form={form} name="strong" label="Tannic, strong or sweet" />
        </div>
        <details open={!read.ok || undefined}>
          <summary className="link">Serving and time</summary>
          <div className="grid-fields pt-3">
            <NumberField form={form} name="serving" label="Serving, mL" hint="30 mL is common practice." fallback={30} />
            <NumberField form={form} name="glass" label="Time for a glass, s" hint="About 90 s, common practice." fallback={90} />
            <NumberField form={form} name="rest" label="Rest after it, s" hint="60 to 90 s for tannin (common practice). Compared glasses are rested from once." fallback={60} />
          </div>
        </details>
        <div><button className="btn btn-main">Show what fits</button></div>
      </form>
      <div ref={answer} tabIndex={-1} className="stack wide-gap" aria-label="What fits" role="region">
        <WrongFields form={form} />
        {read.ok && <Found home={home} query={query} choosing={read.value} />}
      </div>
    </div>
  );
}
