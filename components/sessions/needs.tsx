'use client';

import { useEffect, useState } from 'react';
import { CHANCE, minimumCorrect } from '@/stats';

interface Numbers {
  glasses: number;
  perSampleMl: number;
  minutes: number;
  short: string[];
  triangle: { n: number; needed: number | null } | null;
}

function count(form: HTMLFormElement, pulls: { value: string; label: string; volumeMl: number }[]): Numbers {
  const data = new FormData(form);
  const number = (name: string) => Number(data.get(name)) || 0;
  const chosen = data.getAll('pulls').map(String);
  const isTriangle = data.get('method') === 'triangle';
  const seats = number('seatsPlanned') + number('reservesPlanned');
  const samples = chosen.length + (data.get('controlLabel') ? 1 : 0);
  const perSeat = isTriangle ? 3 * number('replicates') : samples * number('replicates');
  // In a triangle each sample is served in half of the glasses; one glass more is poured to be sure.
  const perSample = isTriangle ? Math.ceil((perSeat * seats) / 2) : seats * number('replicates');
  const perSampleMl = (perSample + 1) * number('servingVolumeMl');
  return {
    glasses: perSeat * seats,
    perSampleMl,
    minutes: Math.ceil((perSeat * (90 + number('restS') / (isTriangle ? 3 : 1))) / 60),
    short: pulls.filter((pull) => chosen.includes(pull.value) && pull.volumeMl < perSampleMl).map((pull) => pull.label),
    triangle: isTriangle ? { n: number('seatsPlanned') * number('replicates'), needed: neededOf(number('seatsPlanned') * number('replicates'), number('alpha')) } : null,
  };
}

function neededOf(n: number, alpha: number): number | null {
  if (n < 1 || n > 500 || alpha <= 0 || alpha >= 1) return null;
  return minimumCorrect(n, alpha, CHANCE.triangle);
}

/** What the design asks of the cellar, counted while it is filled in. */
export function Needs({ formId, pulls }: { formId: string; pulls: { value: string; label: string; volumeMl: number }[] }) {
  const [numbers, setNumbers] = useState<Numbers | null>(null);
  useEffect(() => {
    const form = document.getElementById(formId) as HTMLFormElement | null;
    if (!form) return;
    const update = () => setNumbers(count(form, pulls));
    update();
    form.addEventListener('input', update);
    return () => form.removeEventListener('input', update);
  }, [formId, pulls]);
  if (!numbers) return null;
  return (
    <div className="stack tight" aria-live="polite">
      <p><b>{numbers.glasses} glasses</b>, {numbers.perSampleMl} mL of each sample (one spare glass counted), about {numbers.minutes} minutes for each seat.</p>
      {numbers.triangle && numbers.triangle.needed !== null && <p>With {numbers.triangle.n} answers, {numbers.triangle.needed} must be right to show a difference.</p>}
      {numbers.triangle && numbers.triangle.n > 0 && numbers.triangle.needed === null && <p className="warn">So few answers can’t show a difference at this risk, however clear it is.</p>}
      {numbers.short.map((label) => <p key={label} className="warn">Too little was drawn: {label}.</p>)}
    </div>
  );
}
