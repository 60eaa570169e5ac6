// Runs the weather of a model and keeps its slots: what rates are multiplied by, or the values of parameters that vary.
import { planSlots } from '../../src/compile/weather/slots.ts';
import { openOwnImage } from '../../src/kernel/open.ts';
import type { CompiledModel } from '../../src/pipeline.ts';

export interface Weather {
  /** Values of a quantity in a patch at a step (1-based), one a replicate, on its own scale. */
  readonly of: (name: string, patch: string, step?: number) => Float64Array;
  /** The same of the slot of a response, as multiples of its value at the means. */
  readonly ofResponse: (name: string, patch: string, step?: number) => Float64Array;
}

export function runWeather(compiled: CompiledModel, replicates: number, steps = 1): Weather {
  const { model, image } = compiled;
  const plan = planSlots(model);
  const patches = model.patches.length;
  const machine = openOwnImage(image);
  const size = plan.count * patches;
  const kept = new Float64Array(steps * size * replicates);
  for (let first = 0; first < replicates; first += 16) {
    const numbers = new Uint32Array(machine.memory.buffer, machine.replicates(), 16);
    for (let lane = 0; lane < 16; lane++) numbers[lane] = first + lane;
    machine.start(16, 99, 0);
    for (let step = 0; step < steps; step++) {
      machine.step();
      const slots = new Float64Array(machine.memory.buffer, machine.slotNumbers(), size * 16);
      for (let i = 0; i < size; i++)
        kept.set(slots.subarray(i * 16, i * 16 + 16), (step * size + i) * replicates + first);
    }
  }
  const at = (slot: number, patch: string, step: number): Float64Array => {
    const p = model.patches.findIndex(({ name }) => name === patch);
    const from = ((step - 1) * size + slot * patches + p) * replicates;
    return kept.slice(from, from + replicates);
  };
  return {
    of: (name, patch, step = 1) => {
      const k = model.variation!.varied.findIndex((one) => one.name === name);
      const varied = model.variation!.varied[k]!;
      const p = model.patches.findIndex((one) => one.name === patch);
      const scale = varied.of.kind === 'rate' ? varied.mean.epochs[0]![p]! : 1;
      return at(plan.varied[k]!, patch, step).map((value) => value * scale);
    },
    ofResponse: (name, patch, step = 1) =>
      at(plan.responses[model.variation!.responses.findIndex((one) => one.name === name)]!, patch, step),
  };
}

export function meanOf(values: Float64Array): number {
  return values.reduce((a, b) => a + b, 0) / values.length;
}

export function sdOf(values: Float64Array): number {
  const mean = meanOf(values);
  return Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1));
}

export function correlationOf(a: Float64Array, b: Float64Array): number {
  const [meanA, meanB] = [meanOf(a), meanOf(b)];
  const covariance = a.reduce((sum, value, i) => sum + (value - meanA) * (b[i]! - meanB), 0) / (a.length - 1);
  return covariance / (sdOf(a) * sdOf(b));
}

/** Largest difference of a correlation r from n pairs at which a test fails by chance less than once in 1e8. */
export function correlationBound(r: number, n: number): number {
  return (5.8 * (1 - r * r)) / Math.sqrt(n) + 30 / n;
}
