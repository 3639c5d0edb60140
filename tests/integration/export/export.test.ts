import Papa from 'papaparse';
import readXlsxFile from 'read-excel-file/node';
import { beforeAll, describe, expect, it } from 'vitest';
import { exportFile } from '@/lib/export/files';
import { toCsv } from '@/lib/export/csv';
import { closeSession, unsealSession } from '@/lib/sessions/lifecycle';
import { HAS_R, reproduce } from '../../support/reproduce';
import { addCellar, makeScene, openTasting, type Scene, type Tasting } from '../results/scene';

let scene: Scene;
let tasting: Tasting;
const text = (bytes: Uint8Array) => new TextDecoder().decode(bytes);
const codeOf = (work: Promise<unknown>) => work.then(() => 'ok', (error: { code?: string }) => error.code ?? String(error));

beforeAll(() => {
  scene = makeScene(['12', '31', '41']);
  tasting = openTasting(scene, { method: 'profile', barrels: ['12', '31', '41'], seats: 4, replicates: 2, lines: [{ name: 'Sour', phase: 'palate' }, { name: '=Length', phase: 'after' }, { name: 'Volatile', phase: 'nose', kind: 'flag' }] });
  const strength = [30, 45, 62];
  for (const seat of [1, 2, 3, 4]) {
    for (const block of [1, 2]) {
      for (const sample of [1, 2, 3]) {
        const position = tasting.positionOf(seat, block, sample);
        for (const item of [1, 2]) tasting.say(seat, { kind: 'score', block, position, item, value: strength[sample - 1]! + seat * 3 + block * 2 + ((seat * sample * item) % 5) });
      }
    }
  }
  tasting.say(1, { kind: 'fault', block: 1, position: 1, item: 3, isNoted: true });
  tasting.say(2, { kind: 'comment', block: 1, position: 2, text: '=HYPERLINK("http://x","y"), "quoted"\nand a new line' });
});

describe('files of a session', () => {
  it('are given to nobody before the key is open, nor to another cellar, nor under another name', async () => {
    for (const role of ['owner', 'leader', 'panelist'] as const) for (const file of ['answers.csv', 'answers.xlsx', 'reproduce.zip']) expect(await codeOf(exportFile(scene.as(role), tasting.sessionId, file))).toBe('wrong_state');
    closeSession(scene.as('leader'), tasting.sessionId, 'enough');
    unsealSession(scene.as('leader'), tasting.sessionId);
    expect(await codeOf(exportFile(addCellar(scene.db, 'other', ['1']).as('owner'), tasting.sessionId, 'answers.csv'))).toBe('not_found');
    for (const file of ['constructor', '__proto__', 'answers.pdf', '../answers.csv']) expect(await codeOf(exportFile(scene.as('owner'), tasting.sessionId, file))).toBe('not_found');
  });

  it('CSV holds every counted answer once, quoted as RFC 4180 asks, and no cell that a spreadsheet would run', async () => {
    const file = await exportFile(scene.as('owner'), tasting.sessionId, 'answers.csv');
    expect(file.name).toMatch(/^tasting-\d{4}-\d\d-\d\d-profile-[0-9a-f]{8}\.csv$/);
    const { data, errors } = Papa.parse<Record<string, string>>(text(file.body).replace(/^\ufeff/, ''), { header: true, skipEmptyLines: true });
    expect(errors).toEqual([]);
    expect(data.filter((row) => row.kind === 'line')).toHaveLength(4 * 2 * 3 * 2);
    const row = data.find((one) => one.kind === 'line' && one.seat === '3' && one.block === '2' && one.label === 'Barrel 41' && one.item === '1')!;
    expect(row).toMatchObject({ value: String(62 + 9 + 4 + ((3 * 3) % 5)), name: 'Sour', phase: 'palate', given: 'TRUE' });
    expect(data.find((one) => one.kind === 'comment')!.text).toBe('\'=HYPERLINK("http://x","y"), "quoted"\nand a new line');
    expect(data.find((one) => one.item === '2')!.name).toBe("'=Length");
    expect(text(file.body)).not.toMatch(/Guest|@/);
    expect(toCsv(['n'], [[-5], ['-5'], ['@x'], ['\t'], ['plain']])).toBe("\ufeffn\r\n-5\r\n'-5\r\n'@x\r\n'\t\r\nplain\r\n");
  });

  it('XLSX opens with the same numbers, as another library reads it', async () => {
    const file = await exportFile(scene.as('owner'), tasting.sessionId, 'answers.xlsx');
    const sheets = await readXlsxFile(Buffer.from(file.body));
    const rows = sheets.find((sheet) => sheet.sheet === 'answers')!.data;
    expect(rows).toHaveLength(1 + 48 + 2);
    const value = rows[0]!.indexOf('value');
    expect(rows.slice(1).filter((row) => row[rows[0]!.indexOf('kind')] === 'line').every((row) => typeof row[value] === 'number')).toBe(true);
    expect(sheets.map((sheet) => sheet.sheet)).toEqual(['answers', 'samples', 'report']);
  });

  it('the bundle is the same bytes each time; R agrees with it, and not with one whose answer was changed', { timeout: 60_000 }, async ({ skip }) => {
    const zip = (await exportFile(scene.as('owner'), tasting.sessionId, 'reproduce.zip')).body;
    expect((await exportFile(scene.as('winemaker'), tasting.sessionId, 'reproduce.zip')).body).toEqual(zip);
    if (!HAS_R) skip('Rscript is not installed');
    const whole = reproduce(zip);
    expect(whole.said).toMatch(/(\d+) of \1 figures agree/);
    expect(whole.status).toBe(0);
    const changed = reproduce(zip, (name, content) => (name === 'answers.csv' ? content.replace(/,line,1,Sour,palate,\d+/, ',line,1,Sour,palate,99') : content));
    expect(changed.status).toBe(1);
  });
});
