import { ALLERGEN_WORDS } from '@/lib/seats/allergens';
import { factsOf } from '@/lib/methods/facts';
import type { SessionView } from '@/lib/sessions/types';

/** What was planned, as a list of facts. Samples stand by label, never in the plan's order. */
export function DesignSummary({ session }: { session: SessionView }) {
  const { lines, flags, samples } = session;
  const facts = factsOf(session.method);
  return (
    <dl className="facts">
      <dt>Method</dt><dd>{facts.name}, {session.replicates} {facts.unit === 'set' ? (session.replicates === 1 ? 'set' : 'sets') : session.replicates === 1 ? 'time' : 'times'} for each seat</dd>
      {samples.length > 0 && <><dt>Samples</dt><dd>{samples.map((sample) => sample.label + (sample.isControl ? ' (control)' : '')).join(', ')}</dd></>}
      {lines.length > 0 && <><dt>Lines</dt><dd>{lines.map((line) => `${line.name} (${line.phase})`).join(', ')}</dd></>}
      {flags.length > 0 && <><dt>Faults</dt><dd>{flags.join(', ')}</dd></>}
      <dt>Seats</dt><dd>{session.seatsPlanned} and {session.reservesPlanned} in reserve</dd>
      <dt>Serving</dt><dd>{session.servingVolumeMl} mL{session.servingTemperatureC !== null && `, ${session.servingTemperatureC} °C`}, {session.restS} s rest</dd>
      <dt>Allergens</dt><dd>{session.allergens.map((allergen) => ALLERGEN_WORDS[allergen]).join(', ') || 'none declared'}</dd>
      <dt>Risk α</dt><dd>{session.alpha}</dd>
      <dt>Leader</dt><dd>{session.leader}</dd>
      <dt>Pourers</dt><dd>{session.pourers.join(', ') || 'nobody yet'}</dd>
      {session.scheduledFor && <><dt>When</dt><dd>{session.scheduledFor}</dd></>}
      <dt>They read</dt><dd>{session.instruction}</dd>
    </dl>
  );
}
