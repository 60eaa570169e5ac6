// Named numbers, and the names that may not clash with them.
import type { Spec } from '../spec/schema/spec.ts';
import { fail, type Context } from './context.ts';
import type { NamedNumber } from './model.ts';
import type { NamedExpression } from './definitions.ts';

type ParameterSpec = NonNullable<Spec['parameters']>[string];

export function namedExpressions(spec: Spec): readonly NamedExpression[] {
  return Object.entries(spec.parameters ?? {}).map(([name, parameter]) => ({
    name,
    expression: typeof parameter === 'object' ? parameter.value : parameter,
    path: typeof parameter === 'object' ? ['parameters', name, 'value'] : ['parameters', name],
  }));
}

export function resolveParameters(context: Context): readonly NamedNumber[] {
  const written = context.spec.parameters ?? {};
  return namedExpressions(context.spec).map(({ name, expression, path }) => {
    // A named number may change with the year; what is told of it is its value in the first.
    context.numbers.varies(expression, path);
    const value = context.numbers.value(expression, path, { year: context.time.firstYear });
    return { name, value, expression: String(expression), ...sourceOf(written[name]) };
  });
}

function sourceOf(parameter: ParameterSpec | undefined): Pick<NamedNumber, 'source' | 'basis'> {
  const source = typeof parameter === 'object' ? parameter.source : undefined;
  return { source: source?.text ?? null, basis: source?.basis ?? null };
}

/** A name in an expression must mean one thing. */
export function checkNames(context: Context): void {
  const attributes = new Set(context.attributes.flatMap((map) => [...map.keys()]));
  const parameters = new Set(Object.keys(context.spec.parameters ?? {}));
  for (const name of parameters) {
    if (attributes.has(name))
      tellTwoMeanings(context, ['parameters', name], 'a parameter and an attribute of the patches');
  }
  for (const name of Object.keys(context.spec.drivers?.values ?? {})) {
    const path = ['drivers', 'values', name];
    if (attributes.has(name)) tellTwoMeanings(context, path, 'a driver and an attribute of the patches');
    if (parameters.has(name)) tellTwoMeanings(context, path, 'a driver and a parameter');
  }
}

function tellTwoMeanings(context: Context, path: readonly string[], meanings: string): void {
  fail(context, 'ambiguous-name', path, {
    message: `\`${path.at(-1) ?? ''}\` is ${meanings}`,
    part: 'key',
    details: { fix: 'Rename one of them.' },
  });
}
