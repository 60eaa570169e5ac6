// The three studies in models/ say what their author means: what two patches of each hold after one year, worked out by hand (derived).
// Numbers were found outside this project, from the sentences at the head of each model; distances there are rounded to a millimetre.
import { expect, test } from 'vitest';
import { followPath } from '../../src/pipeline.ts';
import { compileModel } from '../golden/models.ts';

type Counts = Readonly<Record<string, Readonly<Record<string, number>>>>;

function expectAfterOneYear(model: string, counts: Counts): void {
  const compiled = compileModel(model);
  const { firstYear, abundance } = followPath(compiled);
  for (const [patch, classes] of Object.entries(counts)) {
    for (const [name, animals] of Object.entries(classes)) {
      const found = abundance.find((one) => one.year === firstYear && one.patch === patch && one.class === name);
      expect(Math.abs((found?.animals ?? NaN) / animals - 1), `${name} in ${patch}`).toBeLessThan(2e-8);
    }
  }
}

/*
 * Hare law: (4.2 × 30 + 5 × 45) / 2 = 175.5 chicks; half live through summer, 85 % through the bag, 70 % through winter at most. Alone a moor
 * stands still where 0.35 g (2.1 + 2.5 × 0.63/0.37) = 1, so g = 0.4494655, and (1/g − 1)/120 = 0.0102072; winter meets 75 × 0.9 × 0.85 = 57.375
 * hens: 52.211 / (1 + 0.0102072 × 57.375) = 32.9276 young live on. Of these 60 % leave; arrivals from the other four moors are in the
 * proportion area × exp(−d/3), times exp(−0.02 d). Hens: 75 × 0.9 × 0.85 × 0.7 = 40.1625. Black moss is not shot and has g = 0.6420936.
 */
test('grouse: hens die of summer, bag and winter at home, and the young search after it', () => {
  expectAfterOneYear('grouse-moors', {
    'Hare law': { 'first-year hen': 29.6774084768, hen: 40.1625 },
    'Black moss': { 'first-year hen': 13.0676672038, hen: 10.08 },
  });
});

/*
 * With growth λ a share γ = (x^T − x^(T−1))/(x^T − 1), x = s/λ, goes on: repeated until λ agrees, 1.0108172, γ is 0.0417595 for nine years and
 * 0.1642173 for five. A female leaves R = 1.6 × 0.4 × P_j × P_s / 0.05 = 1.3375731 females with P = sγ/(1 − s(1 − γ)), so g = 1/R, and on the dunes
 * (R − 1)/70 = 0.0048225: hatchlings 1.6 × 52 × 0.4 / (1 + 0.0048225 × (15 + 52)) = 25.154, juveniles 25.154 + 80 × 0.82 × (1 − 0.0417595) = 88.0135.
 */
test('tortoise: shares that go on from long stages are those of its own growth', () => {
  expectAfterOneYear('tortoise-sites', {
    Dunes: { juvenile: 88.0135182532, subadult: 25.8070277539, adult: 53.9323963504 },
    Scrub: { juvenile: 85.4717999529, subadult: 23.9267594976, adult: 62.1802365936 },
  });
});

/*
 * West forest: a forest alone stands still where 0.16 = 0.72 × 0.6 g φ and, with 0.2 M = 0.66 × 0.6 g φ F, M/F = 0.73333 and φ = 6 × 0.73333/3.2 = 1.375, so
 * g = 0.2693603. Young females: 2 × 0.72 / (1 + (1/g − 1)/9 × 8) = 0.42215. Half of them set out; of those bound for Beech forest 33 % come home
 * and 25 % of the others die on the road, besides exp(−0.03 × 10 km). Kittens: 1.2 × 6 × (6 × 3/15) × 0.5 = 4.32.
 */
test('cat: a road takes its share of one way, for each sex by its own kernel', () => {
  expectAfterOneYear('cat-road', {
    'West forest': { 'young female': 4.32, female: 5.4292285364, tom: 2.7222101849 },
    'Beech forest': { 'young female': 12.96, female: 16.0395843284, tom: 7.9276089801 },
  });
});
