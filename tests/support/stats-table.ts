import { readdirSync, readFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import ts from 'typescript';

/** One exported function or constant of stats/. */
export interface StatsEntry {
  readonly name: string;
  /** Folder and file it stands in. */
  readonly subject: string;
  readonly file: string;
  /** The docstring's own text, and the same with its tags' text, each in one line. */
  readonly docs: string;
  readonly allDocs: string;
  /** Tests that use it, by path below tests/. */
  readonly tests: readonly string[];
}

/** Every value (not type) that stats/index.ts exports, with its docstring and the tests that name it. */
export function statsEntries(root: string): StatsEntry[] {
  const index = join(root, 'stats/index.ts');
  const program = ts.createProgram([index], { module: ts.ModuleKind.ESNext, moduleResolution: ts.ModuleResolutionKind.Bundler, target: ts.ScriptTarget.ES2022, skipLibCheck: true, noLib: true });
  const checker = program.getTypeChecker();
  const source = program.getSourceFile(index)!;
  const tests = testFiles(root);
  return checker
    .getExportsOfModule(checker.getSymbolAtLocation(source)!)
    .map((symbol) => (symbol.flags & ts.SymbolFlags.Alias ? checker.getAliasedSymbol(symbol) : symbol))
    .filter((symbol) => (symbol.flags & ts.SymbolFlags.Value) !== 0)
    .map((symbol) => {
      const file = relative(join(root, 'stats'), symbol.declarations![0].getSourceFile().fileName);
      return {
        name: symbol.name,
        subject: file.includes('/') ? file.slice(0, file.indexOf('/')) : 'errors',
        file,
        ...docsOf(symbol),
        tests: tests.filter(({ text }) => new RegExp(`\\b${symbol.name}\\b`).test(text)).map(({ path }) => path),
      };
    })
    .sort((x, y) => x.subject.localeCompare(y.subject) || x.name.localeCompare(y.name));
}

function docsOf(symbol: ts.Symbol): Pick<StatsEntry, 'docs' | 'allDocs'> {
  const oneLine = (text: string) => text.replaceAll(/\{@link (\w+) ?\}/g, '$1').replaceAll(/\s+/g, ' ').trim();
  const text = ts.displayPartsToString(symbol.getDocumentationComment(undefined));
  const tags = symbol.getJsDocTags().map(({ text: parts }) => ts.displayPartsToString(parts));
  return { docs: oneLine(text), allDocs: oneLine([text, ...tags].join('\n')) };
}

function testFiles(root: string): { path: string; text: string }[] {
  return ['tests/reference', 'tests/unit/stats'].flatMap((folder) =>
    (readdirSync(join(root, folder), { recursive: true }) as string[])
      .filter((name) => name.endsWith('.ts') && !name.includes('support/') && !name.endsWith('readme.test.ts'))
      .map((name) => ({ path: join(folder, name), text: readFileSync(join(root, folder, name), 'utf8') })),
  );
}

/** Up to the first full stop that ends a sentence. */
const firstSentence = (docs: string): string => /^.*?[.!](?=\s+\p{Lu}|\s*$)/su.exec(docs)?.[0] ?? docs;

const sourceOf = (docs: string): string => /\b(?:Sources?|Definitions?|Definition): (.+?)(?:$|(?=(?: Checked against| Throws)))/.exec(docs)?.[1] ?? (/Common practice[^.]*\./.exec(docs)?.[0] ?? '');

const cell = (text: string): string => text.replaceAll('|', '\\|');

/** "reference 05" for the answering code of a family, the file's name for a unit test. */
const testName = (path: string): string =>
  path.startsWith('tests/reference/answer/')
    ? `reference ${path.slice('tests/reference/answer/'.length, -'.ts'.length).slice(0, 2)}`
    : path.startsWith('tests/reference/worked/')
      ? 'worked examples'
      : path.slice('tests/unit/stats/'.length).replace('.test.ts', '');

/** The README's text from the entries. */
export function statsReadme(entries: readonly StatsEntry[]): string {
  const subjects = [...new Set(entries.map(({ subject }) => subject))];
  const lines = [
    '# Statistics',
    '',
    'Pure functions on plain arrays: no input or output, no clock, no random numbers but from a seed or a draw that is passed in. `index.ts` is the one public face. Each function throws a `StatsError` with a plain sentence on input it can’t answer for.',
    '',
    'This table is made from the docstrings and the tests by `npm run stats:readme`; a test fails when it is stale. “Reference” is a family of `tests/reference/cases`, whose README names the outside values; other names are files of `tests/unit/stats`.',
  ];
  for (const subject of subjects) {
    lines.push('', `## ${subject}`, '', '| Name | What it computes | Source | Checked by |', '| --- | --- | --- | --- |');
    for (const { name, docs, allDocs, tests, subject: own } of entries) {
      if (own !== subject) continue;
      lines.push(`| \`${name}\` | ${cell(firstSentence(docs))} | ${cell(sourceOf(allDocs))} | ${[...new Set(tests.map(testName))].join(', ')} |`);
    }
  }
  return `${lines.join('\n')}\n`;
}
