'use client';

import { useId, useState } from 'react';
import { useWords } from '@/components/i18n/words';
import { Scanner } from '@/components/scan/camera';
import type { PullState } from '@/lib/offline/pull-store';
import type { PullBarrel } from '@/lib/pulls/loaders';

/** More barrels than this are found by typing. */
const SHOWN = 30;

interface Props {
  barrels: readonly PullBarrel[];
  state: PullState;
  onChoose(barrel: PullBarrel): void;
}

/** Which barrel: by its tag, or by name. */
export function ChooseBarrel({ barrels, state, onChoose }: Props) {
  const t = useWords();
  const fieldId = useId();
  const [typed, setTyped] = useState('');
  const [isWrong, setWrong] = useState(false);
  const words = typed.toLowerCase().split(/\s+/).filter(Boolean);
  const found = barrels.filter((barrel) => words.every((word) => `${barrel.name} ${barrel.lot} ${barrel.lotName} ${barrel.location}`.toLowerCase().includes(word)));
  const onCode = (text: string) => {
    const barrel = barrels.find((candidate) => text.endsWith(`#${candidate.vesselId}`));
    setWrong(!barrel);
    if (barrel) onChoose(barrel);
  };
  if (barrels.length === 0) return <div className="phone-body"><h1>{t('pull.title')}</h1><p>{t('pull.noBarrels')}</p></div>;
  return (
    <div className="phone-body">
      <h1>{t('pull.title')}</h1>
      <p className="soft">{t('pull.offlineNote')}</p>
      <Scanner onCode={onCode} words={{ start: t('pull.scan'), stop: t('pull.scanStop'), none: t('pull.scanNone'), picture: t('pull.scanPicture') }} />
      {isWrong && <p className="warn" role="alert">{t('pull.scanWrong')}</p>}
      <div className="field">
        <label htmlFor={fieldId}>{t('pull.choose')}</label>
        <input id={fieldId} className="input" type="search" autoComplete="off" value={typed} onChange={(event) => setTyped(event.target.value)} />
      </div>
      <ul className="stack tight">
        {found.slice(0, SHOWN).map((barrel) => (
          <li key={barrel.vesselId}>
            <button type="button" className="btn wide" style={{ justifyContent: 'space-between' }} onClick={() => onChoose(barrel)}>
              <b>{barrel.name}</b><span className="soft">{barrel.lot} {barrel.location}</span>
            </button>
          </li>
        ))}
      </ul>
      {found.length > SHOWN && <p className="hint">{t('pull.more', { n: found.length - SHOWN })}</p>}
      {state.rows.length > 0 && (
        <section className="stack tight">
          <h2>{t('pull.today')}</h2>
          <ul className="stack tight">
            {state.rows.slice(0, 12).map((row) => (
              <li key={row.opId} className="apart">
                <span><b>{row.barrel}</b> {row.lot} <span className="hint">{new Intl.DateTimeFormat(t.locale, { dateStyle: 'short', timeStyle: 'short' }).format(row.pull.pulledAt)}</span></span>
                <span className="soft">{row.state === 'received' ? t('kept.received') : row.state === 'refused' ? t('kept.refused') : t('kept.onPhone')}</span>
              </li>
            ))}
          </ul>
        </section>
      )}
    </div>
  );
}
