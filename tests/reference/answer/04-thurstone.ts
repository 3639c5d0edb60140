import { dPrime, proportionCorrect, psychometricSlope, type ThurstoneProtocol } from '@/stats';
import type { Answerer } from './types';

const PROTOCOLS: Record<string, ThurstoneProtocol> = { triangle: 'triangle', duotrio: 'duo_trio', twoafc: 'two_afc', threeafc: 'three_afc', tetrad: 'tetrad' };

type Rows = Record<string, (number | string)[]>;
const finite = (x: number): number | null => (Number.isFinite(x) ? x : null);

export const answers: Answerer[] = [
  {
    matches: (c) => c.file.startsWith('04') && 'd_prime' in c.inputs,
    answer(c) {
      const at = c.inputs.d_prime as number[];
      return {
        by_method: Object.fromEntries(
          Object.entries(PROTOCOLS).map(([name, protocol]) => [name, { d_prime: at, pc: at.map((d) => proportionCorrect(protocol, d)), slope: at.map((d) => psychometricSlope(protocol, d)) }]),
        ),
      };
    },
  },
  {
    matches: (c) => c.file.startsWith('04') && 'method' in ((c.given as { rows?: Rows } | undefined)?.rows ?? {}),
    answer(c) {
      const { rows } = c.given as { rows: Rows };
      const all = rows.x!.map((x, i) => ({ ...dPrime({ protocol: PROTOCOLS[String(rows.method![i])]!, correct: Number(x), n: Number(rows.n![i]) }), pc: Number(x) / Number(rows.n![i]) }));
      return {
        rows: {
          ...rows,
          pc: all.map((a) => a.pc),
          d_prime: all.map((a) => finite(a.dPrime)),
          d_prime_infinite: all.map((a) => a.dPrime === Infinity),
          se_delta: all.map((a) => a.standardError),
          lik95_lower_pc: all.map((a) => a.likelihoodPc.lower),
          lik95_upper_pc: all.map((a) => a.likelihoodPc.upper),
          lik95_lower: all.map((a) => a.likelihood.lower),
          lik95_upper: all.map((a) => finite(a.likelihood.upper)),
          lik95_upper_infinite: all.map((a) => a.likelihood.upper === Infinity),
          p_difference: all.map((a) => a.p),
          cp95_lower: all.map((a) => finite(a.exact.lower)),
          cp95_upper: all.map((a) => finite(a.exact.upper)),
        },
      };
    },
  },
];
