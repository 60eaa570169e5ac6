// Dispersal kernels in the plane (Nathan et al. 2012; the 2Dt after Clark et al. 1999). k(r) is the density of arrivals per km² at
// distance r, with ∫ 2πr k(r) dr = 1; it is not the density of distances, 2πr k(r).
import { logGamma, upperGammaShare } from '../machine/gamma.ts';
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
function logFall({ shape, scaleKm, shapeNumber }: DispersalKernel, km: number): number {
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
