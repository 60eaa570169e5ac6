// How the numbers of a dispersal move with a named parameter. The reach of a kernel is held fixed.
import type { DispersalSpec } from '../../spec/schema/spec.ts';
import type { DispersalKernel } from '../kernel-shape.ts';
import { meanOverScale, meanOverScaleSlope } from '../kernel-shape.ts';
import type { DispersalPhase, DispersalRule, Link, Model } from '../model.ts';
import type { SlopeReader } from './reader.ts';

export function dispersalSlopes(reader: SlopeReader, model: Model, phase: DispersalPhase): DispersalPhase | null {
  const spec = reader.context.spec.named[phase.name];
  if (spec?.kind !== 'dispersal') return null;
  const rule = ruleSlopes(reader, spec, phase);
  const leaving = rule.by === 'shares' ? leavingOfShares(model, phase, rule.shares) : reader.table(phase.leaving);
  const slopes = { ...phase, leaving, rule, links: linkSlopes(reader, spec, phase) };
  return anyMoves(slopes) ? slopes : null;
}

function anyMoves({ leaving, rule, links }: DispersalPhase): boolean {
  const some = (values: Float64Array | undefined): boolean => values?.some((slope) => slope !== 0) ?? false;
  const ofLinks = (links ?? []).flatMap(
    ({ distanceKm, distanceTimes = 0, distanceAddKm = 0, crossingDeath, turnBack }) => [
      distanceKm ?? 0,
      distanceTimes,
      distanceAddKm,
      crossingDeath,
      turnBack,
    ],
  );
  if (some(leaving.epochs[0]) || some(Float64Array.from(ofLinks))) return true;
  if (rule.by === 'shares') return some(rule.shares);
  const { kernel, attraction, hazardPerKm, survivalOnTheWay } = rule;
  return some(attraction) || some(Float64Array.of(kernel.scaleKm, kernel.shapeNumber, hazardPerKm, survivalOnTheWay));
}

function ruleSlopes(reader: SlopeReader, spec: DispersalSpec, { name, rule }: DispersalPhase): DispersalRule {
  if (rule.by === 'shares') return { by: 'shares', shares: shareSlopes(reader, spec, name) };
  return {
    ...rule,
    kernel: kernelSlopes(reader, { name, spec, kernel: rule.kernel }),
    attraction: reader.byPatch(spec.attraction, [name, 'attraction']),
    hazardPerKm: reader.one(spec.hazard, [name, 'hazard'], 'per-length'),
    survivalOnTheWay: reader.one(spec['survival-on-the-way'], [name, 'survival-on-the-way']),
  };
}

interface KernelAt {
  readonly name: string;
  readonly spec: DispersalSpec;
  readonly kernel: DispersalKernel;
}

/** The scale is the mean over a factor of the shape where the mean is given. */
function kernelSlopes(reader: SlopeReader, { name, spec, kernel }: KernelAt): DispersalKernel {
  const written = spec.kernel;
  const at = (key: string) => [name, 'kernel', key];
  const shapeSlope = reader.one(written?.['shape-number'], at('shape-number'));
  reader.one(written?.reach, at('reach'), 'length');
  if (written?.mean === undefined) {
    return { ...kernel, shapeNumber: shapeSlope, scaleKm: reader.one(written?.scale, at('scale'), 'length') };
  }
  const { shape, shapeNumber, scaleKm } = kernel;
  const factor = meanOverScale(shape, shapeNumber);
  const factorSlope = meanOverScaleSlope(shape, shapeNumber) * shapeSlope;
  const meanSlope = reader.one(written.mean, at('mean'), 'length');
  return { ...kernel, shapeNumber: shapeSlope, scaleKm: (meanSlope - scaleKm * factorSlope) / factor };
}

function shareSlopes(reader: SlopeReader, { shares }: DispersalSpec, name: string): Float64Array {
  const { patches, names } = reader.context;
  const slopes = new Float64Array(patches.length * patches.length);
  for (const [from, row] of Object.entries(shares ?? {})) {
    for (const [to, expression] of Object.entries(row)) {
      const [p, q] = [names.patches.get(from) ?? 0, names.patches.get(to) ?? 0];
      slopes[q * patches.length + p] = reader.inPatch(expression, [name, 'shares', from, to], p);
    }
  }
  return slopes;
}

/** Who leaves is the sum of the shares. */
function leavingOfShares({ patches, classes }: Model, { moves }: DispersalPhase, shares: Float64Array) {
  const leaving = new Float64Array(patches.length * classes.length);
  patches.forEach((_, p) => {
    let sum = 0;
    for (let q = 0; q < patches.length; q++) sum += shares[q * patches.length + p] ?? 0;
    for (let c = 0; c < classes.length; c++) leaving[p * classes.length + c] = moves[c] === 1 ? sum : 0;
  });
  return { epochs: [leaving], epochOf: new Int32Array(0) };
}

function linkSlopes(reader: SlopeReader, spec: DispersalSpec, { name, links = [] }: DispersalPhase): readonly Link[] {
  return links.map((link, i) => {
    const written = spec.links?.[i];
    const at = (key: string) => [name, 'links', i, key];
    return {
      between: link.between,
      distanceKm: link.distanceKm === null ? null : reader.one(written?.distance, at('distance'), 'length'),
      crossingDeath: reader.one(written?.['crossing-death'], at('crossing-death')),
      turnBack: reader.one(written?.['turn-back'], at('turn-back')),
      distanceTimes: reader.one(written?.['distance-times'], at('distance-times')),
      distanceAddKm: reader.one(written?.['distance-add'], at('distance-add'), 'length'),
    };
  });
}
