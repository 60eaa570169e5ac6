// The year of a model that goes on, quick enough to be followed for thousands of years.
import { buildImage } from '../compile/image/build.ts';
import { lastingOnly } from '../compile/handling.ts';
import { wholeYear, type Compiled, type WholeYear } from '../compile/year-map.ts';
import { openYear } from '../kernel/year.ts';

/** As `wholeYear`, with the year itself followed by the kernel: the same but for the last bits. */
export function quickYear(first: Compiled): WholeYear {
  const model = lastingOnly(first.model);
  const startAnimals = new Float64Array(model.patches.length * model.classes.length);
  const apply = openYear(buildImage({ ...first, model, startAnimals }));
  return { ...wholeYear(first), apply };
}
