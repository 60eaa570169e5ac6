// What a reader must know before using an analysis.

/** Why growth without chance cannot speak for corridors (Karlin 1982; Altenberg 2012, from memory). */
export const corridorParadox =
  'Nobody dies on the way, and this analysis knows neither chance nor crowding. Mixing patches can then only lower the growth ' +
  'rate, whatever links are added (Karlin 1982; Altenberg 2012): do not judge corridors by it. Their benefit shows in runs with ' +
  'chance: refilling empty patches, years that differ between patches, crowding.';

/** The same where some die on the way. */
export const linksByGrowth =
  'This analysis knows neither chance nor crowding. Judged by growth alone, mixing patches lowers it wherever nobody is lost on the ' +
  'way (Karlin 1982; Altenberg 2012), and a link or a plan seems to help only by what it saves of those that travel. What links are ' +
  'worth otherwise (empty patches refilled, years that differ between patches, crowding) shows in runs with chance.';

export const firstYearOnly =
  'Rates, ways or actions change with the year. The matrix is that of the first year: what comes later shows in `path` and `run`.';

/** Entries listed; of a larger matrix those with the largest elasticities. */
export const mostEntries = 10_000;

export const smallChanges =
  'Sensitivities and elasticities hold for small changes of one number alone; large or joint changes must be run.';

export const meanYear =
  'The growth rate is that of a year of mean rates. Years that differ make the usual growth lower, so a growth rate a little ' +
  'above 1 does not mean that a population lasts.';

export const apparentSurvival =
  'If survival was estimated from marked animals that may have moved away unseen, leaving is already counted in it as death: do ' +
  'not add dispersal to it again.';

export interface CautionFacts {
  readonly patches: number;
  readonly losslessDispersal: boolean;
  readonly irreducible: boolean;
  readonly period: number;
  /** Of the matrix. */
  readonly entries: number;
  /** Listed, and those of them whose loss is share times sensitivity. */
  readonly links: number;
  readonly linksAbout: number;
  /** Rates or ways are not the same in every year. */
  readonly changesByYear: boolean;
  /** The matrix is that of small changes around the make-up of the sexes that few animals settle to. */
  readonly linearised: boolean;
}

/** Where births depend on who meets whom (Caswell & Weeks 1986, from memory). */
export const bothSexes =
  'Births depend on both sexes, so the matrix is that of small changes around the make-up that few animals settle to: an entry ' +
  'tells what one more animal adds, and births stand with males too where females need them.';

export function cautionsFor(facts: CautionFacts): string[] {
  const { patches, losslessDispersal, irreducible, period, entries, linearised, changesByYear } = facts;
  const { links, linksAbout } = facts;
  const cautions = [meanYear, smallChanges];
  if (linearised) cautions.push(bothSexes);
  if (patches > 1) cautions.push(apparentSurvival);
  if (changesByYear) cautions.push(firstYearOnly);
  if (patches > 1) cautions.push(losslessDispersal ? corridorParadox : linksByGrowth);
  if (!irreducible) {
    cautions.push(
      'Some states cannot be reached from all others (one-way patches, or classes past breeding). What happens in the long run can ' +
        'depend on where the animals are at the start; the groups are listed with their own growth rates.',
    );
  }
  if (period > 1) {
    cautions.push(
      `All loops of the life cycle take a multiple of ${period} years, so numbers keep swinging with that period and never settle.`,
    );
  }
  if (entries > mostEntries) {
    cautions.push(`Of ${entries} entries only the ${mostEntries} with the largest elasticities are listed.`);
  }
  if (linksAbout > 0) {
    cautions.push(
      `The matrix is too large to take every link away by itself: the growth lost without ${linksAbout} of ${links} links is the share ` +
        'that arrives times its sensitivity. That holds for small shares, and says too much or too little of a link that much depends on.',
    );
  }
  return cautions;
}
