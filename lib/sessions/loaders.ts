import 'server-only';
import { getDb } from '@/db/client';
import { METHODS, SESSION_STATES, type Method } from '@/db/enums';
import { earlyOpenings, operations, seals, users } from '@/db/schema';
import { and, asc, count, eq } from 'drizzle-orm';
import encodeQR from 'qr';
import { loadAccess, type Access } from '../auth/access';
import { allows } from '../auth/permissions';
import { isTaster, stepOf } from '../blind/read-key';
import { methodOf } from '../methods';
import { factsOf, METHOD_FACTS } from '../methods/facts';
import { reach } from '../reach';
import { localInput, showMoment } from '../time';
import { designOf, listDescriptors, listMembers, listPullChoices, listSessionRows, namesInSession } from './data';
import { findSession, type SessionRow } from './find';
import { listMissing } from './readiness';
import type { DesignChoices, OpeningView, SessionListItem, SessionView } from './types';

/** A QR code as the address of a picture. */
export function qrPicture(text: string): string {
  const svg = encodeQR(text, 'svg', { border: 4, ecc: 'medium' });
  return `data:image/svg+xml;base64,${Buffer.from(svg).toString('base64')}`;
}

/** Of a ballot that is the whole lexicon the page names the beginning. */
const LINES_SHOWN = 60;

export const SESSION_SORTS = ['when', 'title', 'state', 'leader'] as const;
export type SessionSort = (typeof SESSION_SORTS)[number];

const timeOf = (session: SessionRow): number => (session.openedAt ?? session.scheduledFor ?? session.createdAt).getTime();
const SESSION_ORDER: Record<SessionSort, (a: Listed, b: Listed) => number> = {
  when: (a, b) => timeOf(b.session) - timeOf(a.session),
  title: (a, b) => a.session.title.localeCompare(b.session.title),
  state: (a, b) => SESSION_STATES.indexOf(a.session.state) - SESSION_STATES.indexOf(b.session.state),
  leader: (a, b) => a.leader.localeCompare(b.leader),
};
type Listed = ReturnType<typeof listSessionRows>[number];

export async function loadSessions(slug: string, query: string, state: string, sort: SessionSort): Promise<{ access: Access; items: SessionListItem[] }> {
  const access = await loadAccess(slug, 'session.list');
  const zone = access.cellar.timeZone;
  const mayDesign = allows(access.roles, 'session.design');
  const words = query.toLowerCase();
  const items = listSessionRows(getDb(), access.cellar.id)
    .filter(({ session }) => mayDesign || session.state !== 'draft')
    .filter(({ session }) => state === '' || session.state === state)
    .filter(({ session, leader }) => `${session.title} ${leader}`.toLowerCase().includes(words))
    .sort((a, b) => SESSION_ORDER[sort](a, b) || SESSION_ORDER.when(a, b) || SESSION_ORDER.title(a, b))
    .map(({ session, leader }) => ({
      id: session.id, title: session.title, method: session.method, state: session.state, leader,
      when: whenOf(session, zone),
    }));
  return { access, items };
}

function whenOf(session: SessionRow, zone: string): string {
  return showMoment(new Date(timeOf(session)), zone);
}

function listOpenings(access: Access, session: SessionRow): OpeningView[] {
  return getDb()
    .select()
    .from(earlyOpenings)
    .where(eq(earlyOpenings.sessionId, session.id))
    .orderBy(asc(earlyOpenings.requestedAt))
    .all()
    .map((row) => ({
      id: row.id, code: row.code, reason: row.reason, requestedBy: nameOf(row.requestedBy),
      requestedAt: showMoment(row.requestedAt, access.cellar.timeZone),
      state: row.approvedAt ? 'approved' as const : row.refusedAt ? 'refused' as const : 'waits' as const,
      approvedBy: row.approvedBy ? nameOf(row.approvedBy) : null,
      isOwnRequest: row.requestedBy === access.user.id,
      mayRead: row.approvedAt !== null && row.code !== null && (row.requestedBy === access.user.id || row.approvedBy === access.user.id),
    }));
}

/** A person's name by id: members, and those who were. */
const nameOf = (userId: string): string => getDb().select({ name: users.name }).from(users).where(eq(users.id, userId)).get()?.name ?? 'a former member';

/** A title or instruction that names what is in the glass gives the blind away. */
function neutralityWarnings(session: SessionRow): string[] {
  const text = ` ${session.title} ${session.instruction} `.toLowerCase();
  const given = namesInSession(getDb(), session.id).filter((name) => text.includes(` ${name.toLowerCase()} `) || text.includes(` ${name.toLowerCase()}.`) || text.includes(` ${name.toLowerCase()},`));
  return given.length > 0 ? [`Title or instruction holds “${given.join('”, “')}”: panelists read both.`] : [];
}

export async function loadSession(slug: string, sessionId: string): Promise<{ access: Access; session: SessionView }> {
  const access = await loadAccess(slug, 'session.list');
  const db = getDb();
  const row = findSession(db, access.cellar.id, sessionId);
  const zone = access.cellar.timeZone;
  const show = (at: Date | null) => (at ? showMoment(at, zone) : null);
  const design = designOf(db, row.id);
  const taster = isTaster(db, row.id, access.user.id);
  const mayDesign = allows(access.roles, 'session.design');
  const mayRun = allows(access.roles, 'session.run');
  const isJoinable = row.state === 'sealed' || row.state === 'open';
  const joinUrl = mayRun && isJoinable && row.joinKey ? `${reach().url}/j/${row.joinKey}` : null;
  const question = { sampleCount: design.samples.length, seatCount: row.seatsPlanned + row.reservesPlanned, replicates: row.replicates };
  const isDraft = row.state === 'draft';
  return {
    access,
    session: {
      id: row.id, version: row.version, title: row.title, instruction: row.instruction, method: row.method, state: row.state,
      privateQuestion: (mayDesign && !taster) || row.unsealedAt ? row.privateQuestion : null,
      leader: nameOf(row.leaderId),
      scheduledFor: show(row.scheduledFor),
      samples: mayDesign || row.unsealedAt ? design.samples.map(({ label, isControl }) => ({ label, isControl })).sort((a, b) => a.label.localeCompare(b.label, 'en', { numeric: true })) : [],
      lines: design.items.filter((item) => item.kind !== 'flag').slice(0, LINES_SHOWN).map(({ name, phase }) => ({ name, phase })),
      flags: design.items.filter((item) => item.kind === 'flag').map((item) => item.name),
      coding: row.coding,
      pourers: design.pourers.map((pourer) => (pourer.step === 'key' ? pourer.name : `${pourer.name} (${pourer.step})`)),
      seatsPlanned: row.seatsPlanned, reservesPlanned: row.reservesPlanned, replicates: row.replicates, alpha: row.alpha,
      servingTemperatureC: row.servingTemperatureC, servingVolumeMl: row.servingVolumeMl, restS: row.restS, allergens: row.allergens,
      joinCode: mayRun ? row.joinCode : null, joinUrl, joinQr: joinUrl ? qrPicture(joinUrl) : null,
      commitment: db.select({ commitment: seals.commitment }).from(seals).where(eq(seals.sessionId, row.id)).get()?.commitment ?? null,
      sealedAt: show(row.sealedAt), openedAt: show(row.openedAt), closedAt: show(row.closedAt), unsealedAt: show(row.unsealedAt),
      abandonedAt: show(row.abandonedAt), abandonReason: row.abandonReason, closeReason: row.closeReason,
      missing: isDraft ? listMissing(db, row) : [],
      warnings: isDraft ? [...neutralityWarnings(row), ...methodOf(row.method).warnings(question), ...(row.coding === 'two_step' && row.replicates > 1 ? ['Who marks letters with codes sees which codes come from one bottle: for that person the replicates are not hidden.'] : [])] : [],
      isPourer: stepOf(db, row.id, access.user.id) !== null, isTaster: taster,
      lateAnswers: db.select({ n: count() }).from(operations).where(and(eq(operations.sessionId, row.id), eq(operations.admission, 'late'))).get()!.n,
      openings: mayRun ? listOpenings(access, row) : [],
    },
  };
}

function designChoices(access: Access, chosenPulls: readonly string[]): DesignChoices {
  const db = getDb();
  const { id, timeZone } = access.cellar;
  const entries = listDescriptors(db, id);
  const scored = entries.filter((entry) => entry.sense !== 'fault');
  const families = [...new Set(scored.map((entry) => entry.family))];
  return {
    pulls: listPullChoices(db, id, chosenPulls).map((pull) => ({ value: pull.id, label: `${pull.kind} ${pull.vessel}, ${pull.lot}, drawn ${showMoment(pull.pulledAt, timeZone)}`, volumeMl: pull.volumeMl })),
    lexicon: families.map((family) => {
      const own = scored.filter((entry) => entry.family === family);
      return { family, sense: own[0]!.sense, entries: own.map((entry) => ({ value: `${entry.id}:${entry.phase}`, label: entry.name, phase: entry.phase })) };
    }),
    faults: entries.filter((entry) => entry.sense === 'fault').map((entry) => ({ value: entry.id, label: entry.name })),
    methods: Object.values(METHOD_FACTS),
    members: listMembers(db, id).map((member) => ({ value: member.id, label: member.name })),
  };
}

const NEW_SESSION = {
  coding: 'pourer',
  method: 'profile', seatsPlanned: 8, reservesPlanned: 2, replicates: 2, alpha: 0.05, servingVolumeMl: 30, restS: 60, allergens: ['sulfites'],
  instruction: 'Taste each glass by itself, in the order of the sheet. Spit, rinse and wait between glasses.',
};

/** The empty form of a new session, with the method that was chosen on the way. */
export async function loadNewDesign(slug: string, method?: string) {
  const access = await loadAccess(slug, 'session.design');
  return { access, choices: designChoices(access, []), defaults: { ...NEW_SESSION, ...(METHODS.includes(method as Method) && { method, replicates: factsOf(method as Method).unit === 'set' ? 1 : NEW_SESSION.replicates }), leaderId: access.user.id } as Record<string, unknown> };
}

/** The form of a draft; null once it is sealed. */
export async function loadDesign(slug: string, sessionId: string) {
  const access = await loadAccess(slug, 'session.design');
  const row = findSession(getDb(), access.cellar.id, sessionId);
  if (row.state !== 'draft') return null;
  const design = designOf(getDb(), row.id);
  const pullIds = design.samples.flatMap((sample) => sample.pullIds);
  const defaults: Record<string, unknown> = {
    method: row.method, title: row.title, instruction: row.instruction, privateQuestion: row.privateQuestion, leaderId: row.leaderId,
    scheduledFor: row.scheduledFor ? localInput(row.scheduledFor, access.cellar.timeZone) : '', pulls: pullIds,
    controlLabel: design.samples.find((sample) => sample.isControl)?.label ?? '',
    lines: design.items.filter((item) => item.kind === factsOf(row.method).items?.kind && factsOf(row.method).items?.from === 'chosen').map((item) => `${item.descriptorId}:${item.phase}`),
    flags: design.items.filter((item) => item.kind === 'flag').map((item) => item.descriptorId),
    seatsPlanned: row.seatsPlanned, reservesPlanned: row.reservesPlanned, replicates: row.replicates, alpha: row.alpha,
    servingTemperatureC: row.servingTemperatureC ?? '', servingVolumeMl: row.servingVolumeMl, restS: row.restS, allergens: row.allergens,
    coding: row.coding,
    pourers: design.pourers.filter((pourer) => pourer.step === 'key').map((pourer) => pourer.userId),
    letteredBy: design.pourers.find((pourer) => pourer.step === 'letters')?.userId ?? '',
    codedBy: design.pourers.find((pourer) => pourer.step === 'codes')?.userId ?? '',
  };
  return { access, choices: designChoices(access, pullIds), defaults, sessionId: row.id, version: row.version, title: row.title };
}
