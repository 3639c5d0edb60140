import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  abvOfDensity,
  abvOfMassFraction,
  convertAcidity,
  CUSTOMARY_PKA,
  densityOfAbv,
  densityOfMassFraction,
  ETHANOL_DENSITY,
  flightEthanol,
  freeSo2For,
  linearBlend,
  massFractionOfAbv,
  metabisulphiteGrams,
  mixAlcohol,
  molecularShare,
  molecularSo2,
  so2Pka,
  StatsError,
  trendOverPulls,
  twoPartBlend,
  yearlyLoss,
} from '@/stats';

describe('molecular SO₂', () => {
  it('has the figures winemakers know: 0.8 mg/L at pH 3.5 needs 40 mg/L free (common table, from memory)', () => {
    expect(freeSo2For(0.8, 3.5)).toBeCloseTo(40, 0);
    expect(freeSo2For(0.8, 3.0)).toBeCloseTo(13.2, 1);
  });

  it('is half of the free where pH is the pKa, falls with pH and rises with warmth and alcohol', () => {
    expect(molecularShare(2, 2)).toBe(0.5);
    fc.assert(
      fc.property(fc.double({ min: 2.8, max: 4, noNaN: true }), fc.double({ min: 12, max: 38, noNaN: true }), fc.double({ min: 8, max: 14, noNaN: true }), (pH, t, abv) => {
        const at = (p: number, temperature: number, strength: number) => molecularSo2(30, p, so2Pka(temperature, strength).pKa);
        expect(at(pH + 0.1, t, abv)).toBeLessThan(at(pH, t, abv));
        expect(at(pH, t + 1, abv)).toBeGreaterThan(at(pH, t, abv));
        expect(at(pH, t, abv + 0.5)).toBeGreaterThan(at(pH, t, abv));
        expect(freeSo2For(at(pH, t, abv), pH, so2Pka(t, abv).pKa)).toBeCloseTo(30, 9);
      }),
      { seed: 1 },
    );
  });

  it('says when a cellar is colder than the table', () => {
    expect(so2Pka(13, 13).isExtrapolated).toBe(true);
    expect(so2Pka(20, 10)).toEqual({ pKa: 1.997, isExtrapolated: false }); // OIV-MA-AS323-04C, table I
    expect(CUSTOMARY_PKA).toBe(1.81);
  });
});

describe('alcohol', () => {
  it('has the densities of the alcohol tables (OIML R 22; 40 % vol from memory)', () => {
    expect(densityOfMassFraction(0)).toBeCloseTo(998.2012, 4);
    expect(densityOfMassFraction(1)).toBeCloseTo(ETHANOL_DENSITY, 2);
    expect(densityOfAbv(40)).toBeCloseTo(948.05, 2);
    expect(abvOfMassFraction(1)).toBeCloseTo(100, 3);
  });

  it('turns round', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.1, max: 99, noNaN: true }), (abv) => {
        expect(abvOfDensity(densityOfAbv(abv))).toBeCloseTo(abv, 8);
        expect(abvOfMassFraction(massFractionOfAbv(abv))).toBeCloseTo(abv, 10);
      }),
      { seed: 2 },
    );
  });

  it('of a blend lies between the parts, and a blend of one is itself', () => {
    const mixed = mixAlcohol([{ volume: 225, abv: 12 }, { volume: 30, abv: 40 }]);
    expect(mixed.abv).toBeGreaterThan(12);
    expect(mixed.abv).toBeLessThan(40);
    expect(mixed.volume).toBeLessThan(255);
    expect(mixAlcohol([{ volume: 100, abv: 13 }])).toEqual({ volume: expect.closeTo(100, 9) as number, abv: expect.closeTo(13, 9) as number });
  });

  it('of a flight is counted as if swallowed', () => expect(flightEthanol({ glasses: 6, millilitres: 30, abv: 13.5 }).grams).toBeCloseTo(19.17, 2));
});

describe('blends and conversions', () => {
  it('meet their target', () => {
    fc.assert(
      fc.property(fc.double({ min: 3, max: 6, noNaN: true }), fc.double({ min: 6.5, max: 12, noNaN: true }), fc.double({ min: 0, max: 1, noNaN: true }), (low, high, at) => {
        const target = low + at * (high - low);
        const { fractionHigh } = twoPartBlend(low, high, target);
        expect(linearBlend([1 - fractionHigh, fractionHigh], [low, high])).toBeCloseTo(target, 9);
      }),
      { seed: 3 },
    );
  });

  it('of acids turn round', () => expect(convertAcidity(convertAcidity(0.6, 'acetic', 'sulphuric'), 'sulphuric', 'acetic')).toBeCloseTo(0.6, 12));
  it('of sulphite: 30 mg/L in 225 L takes 11.7 g at the theoretical share', () => expect(metabisulphiteGrams(30, 225)).toBeCloseTo(11.71, 2));
  it('of losses', () => expect(yearlyLoss(20, 225).percent).toBeCloseTo(3.24, 2));
});

describe('a trend over pulls', () => {
  const days = [0, 61, 122, 200, 330];
  const means = [3.1, 3.9, 4.2, 5.8, 6.9];

  // R 4.2: summary(lm(y ~ x, weights = c(9, 12, 11, 12, 8))), confint, predict(data.frame(x = 400), interval = "confidence")
  it('is R’s weighted lm', () => {
    const trend = trendOverPulls(days, means, { weights: [9, 12, 11, 12, 8] });
    expect(trend.slope).toBeCloseTo(0.0119618592384731, 12);
    expect(trend.standardError).toBeCloseTo(0.00125770769155929, 12);
    expect(trend.p).toBeCloseTo(0.00246487115032581, 10);
    expect(trend.low).toBeCloseTo(0.00795927204234335, 10);
    expect(trend.high).toBeCloseTo(0.0159644464346029, 10);
    const later = trend.at(400);
    expect(later.value).toBeCloseTo(7.87326933726429, 9);
    expect(later.low).toBeCloseTo(6.73731215669379, 8);
    expect(later.high).toBeCloseTo(9.00922651783478, 8);
  });

  it('without weights is R’s lm', () => {
    const trend = trendOverPulls(days, means);
    expect(trend.slope).toBeCloseTo(0.0118357253095797, 12);
    expect(trend.p).toBeCloseTo(0.00179236630900562, 10);
  });

  it.each([
    ['two pulls', () => trendOverPulls([0, 30], [1, 2])],
    ['one time', () => trendOverPulls([5, 5, 5], [1, 2, 3])],
    ['a weight of 0', () => trendOverPulls([0, 1, 2], [1, 2, 3], { weights: [1, 0, 1] })],
    ['lists of different lengths', () => trendOverPulls([0, 1, 2], [1, 2])],
    ['NaN', () => trendOverPulls([0, 1, NaN], [1, 2, 3])],
  ])('refuses %s', (_, work) => expect(work).toThrow(StatsError));
});

it.each([
  ['a pH of 9', () => molecularSo2(30, 9)],
  ['negative free SO₂', () => molecularSo2(-1, 3.4)],
  ['a cellar at 60 °C', () => so2Pka(60, 12)],
  ['a blend of nothing', () => mixAlcohol([])],
  ['no volume', () => linearBlend([0, 0], [1, 2])],
  ['a target out of reach', () => twoPartBlend(3, 5, 6)],
  ['parts that are alike', () => twoPartBlend(5, 5, 5)],
  ['a density below ethanol’s', () => abvOfDensity(700)],
  ['more SO₂ in the salt than there is', () => metabisulphiteGrams(30, 225, 0.9)],
  ['an infinite acidity', () => convertAcidity(Infinity, 'acetic', 'meq')],
  ['a negative loss', () => yearlyLoss(-2, 225)],
])('%s is refused', (_, work) => expect(work).toThrow(StatsError));
