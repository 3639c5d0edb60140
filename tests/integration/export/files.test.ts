import { beforeEach, describe, expect, it } from 'vitest';
import { readSheet } from 'read-excel-file/node';
import { ROLES } from '@/db/enums';
import { readAnswersCsv, readBundle, readWorkbook } from '@/lib/export/loaders';
import { abandonSession, closeSession, unsealSession } from '@/lib/sessions/lifecycle';
import { addCellar, addDraft, makeScene, openTasting, type Design, type Scene } from '../results/scene';

const DESIGN: Design = { method: 'profile', barrels: ['12', '31'], seats: 2, replicates: 1, lines: [{ name: 'Length', phase: 'after' }] };
const NONE = { withNames: false };
let scene: Scene;

beforeEach(() => {
  scene = makeScene(['12', '31']);
});

function unsealed(): string {
  const tasting = openTasting(scene, DESIGN);
  tasting.say(1, { kind: 'score', block: 1, position: 1, item: 1, value: 77 });
  tasting.say(1, { kind: 'comment', block: 1, position: 1, text: '=1+1\u0001 \u{1F347}' });
  closeSession(scene.as('leader'), tasting.sessionId, 'enough');
  unsealSession(scene.as('leader'), tasting.sessionId);
  return tasting.sessionId;
}

/** Every way out, with the same access. */
const waysOut = (access: ReturnType<Scene['as']>, id: string): (() => unknown)[] => [
  () => readAnswersCsv(access, id, NONE), () => readAnswersCsv(access, id, { withNames: true }), () => readWorkbook(access, id, NONE), () => readBundle(access, id),
];

describe('files before their time', () => {
  it('are refused in every state before unsealing, to every role', async () => {
    const open = openTasting(scene, DESIGN).sessionId;
    const closed = openTasting(scene, DESIGN).sessionId;
    closeSession(scene.as('leader'), closed, 'enough');
    const abandoned = openTasting(scene, DESIGN).sessionId;
    abandonSession(scene.as('leader'), abandoned, 'the power failed');
    for (const id of [addDraft(scene, DESIGN), open, closed, abandoned]) {
      for (const role of ROLES) {
        for (const way of waysOut(scene.as(role), id)) await expect(async () => way()).rejects.toMatchObject({ code: 'wrong_state', message: 'The results can be read after unsealing.' });
      }
    }
  });

  it('of another cellar are not found, as those of no session', async () => {
    const id = unsealed();
    const other = addCellar(scene.db, 'other', ['1']);
    for (const asked of [id, 'no-such-session']) {
      for (const way of waysOut(other.as('owner'), asked)) await expect(async () => way()).rejects.toMatchObject({ code: 'not_found' });
    }
  });
});

describe('files after unsealing', () => {
  it('bear the neutral title, and no name unless it is asked for', () => {
    const id = unsealed();
    const plain = readAnswersCsv(scene.as('winemaker'), id, NONE);
    expect(plain.name).toBe('wednesday-tasting-answers.csv');
    expect(plain.body.split('\r\n')[0]).toBe('\uFEFFseat,block,position,position_2,code,sample,sample_label,item,item_name,phase,kind,value,guess,text');
    expect(plain.body).toMatch(/\r\n1,1,1,,\d{3},[12],Barrel (12|31),1,Length,after,score,77,,\r\n/);
    expect(plain.body).toContain("\"'=1+1");
    expect(plain.body).not.toContain('Guest');
    expect(readAnswersCsv(scene.as('winemaker'), id, { withNames: true }).body).toContain('1,Guest 1,1,1');
  });

  it('as a workbook hold four sheets that a reader takes, words as words', async () => {
    const { body, name } = await readWorkbook(scene.as('panelist'), unsealed(), NONE);
    expect(name).toBe('wednesday-tasting-answers.xlsx');
    const sheet = (title: string) => readSheet(Buffer.from(body), title);
    const answers = await sheet('answers');
    expect(answers).toHaveLength(3);
    expect(answers[1]!.slice(0, 3)).toEqual([1, 1, 1]);
    expect(answers[2]!.at(-1)).toBe('=1+1 \u{1F347}');
    expect((await sheet('samples')).map((row) => row[1])).toEqual(['label', 'Barrel 12', 'Barrel 31']);
    expect((await sheet('seats'))[0]).toEqual(['seat', 'role', 'handed_in', 'left', 'answers', 'late']);
    const report = await sheet('report');
    expect(report.map((row) => row[0])).toEqual(expect.arrayContaining(['Aim', 'Method', 'Orders']));
    // Those who only taste read the neutral title, not the cellar's question.
    expect(JSON.stringify(report)).not.toContain('most bitter');
  });
});
