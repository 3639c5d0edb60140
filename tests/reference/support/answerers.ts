import { readdirSync } from 'node:fs';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { join } from 'node:path';
import type { Answerer } from '../answer/types';

/** The answering code of every case family: each NN-*.ts of `answer/`. */
export async function loadAnswerers(): Promise<Answerer[]> {
  const folder = fileURLToPath(new URL('../answer/', import.meta.url));
  const names = readdirSync(folder).filter((name) => /^\d\d-.*\.ts$/.test(name)).sort();
  const modules = await Promise.all(
    names.map((name) => import(/* @vite-ignore */ pathToFileURL(join(folder, name)).href) as Promise<{ answers: Answerer[] }>),
  );
  return modules.flatMap((module) => module.answers);
}
