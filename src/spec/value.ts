// The tree of a spec as plain data, with each schedule as the expression that it stands for.
import { expressionOf, isSchedule } from './schedule.ts';
import { branchesOf, isSeveral, shapeBelow, together, type Shape } from './shape/shape.ts';
import type { SourceNode } from './text/source.ts';
import { sectionOf } from './text/value.ts';

/** Nothing is wrong with the tree: it was checked against the same shape. */
export function shapedValueOf(node: SourceNode, shape: Shape | undefined): unknown {
  switch (node.kind) {
    case 'scalar':
      return node.value;
    case 'hole':
      return null;
    case 'list':
      return node.items.map((item, i) => shapedValueOf(item, itemShape(shape, i)));
    case 'map':
      if (isSchedule(node) && branches(shape).some((branch) => branch['x-schedule'] === true))
        return expressionOf(node);
      return sectionOf(node.entries.map(({ key, value }) => [key, shapedValueOf(value, shapeBelow(shape, key))]));
  }
}

function branches(shape: Shape | undefined): readonly Shape[] {
  return shape === undefined ? [] : branchesOf(shape);
}

function itemShape(shape: Shape | undefined, index: number): Shape | undefined {
  return together(branches(shape).flatMap(({ items }) => (isSeveral(items) ? (items[index] ?? []) : (items ?? []))));
}
