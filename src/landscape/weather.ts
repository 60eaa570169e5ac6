// How alike the years are in different patches, where that falls with distance.
import { pinned } from '../machine/pinned.ts';
import type { Correlation, Variation } from '../model/chance.ts';
import type { Model } from '../model/model.ts';
import { matrixOf, possibleCorrelation } from '../model/variation/correlation.ts';
import type { Finding } from '../spec/finding.ts';
import { distanceKm } from './distance.ts';

/** exp(−distance / range) between the patches; null where nothing varies. */
export function patchCorrelation(
  { patches }: Model,
  variation: Variation | null,
  findings: Finding[],
): Correlation | null {
  if (variation === null) return null;
  const { betweenPatches } = variation;
  if ('of' in betweenPatches) return betweenPatches;
  const matrix = matrixOf(patches.length, (a, b) => {
    const [from, to] = [patches[a], patches[b]];
    const km = from === undefined || to === undefined ? 0 : distanceKm(from, to);
    return pinned.exp(-km / betweenPatches.rangeKm);
  });
  const path = ['variation', 'between-patches'];
  const request = { path, what: 'patch', names: patches.map(({ name }) => name) };
  const { correlation, finding } = possibleCorrelation(matrix, request);
  if (finding !== null) findings.push(finding);
  return correlation;
}
