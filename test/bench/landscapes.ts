// What large landscapes take: losses without every patch and link, growth with both vectors, and all that `check` tells.
import { placesOf } from '../../src/analysis/label.ts';
import { phaseSensitivities } from '../../src/analysis/phase-sensitivity.ts';
import { linkValues, patchRemovalLosses, sharedInverse } from '../../src/analysis/removal.ts';
import { vectorsOf } from '../../src/analysis/sensitivity.ts';
import { understand } from '../../src/cli/command/check.ts';
import { buildBlock } from '../../src/compile/block.ts';
import { leading } from '../../src/numeric/leading.ts';
import { compileSpec } from '../../src/pipeline.ts';
import { readSpec } from '../../src/spec/read.ts';
import { largeModel, type Size } from '../large/landscape.ts';
import { processorSeconds } from './measure.ts';
import type { Options } from './options.ts';

export interface LandscapeTimes {
  readonly patches: number;
  /** Processor seconds, each once. */
  readonly read: number;
  readonly compile: number;
  readonly check: number;
  readonly vectors: number;
}

export interface LossTimes {
  readonly patches: number;
  readonly links: number;
  /** Links and patches whose loss is told exactly. */
  readonly exact: number;
  readonly seconds: number;
}

/** 400 patches of 8 classes: every patch and every link. */
export function measureLosses({ quick }: Options): LossTimes {
  const block = buildBlock(compiledModel({ patches: quick ? 200 : 400, classes: 8 }).compiled, 'zero');
  const { matrix, states, classes } = block;
  const vectors = vectorsOf(leading(matrix));
  if (vectors === null) throw new Error('The landscape has no single stable distribution.');
  const places = placesOf(block);
  const importance = new Float64Array(block.patches.length).fill(1);
  let [links, exact] = [0, 0];
  const seconds = processorSeconds(() => {
    const around = sharedInverse(matrix, vectors, Infinity);
    const phases = phaseSensitivities(block.phaseMaps, places, vectors);
    const found = linkValues({ matrix, vectors, phases, places, classCount: classes.length, around });
    const losses = patchRemovalLosses({ matrix, states, vectors, importance, around });
    links = found.length;
    exact = found.filter((link) => link.exact).length + losses.filter((loss) => loss !== null).length;
  });
  return { patches: block.patches.length, links, exact, seconds };
}

/** 10,000 patches of 8 classes. */
export function measureLargest({ quick }: Options): LandscapeTimes {
  const { read, compile, compiled } = compiledModel({ patches: quick ? 2000 : 10_000, classes: 8 });
  const { matrix } = buildBlock(compiled, 'zero');
  const vectors = processorSeconds(() => leading(matrix));
  const check = processorSeconds(() => understand(compiled));
  return { patches: compiled.model.patches.length, read, compile, check: read + compile + check, vectors };
}

function compiledModel(size: Size) {
  const { text, files } = largeModel(size);
  const made: Made = { document: undefined, compiled: null };
  const read = processorSeconds(() => (made.document = readSpec(text, 'large.yaml', files).document));
  const { document } = made;
  if (document === undefined) throw new Error('The large model cannot be read.');
  const compile = processorSeconds(() => (made.compiled = compileSpec(document.spec).compiled));
  const { compiled } = made;
  if (compiled === null) throw new Error('The large model cannot be compiled.');
  return { read, compile, compiled };
}

interface Made {
  document: ReturnType<typeof readSpec>['document'];
  compiled: ReturnType<typeof compileSpec>['compiled'];
}
