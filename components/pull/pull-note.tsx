'use client';

import { useId, useState, type FormEvent, type ReactNode } from 'react';
import { useWords } from '@/components/i18n/words';
import { DRAW_METHODS, type DrawMethod } from '@/db/enums';
import { TEMPERATURE_C, VOLUME_ML } from '@/lib/pulls/limits';
import type { PullFacts } from './pull-steps';

type Noted = Pick<PullFacts, 'drawMethod' | 'volumeMl' | 'temperatureC' | 'colour' | 'note'>;

/** A number as typed in any of the languages; null when there is none, NaN when it is not one. */
const typedNumber = (text: string): number | null => (text.trim() === '' ? null : Number(text.trim().replace(',', '.').replace('−', '-')));

const isWithin = (value: number, { min, max }: { min: number; max: number }) => Number.isFinite(value) && value >= min && value <= max;

/** The last step: how much, how warm, how it looks. */
export function PullNote({ back, onKeep }: { back: ReactNode; onKeep(noted: Noted): void }) {
  const t = useWords();
  const id = useId();
  const [method, setMethod] = useState<DrawMethod>('nail');
  const [volume, setVolume] = useState('100');
  const [temperature, setTemperature] = useState('');
  const [colour, setColour] = useState('');
  const [note, setNote] = useState('');
  const [isTried, setTried] = useState(false);
  const volumeMl = typedNumber(volume);
  const temperatureC = typedNumber(temperature);
  const isVolumeBad = volumeMl === null || !isWithin(volumeMl, VOLUME_ML) || !Number.isInteger(volumeMl);
  const isTemperatureBad = temperatureC !== null && !isWithin(temperatureC, TEMPERATURE_C);
  const onSubmit = (event: FormEvent) => {
    event.preventDefault();
    setTried(true);
    if (isVolumeBad || isTemperatureBad) return document.getElementById(isVolumeBad ? `${id}-volume` : `${id}-temperature`)?.focus();
    onKeep({ drawMethod: method, volumeMl: volumeMl!, temperatureC, colour: colour.trim().slice(0, 60), note: note.trim().slice(0, 900) });
  };
  const bad = (isBad: boolean, name: string) => (isTried && isBad ? { 'aria-invalid': true, 'aria-describedby': `${id}-${name}-bad` } : {});
  return (
    <form onSubmit={onSubmit} noValidate style={{ display: 'contents' }}>
      <div className="phone-body">
        <h1>{t('pull.note')}</h1>
        <fieldset className="field">
          <legend className="legend">{t('pull.method')}</legend>
          <div className="row wrap">
            {DRAW_METHODS.map((value) => <label key={value} className="btn"><input type="radio" name={`${id}-method`} checked={method === value} onChange={() => setMethod(value)} /> {t(`pull.${value}`)}</label>)}
          </div>
        </fieldset>
        <div className="field">
          <label htmlFor={`${id}-volume`}>{t('pull.volume')}</label>
          <input id={`${id}-volume`} className="input" inputMode="numeric" autoComplete="off" value={volume} onChange={(event) => setVolume(event.target.value)} {...bad(isVolumeBad, 'volume')} />
          {isTried && isVolumeBad && <p className="error" id={`${id}-volume-bad`}>{t('pull.volumeBad')}</p>}
        </div>
        <div className="field">
          <label htmlFor={`${id}-temperature`}>{t('pull.temperature')}</label>
          <input id={`${id}-temperature`} className="input" inputMode="decimal" autoComplete="off" value={temperature} onChange={(event) => setTemperature(event.target.value)} {...bad(isTemperatureBad, 'temperature')} />
          {isTried && isTemperatureBad && <p className="error" id={`${id}-temperature-bad`}>{t('pull.temperatureBad')}</p>}
        </div>
        <div className="field">
          <label htmlFor={`${id}-colour`}>{t('pull.colour')}</label>
          <input id={`${id}-colour`} className="input" autoComplete="off" maxLength={60} value={colour} onChange={(event) => setColour(event.target.value)} />
        </div>
        <div className="field">
          <label htmlFor={`${id}-note`}>{t('pull.remark')}</label>
          <textarea id={`${id}-note`} className="input" rows={3} maxLength={900} value={note} onChange={(event) => setNote(event.target.value)} />
        </div>
        <p className="hint">{t('pull.photoPlace')}</p>
      </div>
      <footer className="foot-bar"><div className="acts">{back}<button className="btn btn-main">{t('pull.keep')}</button></div></footer>
    </form>
  );
}
