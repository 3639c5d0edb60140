'use client';

import { useEffect, useState } from 'react';
import { glassesPerBlock, type MethodFacts } from '@/lib/methods/types';
import { minimumCorrect } from '@/stats';

interface Numbers {
  glasses: number;
  perSampleMl: number;
  minutes: number;
  short: string[];
  choice: { n: number; needed: number | null } | null;
}

function count(form: HTMLFormElement, pulls: { value: string; label: string; volumeMl: number }[], facts: MethodFacts): Numbers {
  const data = new FormData(form);
  const number = (name: string) => Number(data.get(name)) || 0;
  const chosen = data.getAll('pulls').map(String);
  const seats = number('seatsPlanned') + number('reservesPlanned');
  const samples = chosen.length + (data.get('controlLabel') ? 1 : 0);
  const inBlock = glassesPerBlock(facts, samples);
  const perSeat = inBlock * number('replicates');
  // One glass more is poured to be sure.
  const perSample = Math.ceil(facts.glassesPerSample * seats * number('replicates'));
  const perSampleMl = (perSample + 1) * number('servingVolumeMl');
  return {
    glasses: perSeat * seats,
    perSampleMl,
    minutes: Math.ceil((perSeat * (90 + number('restS') / (facts.unit === 'set' ? Math.max(1, inBlock) : 1))) / 60),
    short: pulls.filter((pull) => chosen.includes(pull.value) && pull.volumeMl < perSampleMl).map((pull) => pull.label),
    choice: facts.chance === null ? null : { n: number('seatsPlanned') * number('replicates'), needed: neededOf(number('seatsPlanned') * number('replicates'), number('alpha'), facts.chance) },
  };
}

function neededOf(n: number, alpha: number, chance: number): number | null {
  if (n < 1 || n > 500 || alpha <= 0 || alpha >= 1) return null;
  return minimumCorrect(n, alpha, chance);
}

/** What the design asks of the cellar, counted while it is filled in. */
export function Needs({ formId, pulls, facts }: { formId: string; pulls: { value: string; label: string; volumeMl: number }[]; facts: MethodFacts }) {
  const [numbers, setNumbers] = useState<Numbers | null>(null);
  useEffect(() => {
    const form = document.getElementById(formId) as HTMLFormElement | null;
    if (!form) return;
    const update = () => setNumbers(count(form, pulls, facts));
    update();
    form.addEventListener('input', update);
    return () => form.removeEventListener('input', update);
  }, [formId, pulls, facts]);
  if (!numbers) return null;
  return (
    <div className="stack tight" aria-live="polite">
      <p><b>{numbers.glasses} glasses</b>, {numbers.perSampleMl} mL of each sample (one spare glass counted), about {numbers.minutes} minutes for each seat.</p>
      {numbers.choice && numbers.choice.needed !== null && <p>With {numbers.choice.n} answers, {numbers.choice.needed} must be right to show a difference.</p>}
      {numbers.choice && numbers.choice.n > 0 && numbers.choice.needed === null && <p className="warn">So few answers can’t show a difference at this risk, however clear it is.</p>}
      {numbers.short.map((label) => <p key={label} className="warn">Too little was drawn: {label}.</p>)}
    </div>
  );
}
