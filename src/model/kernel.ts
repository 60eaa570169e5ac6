// The kernel of a dispersal: its shape, and its scale from the scale or from the mean distance that was given.
import type { DispersalSpec } from '../spec/schema/spec.ts';
import { fail, type Context } from './context.ts';
import { meanOverScale, type DispersalKernel, type KernelShape } from './kernel-shape.ts';

type KernelSpec = NonNullable<DispersalSpec['kernel']>;

export function resolveKernel(context: Context, name: string, spec: KernelSpec): DispersalKernel | null {
  const shapeNumber = shapeNumberOf(context, name, spec);
  const scaleKm = scaleOf(context, { name, spec, shapeNumber });
  const reach = [name, 'kernel', 'reach'];
  const reachKm = spec.reach === undefined ? null : positiveKm(context, spec.reach, reach);
  if (scaleKm === null || shapeNumber === null) return null;
  return { shape: spec.shape, scaleKm, shapeNumber, reachKm };
}

/** The least shape number of a kernel that has one, and what it does. */
const shapeNumbers: Readonly<Record<KernelShape, { readonly above: number; readonly words: string } | null>> = {
  exponential: null,
  gaussian: null,
  '2Dt': { above: 1, words: 'a number above 1, such as 2.5: the smaller, the more go far' },
  'exponential power': {
    above: 0,
    words: 'a number above 0, such as 0.5: below 1 more go far than by the exponential',
  },
};

/** Null after telling what is wrong with it. */
function shapeNumberOf(context: Context, name: string, spec: KernelSpec): number | null {
  const wanted = shapeNumbers[spec.shape];
  const written = spec['shape-number'];
  const path = [name, 'kernel', 'shape-number'];
  if (wanted === null) {
    if (written === undefined) return 1;
    fail(context, 'dispersal-shape', path, {
      message: `The ${spec.shape} kernel has no shape number`,
      part: 'key',
      details: { fix: 'Remove it, or take `2Dt` or `exponential power`.' },
    });
    return null;
  }
  if (written === undefined) {
    fail(context, 'dispersal-shape', [name, 'kernel'], {
      message: `The kernel \`${spec.shape}\` needs a \`shape-number\``,
      part: 'key',
      details: { expected: wanted.words },
    });
    return null;
  }
  const value = context.numbers.value(written, path, { year: context.time.firstYear });
  if (value > wanted.above) return value;
  if (!Number.isNaN(value)) {
    const message = `The shape number of a \`${spec.shape}\` kernel is ${value}`;
    fail(context, 'out-of-range', path, { message, details: { expected: wanted.words } });
  }
  return null;
}

interface ScaleRequest {
  readonly name: string;
  readonly spec: KernelSpec;
  readonly shapeNumber: number | null;
}

function scaleOf(context: Context, { name, spec, shapeNumber }: ScaleRequest): number | null {
  const { mean, scale, shape } = spec;
  if ((mean === undefined) === (scale === undefined)) {
    fail(context, 'dispersal-shape', [name, 'kernel'], {
      message:
        mean === undefined ? 'The kernel does not say how far animals go' : 'The kernel has both a mean and a scale',
      part: 'key',
      details: {
        expected: 'one of `mean` (the mean distance in the plane) and `scale`',
        reason: 'In the plane the exponential kernel has a mean distance of twice its scale.',
      },
    });
    return null;
  }
  if (mean === undefined) return scale === undefined ? null : positiveKm(context, scale, [name, 'kernel', 'scale']);
  const meanKm = positiveKm(context, mean, [name, 'kernel', 'mean']);
  if (meanKm === null || shapeNumber === null) return null;
  const factor = meanOverScale(shape, shapeNumber);
  if (factor !== Infinity) return meanKm / factor;
  fail(context, 'dispersal-shape', [name, 'kernel', 'mean'], {
    message: `A 2Dt kernel with shape number ${shapeNumber} has no mean distance`,
    part: 'key',
    details: { expected: 'a `shape-number` above 1.5, or a `scale` instead of the mean' },
  });
  return null;
}

export function positiveKm(context: Context, text: number | string, path: readonly (string | number)[]): number | null {
  const value = context.numbers.value(text, path, { year: context.time.firstYear, dimension: 'length' });
  if (value > 0) return value;
  if (!Number.isNaN(value)) {
    fail(context, 'out-of-range', path, {
      message: `A distance of ${value} km`,
      details: { expected: 'a distance above zero' },
    });
  }
  return null;
}
