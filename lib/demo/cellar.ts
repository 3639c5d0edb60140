import 'server-only';
import type { Tx } from '@/db/client';
import { cellars, fills, lots, membershipRoles, memberships, pulls, users, vessels } from '@/db/schema';
import { newId } from '../ids';
import { fillLexicon } from '../lexicon/fill';
import { dayIn } from '../time';
import { ESTATE, PEOPLE, type DemoPerson } from './people';
import { seeded } from './panel';
import { demoBarrels, LOTS } from './register';

export const DAY_MS = 86_400_000;

export interface DemoCellar {
  cellarId: string;
  userIds: Record<DemoPerson['key'], string>;
  /** The fill that each barrel holds now, by barrel. */
  fillOf: Map<string, string>;
}

export function insertPeople(tx: Tx, passwordHashes: Record<DemoPerson['key'], string>, at: Date): { cellarId: string; userIds: DemoCellar['userIds'] } {
  const cellarId = newId();
  tx.insert(cellars).values({ id: cellarId, ...ESTATE, isDemo: true, createdAt: at }).run();
  const userIds = {} as DemoCellar['userIds'];
  for (const person of PEOPLE) {
    const userId = newId();
    userIds[person.key] = userId;
    tx.insert(users).values({ id: userId, email: person.email, name: person.name, passwordHash: passwordHashes[person.key], createdAt: at }).run();
    tx.insert(memberships).values({ cellarId, userId, createdAt: at }).run();
    for (const role of person.roles) tx.insert(membershipRoles).values({ cellarId, userId, role }).run();
  }
  fillLexicon(tx, cellarId);
  return { cellarId, userIds };
}

/** Lots, barrels with their earlier and present fills, and months of pulls before `today`. */
export function insertRegister(tx: Tx, cellarId: string, userIds: DemoCellar['userIds'], today: Date): Pick<DemoCellar, 'fillOf'> {
  const daysAgo = (days: number) => new Date(today.getTime() - days * DAY_MS);
  const day = (days: number) => dayIn(daysAgo(days), ESTATE.timeZone);
  const year = Number(day(0).slice(0, 4));
  const chance = seeded(20_260_513);

  const lotIds = new Map<string, string>();
  for (const lot of LOTS) {
    const id = newId();
    const vintage = year - lot.yearsBack;
    lotIds.set(lot.code, id);
    tx.insert(lots).values({ id, cellarId, code: lot.code.replace('%', String(vintage % 100)), name: lot.name, drink: lot.drink, vintage, note: lot.note, createdAt: daysAgo(420) }).run();
  }

  const fillOf = new Map<string, string>();
  demoBarrels().forEach((barrel, index) => {
    const vesselId = newId();
    const { yearsBack, lot, ...rest } = barrel;
    const row = String.fromCharCode(65 + Math.floor(index / 28));
    tx.insert(vessels).values({
      id: vesselId, cellarId, ...rest, year: year - yearsBack, location: `Row ${row}, tier ${1 + (index % 3)}`, createdAt: daysAgo(420),
    }).run();
    if (yearsBack >= 3) {
      tx.insert(fills).values({ id: newId(), cellarId, vesselId, lotId: lotIds.get('%-A')!, fromDay: day(900), toDay: day(330), createdAt: daysAgo(420) }).run();
    }
    const fillId = newId();
    fillOf.set(barrel.name, fillId);
    tx.insert(fills).values({ id: fillId, cellarId, vesselId, lotId: lotIds.get(lot)!, fromDay: day(270), createdAt: daysAgo(270) }).run();
    // Barrels of a story are drawn monthly, the rest now and then.
    const rhythm = TASTED_OFTEN.has(barrel.name) ? 28 : 55 + (index % 5) * 17;
    for (let ago = 230 - (index % 9); ago >= 2; ago -= rhythm) {
      const id = newId();
      const at = new Date(daysAgo(ago).getTime() + Math.round(chance.uniform() * 3 * 3_600_000));
      tx.insert(pulls).values({
        id, cellarId, fillId, pulledAt: at, pulledBy: userIds.bram, drawMethod: index % 4 === 0 ? 'nail' : 'thief', volumeMl: 300,
        temperatureC: Math.round((12.5 + chance.uniform() * 2) * 10) / 10, isSanitised: true, evaporationS: 60, isVented: true,
        isHissHeard: barrel.name === '41' ? ago > 90 : true, isResealed: true, isToppedUp: true, toppedWith: 'the same lot, keg 2', isWiped: true,
        note: barrel.name === '41' && ago < 90 ? 'No hiss at the bung; slight film.' : '', createdAt: at,
      }).run();
    }
  });
  return { fillOf };
}

/** One clean pull for a tasting. @returns its id */
export function insertPull(tx: Tx, cellar: Pick<DemoCellar, 'cellarId' | 'userIds' | 'fillOf'>, barrel: string, pulledAt: Date): string {
  const id = newId();
  tx.insert(pulls).values({
    id, cellarId: cellar.cellarId, fillId: cellar.fillOf.get(barrel)!, pulledAt, pulledBy: cellar.userIds.bram, drawMethod: 'thief', volumeMl: 700,
    temperatureC: 13.2, isSanitised: true, evaporationS: 60, isVented: true, isHissHeard: true, isResealed: true, isToppedUp: true,
    toppedWith: 'the same lot, keg 2', isWiped: true, createdAt: pulledAt,
  }).run();
  return id;
}

const TASTED_OFTEN = new Set(['5', '9', '10', '11', '12', '13', '18', '19', '31', '41', '47', '52', '62', '63', '64', '77']);
