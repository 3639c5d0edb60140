import Link from 'next/link';
import type { ReactNode } from 'react';
import type { Offer } from '@/lib/planner/types';

interface Props<T extends Offer> {
  offers: readonly T[];
  caption: string;
  designHref(offer: T): string;
  /** The panel planner with this method in it; null where it doesn't plan it. */
  planHref(offer: T): string | null;
  choose: string;
  /** Under the method's name: why it fits, or why not. */
  about(offer: T): ReactNode;
}

const amount = (n: number) => n.toLocaleString('en');

/** Millilitres up to a litre, then litres. */
const wine = (ml: number) => (ml < 1000 ? `${Math.ceil(ml)} mL` : `${(Math.ceil(ml / 10) / 100).toLocaleString('en')} L`);

function Pair({ of: { usual, fewest }, show = amount }: { of: { usual: number; fewest: number }; show?: (n: number) => string }) {
  return <><b className="mid">{show(usual)}</b>{fewest !== usual && <span className="soft whitespace-nowrap"> ({show(fewest)})</span>}</>;
}

/** Methods with what each needs: for the usual panel, and in brackets for the fewest. */
export function Offers<T extends Offer>({ offers, caption, designHref, planHref, choose, about }: Props<T>) {
  return (
    <table className="ledger folds tight">
      <caption className="max-md:block">{caption}</caption>
      <thead>
        <tr>
          <th scope="col">Method</th><th scope="col" className="num">Panelists</th><th scope="col" className="num">Glasses each</th><th scope="col" className="num">Glasses in all</th>
          <th scope="col" className="num">Of each sample</th><th scope="col" className="num n">Minutes each</th><th scope="col">Then</th>
        </tr>
      </thead>
      <tbody>
        {offers.map((offer) => {
          const plan = planHref(offer);
          const { needs } = offer;
          return (
            <tr key={offer.method} style={{ verticalAlign: 'top' }}>
              <th scope="row" style={{ verticalAlign: 'top', maxWidth: '52ch', padding: '8px 16px 8px 0' }}><b>{offer.name}.</b> {about(offer)}</th>
              <td className="num" data-label="Panelists"><Pair of={needs.panelists} /></td>
              <td className="num" data-label="Glasses each">{needs.glassesEach}{needs.flights > 1 && <span className="soft"> in {needs.flights} flights</span>}</td>
              <td className="num" data-label="Glasses in all"><Pair of={needs.glassesInAll} /></td>
              <td className="num" data-label="Of each sample"><Pair of={needs.mlPerSample} show={wine} /></td>
              <td className="num n" data-label="Minutes each">{needs.minutesEach}</td>
              <td data-label="Then">
                <Link href={designHref(offer)}>{choose}<span className="visually-hidden">: {offer.name}</span></Link>
                {plan && <> <br className="hidden md:block" /><Link href={plan}>Plan its panel<span className="visually-hidden">: {offer.name}</span></Link></>}
              </td>
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}
