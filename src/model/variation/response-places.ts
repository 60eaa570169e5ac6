// Where what changes from year to year may not stand.
import type { Response, Varied } from '../chance.ts';
import { fail, type Context } from '../context.ts';

/** Movement, crowding and the like are prepared once: what changes by chance cannot stand there. */
export function refuseElsewhere(context: Context, changing: ReadonlySet<string>, places: ReadonlySet<string>): void {
  const drivers = new Set(context.drivers.resampled?.names ?? []);
  const varied = new Set([...changing].filter((name) => !drivers.has(name)));
  for (const use of context.numbers.uses()) {
    const { expression, path } = use;
    if (path[0] === 'parameters' && !varied.has(path[1] === undefined ? '' : String(path[1]))) continue;
    if (places.has(path.join('\0'))) continue;
    // How much something varies may rest on a parameter that varies: its mean is taken.
    const refused = path[0] === 'variation' || path[0] === 'parameters' ? drivers : changing;
    const name = context.numbers.behind(use).find((one) => refused.has(one));
    if (name === undefined) continue;
    fail(context, 'varies-elsewhere', path, {
      message: `\`${name}\` ${drivers.has(name) ? 'is drawn anew every year' : 'varies from year to year'}, and this number cannot`,
      details: {
        found: String(expression),
        expected: `${drivers.has(name) ? 'drivers whose years are drawn' : 'varied parameters'} in survival, births and the share that leaves only`,
        fix: drivers.has(name)
          ? 'Use a number or another parameter here.'
          : 'Vary the rate itself under `variation`, or use another parameter here.',
      },
    });
  }
}

export function refuseTwice(context: Context, responses: readonly Response[], varied: readonly Varied[]): void {
  for (const response of responses) {
    const twice = varied.find(
      ({ of }) =>
        of.kind === 'rate' && of.phase === response.phase && of.part === response.part && of.class === response.class,
    );
    if (twice === undefined) continue;
    fail(context, 'varied-twice', ['variation'], {
      message: `${twice.name} varies by itself and through a parameter or a driver that varies`,
      part: 'key',
      details: { fix: 'Vary one of the two.' },
    });
  }
}
