import type { PourStep } from '@/db/enums';
import type { SessionRow } from '../sessions/find';
import type { MethodFacts } from '../methods/types';
import { showMoment } from '../time';
import { VESSEL_WORDS } from '../register/format';
import { ALLERGEN_WORDS } from '../seats/allergens';
import { count, DRAW_WORDS, listWords, showPercent } from './format';
import type { CountsView, EarlyOpeningView, ReportItem, SampleView } from './types';

function identity(sample: SampleView): string {
  const parts = sample.components.map((c) => {
    const share = sample.components.length > 1 ? `${showPercent(c.share)} ` : '';
    return `${share}${VESSEL_WORDS[c.vesselKind].toLowerCase()} ${c.vessel}, lot ${c.lot}, pulled ${c.pulledOn} ${DRAW_WORDS[c.drawMethod]}`;
  });
  const codes = sample.codes.length > 0 ? `; poured as ${listWords(sample.codes)}` : '';
  return `${sample.label}${sample.isControl ? ' (control)' : ''}${parts.length > 0 ? `: ${parts.join(' + ')}` : ''}${codes}`;
}

interface ReportQuestion {
  session: SessionRow;
  facts: MethodFacts;
  aim: string;
  frame: { leader: string; pourers: { name: string; step: PourStep }[]; commitment: string | null };
  samples: readonly SampleView[];
  counts: CountsView;
  early: readonly EarlyOpeningView[];
  timeZone: string;
  checkHref: string | null;
}

function panelWords(session: SessionRow, counts: CountsView): string {
  const missing = [
    counts.seatsEmpty.length > 0 && `nobody came to ${listWords(counts.seatsEmpty)}`,
    counts.seatsLeft.length > 0 && `${listWords(counts.seatsLeft)} left`,
    counts.seatsSilent.length > 0 && `${listWords(counts.seatsSilent)} answered nothing`,
  ].filter(Boolean) as string[];
  const whole = `${count(session.seatsPlanned, 'seat')} planned, ${counts.seatsTaken} taken, ${counts.seatsSubmitted} handed in`;
  return missing.length > 0 ? `${whole}; seats missing: ${missing.join('; ')}` : whole;
}

function pouredWords({ coding }: SessionRow, pourers: readonly { name: string; step: PourStep }[]): string {
  const nameOf = (step: PourStep) => listWords(pourers.filter((person) => person.step === step).map((person) => person.name)) || 'nobody';
  if (coding === 'two_step') return `${nameOf('letters')} filled lettered bottles and saw no code; ${nameOf('codes')} marked letters with codes and saw no barrel. Neither knew the key, and both may have tasted`;
  return pourers.length > 0 ? `${nameOf('key')}: read the key before unsealing and did not taste` : 'nobody was named to read the key';
}

/** The items that a report of the test owes (ISO 4120 and ISO 13299 in outline), and what was not recorded. */
export function reportItems({ session, facts, aim, frame, samples, counts, early, timeZone, checkHref }: ReportQuestion): ReportItem[] {
  const when = (at: Date | null) => (at ? showMoment(at, timeZone) : 'not');
  const items: (ReportItem | false)[] = [
    { name: 'Aim', text: aim },
    { name: 'Method', text: facts.reportName },
    ...samples.map((sample) => ({ name: sample.isControl ? 'Control' : 'Sample', text: identity(sample) })),
    { name: 'Panel', text: panelWords(session, counts) },
    { name: facts.unit === 'glass' ? 'Replicates' : 'Sets each', text: String(session.replicates) },
    { name: 'Risk', text: `alpha ${showPercent(session.alpha)}, chosen before serving` },
    { name: 'Scale', text: facts.scale },
    { name: 'Orders', text: facts.orders },
    { name: 'Serving', text: [session.servingTemperatureC !== null ? `${session.servingTemperatureC} °C` : 'temperature not recorded', `${session.servingVolumeMl} mL`, `${session.restS} s rest between glasses`, 'spit'].join(', ') },
    { name: 'Instruction', text: session.instruction },
    { name: 'Declared', text: session.allergens.length > 0 ? session.allergens.map((a) => ALLERGEN_WORDS[a]).join(', ') : 'no allergen' },
    { name: 'Times', text: `sealed ${when(session.sealedAt)}; opened ${when(session.openedAt)}; closed ${when(session.closedAt)}; unsealed ${when(session.unsealedAt)}` },
    { name: 'Leader', text: frame.leader },
    { name: session.coding === 'two_step' ? 'Two-step coding' : 'Poured by', text: pouredWords(session, frame.pourers) },
    { name: 'Answers', text: `${counts.counted} counted, ${counts.unanswered} not given, ${counts.cleared} taken back, ${counts.replaced} changed before close (earlier values are kept), ${counts.late} late and set aside` },
    session.closeReason !== null && { name: 'Closed early', text: session.closeReason },
    ...early.map((opening) => ({ name: 'Early opening', text: `${opening.scope}, asked by ${opening.requestedBy} on ${opening.requestedOn}: ${opening.reason}. ${opening.decision}` })),
    frame.commitment !== null && { name: 'Commitment', text: frame.commitment, ...(checkHref && { href: checkHref }) },
    { name: 'Not recorded', text: 'room and light, panelists’ training, whether they tasted at one time or in turn' },
  ];
  return items.filter((item) => item !== false);
}
