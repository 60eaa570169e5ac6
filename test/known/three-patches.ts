// Three patches at (0, 0), (10, 0) and (0, 20) km with areas 4, 9 and 1; newborns leave with 0.2, survive the way with 0.9 and
// arrive in proportion to area times e^(−d/5); adults stay. Counted after breeding; demography first (derived).
import { product } from '../../src/numeric/sparse-product.ts';
import { sparseFromRows } from '../../src/numeric/sparse.ts';

const at = [
  [0, 0],
  [10, 0],
  [0, 20],
] as const;
const areas = [4, 9, 1];
const rates = [
  [1.2, 0.3, 0.8],
  [0.9, 0.25, 0.75],
  [1.5, 0.3, 0.8],
] as const;

function newbornMovement(): number[][] {
  const weight = (to: number, from: number): number => {
    const [a, b] = [at[to]!, at[from]!];
    return to === from ? 0 : areas[to]! * Math.exp(-Math.hypot(a[0] - b[0], a[1] - b[1]) / 5);
  };
  return areas.map((_, to) =>
    areas.map((_area, from) => {
      const total = areas.reduce((sum, _other, k) => sum + weight(k, from), 0);
      return to === from ? 0.8 : (0.2 * 0.9 * weight(to, from)) / total;
    }),
  );
}

export function threePatches() {
  const demography = Array.from({ length: 6 }, () => new Array<number>(6).fill(0));
  rates.forEach(([births, young, adult], p) => {
    demography[2 * p]![2 * p + 1] = births;
    demography[2 * p + 1]![2 * p] = young;
    demography[2 * p + 1]![2 * p + 1] = adult;
  });
  const movement = Array.from({ length: 6 }, (_, i) =>
    Array.from({ length: 6 }, (_unused, j) => Number(i % 2 === 1 && i === j)),
  );
  newbornMovement().forEach((row, to) => row.forEach((share, from) => (movement[2 * to]![2 * from] = share)));
  const maps = [
    { phase: 'demography', map: sparseFromRows(demography) },
    { phase: 'natal', map: sparseFromRows(movement) },
  ];
  const states = [0, 1, 2].flatMap((patch) => [0, 1].map((c) => ({ patch, class: c })));
  return { matrix: product(sparseFromRows(movement), sparseFromRows(demography)), maps, states };
}
