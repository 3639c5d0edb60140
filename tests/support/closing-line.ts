import type { Reporter, TestModule } from 'vitest/node';

declare module 'vitest' {
  interface TaskMeta {
    /** What a reference test compared: cases and single values, and whether any differed. */
    compared?: { readonly of: string; readonly values: number; readonly differs: boolean };
  }
}

interface Sum {
  cases: number;
  values: number;
  wrong: number;
}

/** Prints, after everything else, how many reference cases and values a run compared. */
export default class ClosingLine implements Reporter {
  onTestRunEnd(modules: readonly TestModule[]): void {
    const sums = new Map<string, Sum>();
    for (const testModule of modules) {
      for (const test of testModule.children.allTests()) {
        const { compared } = test.meta();
        if (!compared) continue;
        const sum = sums.get(compared.of) ?? { cases: 0, values: 0, wrong: 0 };
        sum.cases += 1;
        sum.values += compared.values;
        if (compared.differs) sum.wrong += 1;
        sums.set(compared.of, sum);
      }
    }
    if (sums.size === 0) return;
    const say = (of: string, { cases, values, wrong }: Sum) => process.stdout.write(`${of}: ${cases} cases compared, ${values} values, ${wrong} cases with differences\n`);
    for (const [of, sum] of sums) say(of, sum);
    const all = [...sums.values()];
    const total = (part: keyof Sum) => all.reduce((sum, own) => sum + own[part], 0);
    say('Together', { cases: total('cases'), values: total('values'), wrong: total('wrong') });
  }
}
