import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'vite';
import { expect, it } from 'vitest';

/*
 * `npm run bench:stats`: the whole analysis of a study, beside the same in R where Rscript is present
 * (stats.R). Medians of five after one warm-up, each timed inside its own process.
 */
const here = (name: string) => fileURLToPath(new URL(name, import.meta.url));
const ms = (value: number): string => `${value.toFixed(value < 10 ? 2 : 1)} ms`;
const say = (line: string): void => void process.stdout.write(`${line}\n`);

interface Ours {
  medians: Record<'whole' | 'grown' | 'mixed' | 'mixedGrown' | 'curve', number>;
  csv: string;
}

async function inNode(folder: string): Promise<Ours> {
  await build({
    configFile: false,
    logLevel: 'error',
    resolve: { alias: { '@': here('../..').replace(/\/$/, '') } },
    ssr: { noExternal: true },
    build: { ssr: here('./stats-run.ts'), outDir: folder, minify: false, emptyOutDir: false },
  });
  return JSON.parse(execFileSync(process.execPath, [join(folder, 'stats-run.js')], { encoding: 'utf8', maxBuffer: 1e8 })) as Ours;
}

function inR(folder: string, csv: string): Record<string, number> | null {
  const file = join(folder, 'study.csv');
  writeFileSync(file, csv);
  const { status, stdout, stderr } = spawnSync('Rscript', [here('./stats.R'), file], { encoding: 'utf8' });
  if (status === null) return null;
  if (status !== 0) throw new Error(stderr);
  return Object.fromEntries([...stdout.matchAll(/^(\w+) ([\d.e-]+)/gm)].map(([, name, seconds]) => [name, 1000 * Number(seconds)]));
}

it('the whole analysis, its growth, the mixed model and power curves', { timeout: 600_000 }, async () => {
  const folder = mkdtempSync(join(tmpdir(), 'tercet-bench-'));
  writeFileSync(join(folder, 'package.json'), '{"type":"module"}');
  try {
    const { medians, csv } = await inNode(folder);
    const { whole, grown, mixed, mixedGrown, curve } = medians;
    say(`whole analysis, 12 assessors x 10 samples x 3 replicates x 30 descriptors: ${ms(whole)}`);
    say(`the same with 120 assessors: ${ms(grown)}, ${(grown / whole).toFixed(1)} times as long for 10 times the scores`);
    say(`mixed model with Satterthwaite, means and pairs, 30 descriptors: ${ms(mixed)}; 120 assessors: ${ms(mixedGrown)}`);
    say(`power curve, n = 3 to 200: ${ms(curve)}`);
    const r = inR(folder, csv);
    if (r) {
      say(`R, aov with Error strata: ${ms(r.aov)}, ${(r.aov / whole).toFixed(1)} times ours (goal 20)`);
      say(`R, closed forms: ${ms(r.closed)}, ${(r.closed / whole).toFixed(1)} times ours (goal 10)`);
      if (r.mixed) say(`R, lmerTest with emmeans: ${ms(r.mixed)}, ${(r.mixed / mixed).toFixed(1)} times ours (goal 50)`);
      else say('R has no lmerTest or emmeans: the mixed model is not compared');
    } else say('Rscript is not here: nothing is compared');
    expect(curve).toBeLessThan(5);
    expect(grown).toBeLessThan(13 * whole);
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
});
