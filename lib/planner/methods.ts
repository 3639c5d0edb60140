import { DUO_TRIO_BALANCED_ORDERS, duoTrioConstantOrders, PAIR_ORDERS, TETRAD_ORDERS, TRIANGLE_ORDERS, TWO_OUT_OF_FIVE_ORDERS, type Order } from '@/stats';
import type { Method } from '@/db/enums';
import type { PlannedProtocol, UsualAndFewest } from './types';

/** What the chooser has to know of a method. */
export interface MethodNeeds {
  why: string;
  /** The orders of a test of two samples compared in one set; null where each sample stands in a glass of its own. */
  orders: readonly Order[] | null;
  /** Its discrimination test and sides, whose power gives the panel. */
  test: { protocol: PlannedProtocol; twoSided: boolean } | null;
  /** Panel where no power calculation gives it, or the least that practice asks for beside it. */
  practice: UsualAndFewest | null;
  /** Where `practice` comes from. */
  basis: string;
  /** How often each sample is tasted. */
  times: number;
  caution: string | null;
}

const COMMON = 'common practice';
const CONSUMERS = { practice: { usual: 100, fewest: 60 }, basis: 'sixty people at least, a hundred as a rule, who are not the staff (common practice)', caution: 'Ask people who drink such wine, never the trained panel.' };
const SET = { practice: null, basis: '', times: 1, caution: null };
const GLASSES = { orders: null, test: null, times: 1, caution: null };

/** The methods by key. Panels of a discrimination test are counted, the others are common practice. */
export const NEEDS_OF: Record<Method, MethodNeeds> = {
  triangle: { ...SET, orders: TRIANGLE_ORDERS, test: { protocol: 'triangle', twoSided: false }, why: 'Three glasses, two alike: nobody has to know what the difference is.' },
  tetrad: { ...SET, orders: TETRAD_ORDERS, test: { protocol: 'tetrad', twoSided: false }, why: 'Four glasses in two pairs: it needs far fewer people than a triangle for the same difference, and one glass more from each.' },
  duo_trio: { ...SET, orders: DUO_TRIO_BALANCED_ORDERS, test: { protocol: 'duo_trio', twoSided: false }, why: 'A reference and two glasses: the palate compares with one known glass, which is kinder with tannin.' },
  duo_trio_constant: { ...SET, orders: duoTrioConstantOrders(0), test: { protocol: 'duo_trio', twoSided: false }, why: 'The reference is always the wine that the panel knows, such as the untreated one.' },
  two_of_five: { ...SET, orders: TWO_OUT_OF_FIVE_ORDERS, test: { protocol: 'two_out_of_five', twoSided: false }, why: 'Guessing is right once in ten, so few people are enough.', caution: 'Five glasses tire the palate: it is mainly for look and touch (common practice). Its panel is counted as if as many people told the wines apart as in a triangle, which is hopeful.' },
  directional_pair: { ...SET, orders: PAIR_ORDERS, test: { protocol: 'two_afc', twoSided: true }, why: 'Two glasses and one named attribute: which has more of it? It finds the smallest differences.', caution: 'Counted for both directions. Say beforehand if only one can matter: fewer people are then enough.' },
  preference: { ...SET, ...CONSUMERS, orders: PAIR_ORDERS, test: { protocol: 'two_afc', twoSided: true }, why: 'Two glasses: which do they like better?' },
  ranking: { ...GLASSES, practice: { usual: 15, fewest: 12 }, basis: '12 to 15 selected panelists (ISO 8587:2006, 6.2)', why: 'All samples in one order on one named attribute: quick, and no scale has to be learnt.' },
  profile: { ...GLASSES, practice: { usual: 12, fewest: 8 }, basis: `8 to 12 trained panelists, each sample twice (${COMMON})`, times: 2, why: 'Lines by descriptor: what is in the glass, and how much of it, with the panel’s own error beside it.', caution: 'The panel must be trained on the words.' },
  category_profile: { ...GLASSES, practice: { usual: 12, fewest: 8 }, basis: `8 to 12 trained panelists, each sample twice (${COMMON})`, times: 2, why: 'The same in labelled steps: easier to teach than a line, a little coarser.', caution: 'The panel must be trained on the words.' },
  check_all: { ...GLASSES, practice: { usual: 60, fewest: 20 }, basis: `about 60 untrained people; from 20 on only gross differences (${COMMON})`, why: 'Guests tick the words that fit: no training, many words.' },
  rate_all: { ...GLASSES, practice: { usual: 50, fewest: 20 }, basis: `about 50 people who know the words a little (${COMMON})`, why: 'As ticking, with a strength beside each tick: nearer to a profile without its training.' },
  free_note: { ...GLASSES, practice: { usual: 6, fewest: 1 }, basis: `any number; six give words enough (${COMMON})`, why: 'Own words, glass by glass: a first look, before a ballot is made.', caution: 'It gives words and tests nothing.' },
  just_right: { ...GLASSES, ...CONSUMERS, why: 'Too little, just right or too much, attribute by attribute: it says which way to go.' },
  liking: { ...GLASSES, ...CONSUMERS, why: 'How much each wine is liked, so that blends or barrels can be compared.' },
};

/**
 * The most glasses of one sample that a set test can ask for, over `people` panelists: full rounds of
 * the orders are balanced, and a last, incomplete round draws the orders that need most at worst.
 * @param people whole, from 0
 */
export function mostGlassesOf(orders: readonly Order[], people: number): number {
  const rounds = Math.floor(people / orders.length);
  const left = people % orders.length;
  const counts = [0, 1].map((sample) => orders.map((order) => order.filter((glass) => glass === sample).length).sort((a, b) => b - a));
  return Math.max(...counts.map((own) => rounds * total(own) + total(own.slice(0, left))));
}

const total = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0);
