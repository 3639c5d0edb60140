import { eq } from 'drizzle-orm';
import { unzipSync } from 'fflate';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Db } from '@/db/client';
import type { Method, Role } from '@/db/enums';
import { cellars, membershipRoles, sessions, users } from '@/db/schema';
import { accessOf, type Access } from '@/lib/auth/access';
import { fillDemo } from '@/lib/demo/fill';
import { readBundle } from '@/lib/export/loaders';
import { testDb } from '../../support/db';
import { alterAnswers, reproduce, unpack, whyNoR } from '../../support/reproduce';

if (whyNoR) console.warn(`The bundle's script is not run: ${whyNoR}.`);

let db: Db;
const finished = (method: Method) => db.select().from(sessions).where(eq(sessions.method, method)).all().find((row) => row.state === 'unsealed')!;

function as(role: Role): Access {
  const found = db.select({ user: users, slug: cellars.slug }).from(membershipRoles).innerJoin(users, eq(users.id, membershipRoles.userId))
    .innerJoin(cellars, eq(cellars.id, membershipRoles.cellarId)).where(eq(membershipRoles.role, role)).get()!;
  return accessOf({ ...found.user, signInId: '' }, found.slug)!;
}

const bundle = (method: Method) => readBundle(as('winemaker'), finished(method).id);

beforeAll(async () => {
  db = testDb();
  await fillDemo();
});

describe('the bundle of a demo session', () => {
  it.each(['profile', 'triangle'] as const)('of a %s has the same bytes each time, in any zone, and no name', (method) => {
    const zone = process.env.TZ;
    const first = bundle(method);
    process.env.TZ = 'Pacific/Auckland';
    const second = bundle(method);
    if (zone === undefined) delete process.env.TZ;
    else process.env.TZ = zone;
    expect(Buffer.from(first.body).equals(Buffer.from(second.body))).toBe(true);
    expect(first.name).toMatch(/^[a-z0-9-]+-reproduce\.zip$/);
    const files = unzipSync(first.body);
    expect(Object.keys(files)).toEqual(expect.arrayContaining(['README.txt', 'reproduce.R', 'figures.csv', 'data/answers.csv']));
    const words = Object.values(files).map((bytes) => new TextDecoder().decode(bytes)).join('\n');
    for (const { name } of db.select({ name: users.name }).from(users).all()) expect(words).not.toContain(name);
    const { privateQuestion } = finished(method);
    expect(words).not.toContain(privateQuestion);
  });
});

describe.skipIf(whyNoR)('the bundle’s script', () => {
  it.each(['profile', 'triangle'] as const)('computes every figure of a %s anew', (method) => {
    const { status, text, counts } = reproduce(unpack(bundle(method).body));
    expect(text).not.toMatch(/DIFFERS|NOT COMPUTED|Error|Warning/);
    expect({ status, ...counts }).toEqual({ status: 0, figures: counts.agree, agree: counts.agree, differ: 0, missing: 0, skipped: 0 });
    expect(counts.agree).toBeGreaterThan(method === 'profile' ? 500 : 15);
  });

  it('reads the bundle in a locale without UTF-8', () => {
    expect(reproduce(unpack(bundle('triangle').body), { LC_ALL: 'C' }).status).toBe(0);
  });

  it('ends with 1 when one score was altered', () => {
    const folder = unpack(bundle('profile').body);
    alterAnswers(folder, (cells, columns) => {
      const at = columns.indexOf('value');
      return cells[columns.indexOf('kind')] === 'score' ? cells.with(at, String(Number(cells[at]) < 50 ? Number(cells[at]) + 1 : Number(cells[at]) - 1)) : null;
    });
    const { status, counts } = reproduce(folder);
    expect(status).toBe(1);
    expect(counts.differ).toBeGreaterThan(0);
  });

  it('ends with 1 when one choice was altered', () => {
    const folder = unpack(bundle('triangle').body);
    alterAnswers(folder, (cells, columns) => {
      const at = columns.indexOf('position');
      return cells[columns.indexOf('kind')] === 'choice' && cells[columns.indexOf('guess')] === 'no' ? cells.with(at, String((Number(cells[at]) % 3) + 1)) : null;
    });
    expect(reproduce(folder).status).toBe(1);
  });

  it('ends with 1 when an answer is missing', () => {
    const folder = unpack(bundle('triangle').body);
    alterAnswers(folder, () => []);
    expect(reproduce(folder).status).toBe(1);
  });
});
