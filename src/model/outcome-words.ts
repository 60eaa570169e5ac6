// An outcome in words: the definition that is printed beside every result, and what figures and tables say of it.
import type { OutcomeRule, OutcomeWords } from './model.ts';

export interface OutcomeSetting {
  /** Only females are counted. */
  readonly females: boolean;
  readonly classes: readonly string[];
  /** Those named; null for all. */
  readonly patches: readonly string[] | null;
  /** The name of the patch where the model has but one. */
  readonly only: string | null;
  readonly counted: 'as a whole' | 'in each patch' | 'in any patch';
}

type Rule = Pick<OutcomeRule, 'weights' | 'event' | 'counts'>;

/** Such as 'fewer than 40 animals of the class adult (females) in all patches together'. */
export function outcomeDefinition(rule: Rule, setting: OutcomeSetting): string {
  const long = rule.counts === 1 ? '' : ` at ${rule.counts} yearly counts one after the other`;
  return `${whatWords(rule, setting)}${long}`;
}

function whatWords(rule: Rule, setting: OutcomeSetting): string {
  const where = whereWords(setting);
  const { event, weights } = rule;
  if (weights.length > 1) return `no female or no male ${kindWords(rule, setting)}${where}`;
  const kind = kindWords(rule, setting);
  switch (event.is) {
    case 'fallen':
      return `at least ${percent(event.by)} fewer animals ${kind}${where} than at the start`;
    case 'below':
      return isNone(rule) ? `no animal ${kind}${where}` : `fewer than ${event.than} animals ${kind}${where}`;
    case 'above':
      return event.than < 1 && isWhole(rule)
        ? `at least one animal ${kind}${where}`
        : `more than ${event.than} animals ${kind}${where}`;
  }
}

/** Of which classes and sex, with what weights. */
function kindWords({ weights }: Rule, { classes, females }: OutcomeSetting): string {
  const weight = (c: number): number => weights.reduce((sum, row) => sum + (row[c] ?? 0), 0);
  const counted = classes.flatMap((name, c) => (weight(c) > 0 ? [{ name, weight: weight(c) }] : []));
  const sex = females ? ' (females)' : '';
  if (counted.every((one) => one.weight === 1)) {
    if (counted.length === classes.length) return `of all classes${sex}`;
    return `of the ${counted.length === 1 ? 'class' : 'classes'} ${joined(counted.map((one) => one.name))}${sex}`;
  }
  const weighed = counted.map((one) => `${one.name} as ${one.weight}`);
  return `(counting each ${joined(weighed)}${females ? '; females' : ''})`;
}

function whereWords({ patches, only, counted }: OutcomeSetting): string {
  const [first, ...others] = patches ?? [];
  const one = first !== undefined && others.length === 0 ? first : only;
  if (one !== null) return ` in ${one}`;
  if (patches === null) {
    const all = { 'as a whole': 'all patches together', 'in each patch': 'every patch', 'in any patch': 'some patch' };
    return ` in ${all[counted]}`;
  }
  if (counted === 'as a whole') return ` in ${joined(patches)} together`;
  return counted === 'in each patch' ? ` in each of ${joined(patches)}` : ` in at least one of ${joined(patches)}`;
}

export function outcomeWords(rule: Rule): OutcomeWords {
  const now = nowWords(rule);
  if (rule.counts > 1)
    return { happened: `been ${now} for ${rule.counts} years`, now: `${now} for ${rule.counts} years` };
  if (rule.weights.length > 1) return { happened: 'lost one sex', now };
  switch (rule.event.is) {
    case 'fallen':
      return { happened: `fallen by ${percent(rule.event.by)}`, now };
    case 'below':
      return { happened: isNone(rule) ? 'fallen to none' : 'fallen below', now };
    case 'above':
      return { happened: 'risen above', now };
  }
}

function nowWords(rule: Rule): string {
  if (rule.weights.length > 1) return 'without one sex';
  switch (rule.event.is) {
    case 'fallen':
      return `down by ${percent(rule.event.by)}`;
    case 'below':
      return isNone(rule) ? 'at none' : 'below';
    case 'above':
      return 'above';
  }
}

/** Whole animals fewer than one. */
function isNone(rule: Rule): boolean {
  return rule.event.is === 'below' && rule.event.than <= 1 && isWhole(rule);
}

function isWhole({ weights }: Rule): boolean {
  return weights.every((row) => row.every((weight) => weight === 0 || weight >= 1));
}

function percent(share: number): string {
  return `${String(Number((share * 100).toPrecision(12)))}\u00a0%`;
}

function joined(names: readonly string[]): string {
  return names.length < 2 ? (names[0] ?? '') : `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''}`;
}
