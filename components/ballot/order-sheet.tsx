'use client';

import { useWords } from '@/components/i18n/words';
import { Code } from '@/components/ui/code';
import { Ring } from '@/components/ui/ring';
import { orderKey } from '@/lib/offline/answers';
import { feel } from '@/lib/phone/feel';
import { afterRest, nextBlock, sealShort } from './flow';
import { KeptLine, Trouble } from './kept-line';
import type { SheetPart } from './sheet-part';

/** One set to put in order: tap the glasses from least to most. Each tap is kept; a tap on a placed glass takes it out. */
export function OrderSheet({ sheet, store, state, place, go }: SheetPart) {
  const t = useWords();
  const { block } = place;
  const glasses = sheet.blocks.find((candidate) => candidate.block === block)!.glasses;
  const isClosed = state.sessionState !== 'open';
  const op = state.answers.get(orderKey(block))?.op;
  const order = op?.kind === 'order' ? op.order : [];
  const set = sheet.blocks.findIndex((candidate) => candidate.block === block) + 1;
  const isWhole = order.length === glasses.length;
  const keep = (next: number[]) => {
    feel();
    void store.record({ kind: 'order', block, order: next });
  };
  const toggle = (position: number) => keep(order.includes(position) ? order.filter((other) => other !== position) : [...order, position]);
  const move = (position: number, by: number) => {
    const from = order.indexOf(position);
    const next = order.filter((other) => other !== position);
    next.splice(from + by, 0, position);
    keep(next);
  };
  const onNext = () => {
    const next = nextBlock(sheet, block);
    if (next === null) go({ ...place, view: 'review' });
    else go(afterRest(sheet, { block: next, position: 1, phase: null }));
  };
  const codeOf = (position: number) => glasses[position - 1]!.code;
  const spoken = (position: number) => codeOf(position).split('').join(' ');

  return (
    <>
      <div className="bench">
        <h1 id="ask">{t('order.ask', { trait: sheet.items[0]?.name ?? '' })}</h1>
        <div className={`label ${glasses.length > 3 ? 'tags-many' : ''}`} role="group" aria-labelledby="ask">
          <div className="fields">
            <span>{t('pick.setOf', { n: set, total: sheet.blocks.length })}</span>
            <span>{t('sheet.seal', { hash: sealShort(sheet) })}</span>
            <span><KeptLine state={state} /></span>
          </div>
          {glasses.map(({ position, code }) => {
            const rank = order.indexOf(position) + 1;
            return (
              <button key={position} type="button" className={`tag ${rank > 0 ? 'on' : ''}`} aria-pressed={rank > 0} disabled={isClosed} onClick={() => toggle(position)}>
                <span className="ord">{t('pick.ordinal', { n: position })}</span>
                <Code code={code} size="l" label={t('common.codeWord')} />
                <span className="is">{rank > 0 ? <b>{t('order.place', { n: rank })}</b> : <Ring state="to-come" size={28} />}</span>
              </button>
            );
          })}
        </div>
      </div>
      {order.length > 0 && (
        <section className="phone-body" aria-label={t('order.yours')}>
          <p className="soft">{t('order.least')}</p>
          <ol className="stack tight">
            {order.map((position, i) => (
              <li key={position} className="row wrap" style={{ justifyContent: 'space-between' }}>
                <Code code={codeOf(position)} size="s" label={t('common.codeWord')} />
                <span className="row">
                  <button type="button" className="btn" disabled={isClosed || i === 0} aria-label={t('order.less', { code: spoken(position) })} onClick={() => move(position, -1)}>↑</button>
                  <button type="button" className="btn" disabled={isClosed || i === order.length - 1} aria-label={t('order.more', { code: spoken(position) })} onClick={() => move(position, 1)}>↓</button>
                </span>
              </li>
            ))}
          </ol>
          <p className="soft">{t('order.most')}</p>
        </section>
      )}
      <p className="rest"><span><b>{t('pick.order')}</b><br /><span className="soft">{t('order.again')}</span></span></p>
      <footer className="foot-bar">
        <Trouble state={state} store={store} joinKey={sheet.joinKey} place={place} go={go} />
        <p className="say" role="status">{isWhole ? t('order.whole') : t('order.tap', { n: glasses.length - order.length })}</p>
        <button type="button" className="btn btn-main wide" disabled={!isWhole} onClick={onNext}>{t('pick.goOn')}</button>
      </footer>
    </>
  );
}
