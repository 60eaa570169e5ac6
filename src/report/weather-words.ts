// Year-to-year variation in words, the same in a terminal and in a report.
import type { Range, WeatherFacts } from '../analysis/weather.ts';

export function weatherWords(facts: WeatherFacts): readonly string[] {
  return [
    ...facts.varied.map(({ name, shape, mean, sd, moves, tableError }) => {
      const moved = moves.length === 0 ? '' : ` With it vary ${moves.join(', ')}.`;
      const error = tableError === 0 ? '' : ` (its table is exact to ${digits(tableError, 1)})`;
      return `${name}: ${spread(mean)} in the mean, SD ${spread(sd)} between years, ${shape}${error}.${moved}`;
    }),
    ...betweenRates(facts),
    ...betweenPatches(facts),
    ...carriedOver(facts),
    ...drivers(facts),
  ];
}

function carriedOver({ varied, autocorrelation }: WeatherFacts): readonly string[] {
  if (varied.length === 0) return [];
  if (autocorrelation === 0) return ['Each year is independent of the year before.'];
  return [
    `From year to year the underlying normal numbers have a correlation of ${digits(autocorrelation)}, and their whole spread from the first year on.`,
  ];
}

function drivers({ drivers: drawn }: WeatherFacts): readonly string[] {
  if (drawn === null) return [];
  const { names, years, moves } = drawn;
  const which = names.length === 1 ? `Each year has the ${names[0] ?? ''}` : `Each year has ${names.join(', ')}`;
  const moved = moves.length === 0 ? 'No rate reads it.' : `With it vary ${moves.join(', ')}.`;
  return [
    `${which} of one of ${years} given years, all with the same chance, the same in every patch, whatever the year before had. ${moved}`,
  ];
}

function betweenRates({ betweenRates: pairs }: WeatherFacts): readonly string[] {
  const linked = pairs.filter(({ given }) => given !== 0);
  if (linked.length === 0) return [];
  const words = linked.map(
    ({ names, given, realised }) =>
      `${names[0]} and ${names[1]} ${digits(given)} (of the numbers themselves ${digits(realised)})`,
  );
  return [`Correlation between rates, of the underlying normal numbers: ${words.join('; ')}.`];
}

function betweenPatches({ betweenPatches: given, betweenPatchesRealised: realised }: WeatherFacts): readonly string[] {
  if (given === null || realised.length === 0) return [];
  const words = realised.map(({ name, range }) => `${name} ${spread(range)}`);
  return [
    `Correlation between patches: ${spread(given)} of the underlying normal numbers; of the numbers themselves: ${words.join('; ')}.`,
  ];
}

function spread({ low, high }: Range): string {
  return digits(low) === digits(high) ? digits(low) : `${digits(low)} to ${digits(high)}`;
}

function digits(value: number, significant = 3): string {
  return String(Number(value.toPrecision(significant)));
}
