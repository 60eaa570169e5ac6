// The unit that the language gives a number of a spec, as the reference has it.
import { actionSchemas } from '../schema/actions.ts';
import type { SpecPath } from '../document.ts';
import { CoreSchema, namedSchemas, type Spec } from '../schema/spec.ts';
import { branchesOf, isSeveral, shapeOfKey, type Shape } from './shape.ts';

/** Empty where it has none, or takes numbers of any. What multiplies a number has none either. */
export function unitAt(spec: Spec, path: SpecPath): string {
  if (path.at(-1) === 'times') return '';
  const [root, below] = rootOf(spec, path);
  let [shapes, unit]: [readonly Shape[], string] = [root === undefined ? [] : [root], ''];
  for (const key of below) {
    shapes = shapes.flatMap(branchesOf).flatMap((shape) => under(shape, key));
    unit = shapes.find((shape) => shape['x-unit'] !== undefined)?.['x-unit'] ?? unit;
  }
  return unit;
}

/** Sections that authors name, and actions, have the shape of their kind. */
function rootOf(spec: Spec, path: SpecPath): readonly [Shape | undefined, SpecPath] {
  const [first, name = ''] = path;
  if (first !== 'named' && first !== 'actions') return [CoreSchema, path];
  const kinds: Readonly<Record<string, Shape>> = first === 'named' ? namedSchemas : actionSchemas;
  const kind = first === 'named' ? spec.named[name]?.kind : spec.actions?.[name]?.kind;
  return [kind === undefined ? undefined : kinds[kind], path.slice(2)];
}

function under(shape: Shape, key: SpecPath[number]): readonly Shape[] {
  const { items } = shape;
  const found = typeof key === 'string' ? shapeOfKey(shape, key) : isSeveral(items) ? items[key] : items;
  return found === undefined ? [] : [found];
}
