import { orderCautions, orderFound, orderSays } from '../../results/order';
import { flightWarnings, planFlights } from '../flight-plan';
import type { MethodDescription } from '../types';
import { facts } from './facts';

export const ranking: MethodDescription = {
  facts,
  plan: planFlights,
  warnings: (question) => [...flightWarnings(question), ...(question.seatCount < 12 ? ['Ranking is usually done by 12 people or more (common practice); fewer show large differences only.'] : [])],
  analyse: orderFound,
  verdict: orderSays,
  cautions: orderCautions,
};
