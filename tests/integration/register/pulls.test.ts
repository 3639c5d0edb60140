import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { fills, pulls } from '@/db/schema';
import { takePulls } from '@/lib/pulls/mutations';
import type { PhonePull } from '@/lib/pulls/schema';
import { makeScene, type Scene } from '../blind/scene';

let scene: Scene;
let vesselId: string;
beforeEach(async () => {
  scene = await makeScene([0, 1, 2], 3);
  vesselId = scene.db.select().from(fills).where(eq(fills.cellarId, scene.cellarId)).all()[0]!.vesselId;
});

const pull = (over: Partial<PhonePull> = {}): PhonePull => ({
  opId: randomUUID(), vesselId, pulledAt: Date.now() - 3_600_000, drawMethod: 'nail', volumeMl: 120, temperatureC: 13.5, evaporationS: 62, isVented: true, isHissHeard: true, isToppedUp: false, colour: 'brick', note: 'a little hiss', ...over,
});
const kept = (opId: string) => scene.db.select().from(pulls).where(eq(pulls.id, opId)).all();

describe('pulls of a phone', () => {
  it('are recorded with the hour at which they were drawn, and once however often they come', () => {
    const first = pull();
    expect(takePulls(scene.access('ines'), [first])).toEqual({ protocol: 1, received: [first.opId], refused: [] });
    expect(takePulls(scene.access('ines'), [first, first]).received).toEqual([first.opId, first.opId]);
    expect(kept(first.opId)).toMatchObject([{ volumeMl: 120, temperatureC: 13.5, evaporationS: 62, isHissHeard: true, isToppedUp: false, note: 'Colour: brick. a little hiss', pulledBy: scene.access('ines').user.id }]);
    expect(kept(first.opId)[0]!.pulledAt.getTime()).toBe(first.pulledAt);
  });

  it('with a known id and other content are refused, and the first stays', () => {
    const first = pull();
    takePulls(scene.access('ines'), [first]);
    const other = scene.db.select().from(fills).where(eq(fills.cellarId, scene.cellarId)).all().find((fill) => fill.vesselId !== vesselId)!.vesselId;
    const changes: Partial<PhonePull>[] = [{ volumeMl: 900 }, { isToppedUp: true }, { evaporationS: 30 }, { colour: 'amber' }, { vesselId: other }];
    for (const change of changes) expect(takePulls(scene.access('ines'), [{ ...first, ...change }]).refused, JSON.stringify(change)).toHaveLength(1);
    expect(kept(first.opId)[0]!.volumeMl).toBe(120);
  });

  it('from a barrel that is not here are refused one by one, and the others count', () => {
    const [bad, good] = [pull({ vesselId: randomUUID() }), pull()];
    expect(takePulls(scene.access('ines'), [bad, good])).toMatchObject({ received: [good.opId], refused: [{ opId: bad.opId }] });
  });

  it('from a clock that runs ahead are not of tomorrow', () => {
    const ahead = pull({ pulledAt: Date.now() + 86_400_000 });
    takePulls(scene.access('ines'), [ahead]);
    expect(kept(ahead.opId)[0]!.pulledAt.getTime()).toBeLessThan(Date.now() + 10 * 60_000);
  });
});
