// Dispersal kernels in the plane (Nathan et al. 2012; the 2Dt after Clark et al. 1999). k(r) is the density of arrivals per km² at
// distance r, with ∫ 2πr k(r) dr = 1; it is not the density of distances, 2πr k(r).
import { digamma, logGamma, upperGammaShare } from '../machine/gamma.ts';
import { exp, log, pow } from '../machine/pinned.ts';

export type KernelShape = 'exponential' | 'gaussian' | '2Dt' | 'exponential power';

export interface DispersalKernel {
  readonly shape: KernelShape;
  /** a. */
  readonly scaleKm: number;
  /** b of the 2Dt, c of the exponential power; 1 for the others, which need none. */
  readonly shapeNumber: number;
  /** Nobody goes further; null for no end. The formulas below are those of the whole kernel. */
  readonly reachKm: number | null;
}

/** Mean distance moved of a kernel with scale 1: 2, √π/2, (√π/2) Γ(b − 3/2)/Γ(b − 1) for b > 3/2, or Γ(3/c)/Γ(2/c). */
export function meanOverScale(shape: KernelShape, shapeNumber: number): number {
  switch (shape) {
    case 'exponential':
      return 2;
    case 'gaussian':
      return Math.sqrt(Math.PI) / 2;
    case '2Dt':
      if (shapeNumber <= 1.5) return Infinity;
      return (Math.sqrt(Math.PI) / 2) * exp(logGamma(shapeNumber - 1.5) - logGamma(shapeNumber - 1));
    case 'exponential power':
      return exp(logGamma(3 / shapeNumber) - logGamma(2 / shapeNumber));
  }
}

/** k(km) / k(nearKm), without loss where both are tiny. */
export function weightRatio(kernel: DispersalKernel, km: number, nearKm: number): number {
  if (kernel.shape === 'exponential') return exp(-(km - nearKm) / kernel.scaleKm);
  return exp(logFall(kernel, km) - logFall(kernel, nearKm));
}

/** k(km) per km². */
export function densityPerKm2(kernel: DispersalKernel, km: number): number {
  const { shape, scaleKm: a, shapeNumber } = kernel;
  switch (shape) {
    case 'exponential':
      return exp(-km / a) / (2 * Math.PI * a * a);
    case 'gaussian':
      return exp(logFall(kernel, km)) / (Math.PI * a * a);
    case '2Dt':
      return ((shapeNumber - 1) * exp(logFall(kernel, km))) / (Math.PI * a * a);
    case 'exponential power': {
      const whole = (2 * Math.PI * a * a * exp(logGamma(2 / shapeNumber))) / shapeNumber;
      return exp(logFall(kernel, km)) / whole;
    }
  }
}

/** ln k(km) − ln k(0). */
export function logFall({ shape, scaleKm, shapeNumber }: DispersalKernel, km: number): number {
  const r = km / scaleKm;
  switch (shape) {
    case 'exponential':
      return -r;
    case 'gaussian':
      return -r * r;
    case '2Dt':
      return -shapeNumber * log(1 + r * r);
    case 'exponential power':
      return -pow(r, shapeNumber);
  }
}

/** Chance that a way is longer than this. */
export function shareBeyond({ shape, scaleKm, shapeNumber }: DispersalKernel, km: number): number {
  const r = km / scaleKm;
  switch (shape) {
    case 'exponential':
      return (1 + r) * exp(-r);
    case 'gaussian':
      return exp(-r * r);
    case '2Dt':
      return exp((1 - shapeNumber) * log(1 + r * r));
    case 'exponential power':
      return upperGammaShare(2 / shapeNumber, pow(r, shapeNumber));
  }
}

/** ∂ of the mean over the scale by the shape number: the factor times the slope of its logarithm, ψ being that of ln Γ. */
export function meanOverScaleSlope(shape: KernelShape, shapeNumber: number): number {
  switch (shape) {
    case 'exponential':
    case 'gaussian':
      return 0;
    case '2Dt':
      return meanOverScale(shape, shapeNumber) * (digamma(shapeNumber - 1.5) - digamma(shapeNumber - 1));
    case 'exponential power': {
      const [three, two] = [3 / shapeNumber, 2 / shapeNumber];
      return (meanOverScale(shape, shapeNumber) * (two * digamma(two) - three * digamma(three))) / shapeNumber;
    }
  }
}

/** How ln of a density moves: per km of distance, per km of scale, and per unit of the shape number. */
export interface DensitySlopes {
  readonly perKm: number;
  readonly perScale: number;
  readonly perShapeNumber: number;
}

/** Slopes of ln k(km), the density with its normalisation. */
export function logDensitySlopes({ shape, scaleKm: a, shapeNumber }: DispersalKernel, km: number): DensitySlopes {
  const r = km / a;
  // With ln k = fall(r) − 2 ln a + constant, ∂/∂a = −r fall'(r)/a − 2/a.
  const slopes = (fallSlope: number, perShapeNumber: number): DensitySlopes => ({
    perKm: fallSlope / a,
    perScale: (-r * fallSlope - 2) / a,
    perShapeNumber,
  });
  switch (shape) {
    case 'exponential':
      return slopes(-1, 0);
    case 'gaussian':
      return slopes(-2 * r, 0);
    case '2Dt':
      return slopes((-2 * shapeNumber * r) / (1 + r * r), 1 / (shapeNumber - 1) - log(1 + r * r));
    case 'exponential power': {
      const c = shapeNumber;
      const fall = r === 0 ? 0 : pow(r, c);
      const ofWhole = 1 / c + (2 / (c * c)) * digamma(2 / c);
      return slopes(r === 0 ? 0 : -c * pow(r, c - 1), ofWhole - (r === 0 ? 0 : fall * log(r)));
    }
  }
}
