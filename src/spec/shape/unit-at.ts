// What the language says of a number at its place in a spec: its unit, as the reference has it, its limits, and whether
// a name may stand there.
import { actionSchemas } from '../schema/actions.ts';
import type { SpecPath } from '../document.ts';
import { CoreSchema, namedSchemas, type Spec } from '../schema/spec.ts';
import { branchesOf, isSeveral, shapeOfKey, sortOf, type Shape } from './shape.ts';

/** Empty where it has none, or takes numbers of any. What multiplies a number has none either. */
export function unitAt(spec: Spec, path: SpecPath): string {
  if (path.at(-1) === 'times') return '';
  return shapesOnTheWay(spec, path).reduce(
    (unit, shapes) => shapes.find((shape) => shape['x-unit'] !== undefined)?.['x-unit'] ?? unit,
    '',
  );
}

const formats: readonly string[] = ['expression', 'share', 'length', 'area', 'per-length', 'time'];

/** Whether an expression may stand there, which may be a name. */
export function takesExpression(spec: Spec, path: SpecPath): boolean {
  const shapes = shapesOnTheWay(spec, path).at(-1) ?? [];
  return shapes.flatMap(branchesOf).some(({ type, format }) => type === 'string' && formats.includes(format ?? ''));
}

/** The shape of a plain number there; undefined where none may stand. */
export function numberAt(spec: Spec, path: SpecPath): Shape | undefined {
  const shapes = shapesOnTheWay(spec, path).at(-1) ?? [];
  return shapes.flatMap(branchesOf).find((shape) => sortOf(shape) === 'number');
}

/** What may stand at each step of a path. */
function shapesOnTheWay(spec: Spec, path: SpecPath): readonly (readonly Shape[])[] {
  const [root, below] = rootOf(spec, path);
  let shapes: readonly Shape[] = root === undefined ? [] : [root];
  return below.map((key) => (shapes = shapes.flatMap(branchesOf).flatMap((shape) => under(shape, key))));
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
