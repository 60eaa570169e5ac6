// The shapes of numbers that vary from year to year.

export type VariedShape = 'beta' | 'logit-normal' | 'lognormal' | 'gamma';
