// How young vary and who must find whom, in words.
import type { Mating, Offspring } from '../model/model.ts';

export function litterWords(offspring: Offspring): string {
  switch (offspring.by) {
    case 'binomial':
      return offspring.largest === 1 ? 'each has one young or none' : `each has at most ${offspring.largest} young`;
    case 'negative binomial':
      return `litters vary by a negative binomial of size ${Number(offspring.size.toPrecision(4))}`;
    case 'table':
      return 'litters are drawn from a table of chances';
  }
}

export function matingWords({ form, femalesPerMale }: Mating): string {
  const per = `${Number(femalesPerMale.toPrecision(4))} ${femalesPerMale === 1 ? 'female' : 'females'} per male`;
  switch (form) {
    case 'female-dominant':
      return 'births follow the females alone';
    case 'harmonic mean':
      return `births follow the harmonic mean of females and males with ${per}`;
    case 'minimum':
      return `births follow the scarcer sex, with ${per}`;
  }
}
