'use client';

import { useState, type ReactNode } from 'react';
import { useSecondsLeft } from '@/components/phone/use-seconds-left';
import { useWords } from '@/components/i18n/words';
import type { MessageKey } from '@/lib/i18n/words';
import type { PullBarrel } from '@/lib/pulls/loaders';
import { EVAPORATION_S } from '@/lib/pulls/limits';
import type { PhonePull } from '@/lib/pulls/schema';
import { PullNote } from './pull-note';

export type PullFacts = Omit<PhonePull, 'opId' | 'vesselId' | 'pulledAt'>;

const STEPS = ['sanitise', 'evaporate', 'vent', 'draw', 'close', 'note'] as const;

type Step = (typeof STEPS)[number];

const WORDS: Record<Exclude<Step, 'note'>, MessageKey> = { sanitise: 'pull.sanitiseWords', evaporate: 'pull.evaporateWords', vent: 'pull.ventWords', draw: 'pull.drawWords', close: 'pull.closeWords' };
const CARE: Partial<Record<Step, MessageKey>> = { sanitise: 'pull.sanitiseCare', vent: 'pull.ventCare' };

interface Props {
  barrel: PullBarrel;
  onBack(): void;
  onKeep(facts: PullFacts): void;
}

/** The steps of a clean pull in their order; the wait for the alcohol can't be skipped. */
export function PullSteps({ barrel, onBack, onKeep }: Props) {
  const t = useWords();
  const [at, setAt] = useState(0);
  const [until, setUntil] = useState<number | null>(null);
  const [startedAt, setStartedAt] = useState<number | null>(null);
  const [waitedS, setWaitedS] = useState<number>(EVAPORATION_S.usual);
  const [hissed, setHissed] = useState(false);
  const [topped, setTopped] = useState(true);
  const step: Step = STEPS[at]!;
  const left = useSecondsLeft(until);
  const isWaiting = step === 'evaporate' && until !== null && left > 0;
  const canGoOn = step !== 'evaporate' || (until !== null && left <= EVAPORATION_S.usual - EVAPORATION_S.min);

  const startClock = () => {
    const now = Date.now();
    setStartedAt(now);
    setUntil(now + EVAPORATION_S.usual * 1000);
  };
  const onDone = () => {
    if (step === 'evaporate' && startedAt !== null) setWaitedS(Math.min(3600, Math.round((Date.now() - startedAt) / 1000)));
    setAt(at + 1);
    window.scrollTo(0, 0);
  };
  const facts = { evaporationS: Math.max(EVAPORATION_S.min, waitedS), isVented: true, isHissHeard: hissed, isToppedUp: topped };
  const back = <button type="button" className="btn" onClick={() => (at === 0 ? onBack() : setAt(at - 1))}>{t('pull.back')}</button>;
  return (
    <>
      <div className="bench">
        <div className="label">
          <div className="fields"><span>{barrel.lot}</span><span>{barrel.location || barrel.lotName}</span></div>
          <p className="told pull-name">{barrel.name}</p>
          <div className="foot"><span>{t('pull.stepOf', { n: at + 1, total: STEPS.length })}</span></div>
        </div>
      </div>
      {step === 'note' ? (
        <PullNote back={back} onKeep={(noted) => onKeep({ ...noted, ...facts })} />
      ) : (
        <>
          <div className="phone-body">
            <h1>{t(`pull.${step}`)}</h1>
            <p className="text-18">{t(WORDS[step], { n: EVAPORATION_S.usual })}</p>
            {CARE[step] && <p className="caution">{t(CARE[step])}</p>}
            {step === 'evaporate' && <Clock left={left} isRunning={until !== null} onStart={startClock} label={t('pull.timerLeft', { n: left })} start={t('pull.timer')} />}
            {step === 'vent' && <Tick isOn={hissed} onChange={setHissed}>{t('pull.hiss')}</Tick>}
            {step === 'close' && <Tick isOn={topped} onChange={setTopped}>{t('pull.topped')}</Tick>}
            <p className="hint">{t('pull.practice')}</p>
          </div>
          <footer className="foot-bar">
            <div className="acts">
              {back}
              <button type="button" className={`btn ${canGoOn ? 'btn-main' : 'btn-wait'}`} disabled={!canGoOn} onClick={onDone}>
                {isWaiting && !canGoOn ? t('pull.timerLeft', { n: left }) : step === 'evaporate' ? t('pull.isDry') : t('pull.doneStep')}
              </button>
            </div>
          </footer>
        </>
      )}
    </>
  );
}

function Clock({ left, isRunning, onStart, label, start }: { left: number; isRunning: boolean; onStart(): void; label: string; start: string }) {
  return isRunning ? <p className="pull-clock" role="timer" aria-label={label}>{left}</p> : <button type="button" className="btn btn-main wide" onClick={onStart}>{start}</button>;
}

function Tick({ isOn, onChange, children }: { isOn: boolean; onChange(isOn: boolean): void; children: ReactNode }) {
  return <label className="tick" style={{ padding: 0 }}><input type="checkbox" checked={isOn} onChange={(event) => onChange(event.target.checked)} />{children}</label>;
}
