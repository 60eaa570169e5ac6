// How well the named numbers of a model are known, in a sentence.
import type { Model } from '../model/model.ts';
import { plain } from '../view/number.ts';

/** '7 of 19 numbers are assumed', and how many say nothing of where they are from. */
export function basisWords(model: Model): string {
  const all = model.parameters.length;
  if (all === 0) return 'The model names no numbers; all stand in its text without a source of their own.';
  const assumed = model.parameters.filter((one) => one.basis === 'assumed').length;
  const silent = model.parameters.filter((one) => one.basis === null).length;
  const said =
    silent === 0
      ? ''
      : ` ${plain(silent)} ${silent === 1 ? 'does' : 'do'} not say where ${silent === 1 ? 'it is' : 'they are'} from.`;
  return `${plain(assumed)} of ${plain(all)} named numbers ${assumed === 1 ? 'is' : 'are'} assumed.${said}`;
}
