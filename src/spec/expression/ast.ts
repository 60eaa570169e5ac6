// What an expression means, as a tree. Numbers and truths are apart, so that a tree which exists can be evaluated.

/** Where a piece stands in the text of its expression, in UTF-16 code units from 0. */
export interface Span {
  readonly offset: number;
  readonly length: number;
}

export type ArithmeticSign = '+' | '-' | '*' | '/' | '^';
export type ComparisonSign = '<' | '<=' | '>' | '>=' | '=' | '!=';
export type OneArgument = 'exp' | 'log' | 'sqrt';

export interface NumberLeaf {
  readonly kind: 'number';
  /** Finite and not negative: a sign in front is a node of its own. */
  readonly value: number;
  readonly span: Span;
}
export interface NameLeaf {
  readonly kind: 'name';
  readonly name: string;
  readonly span: Span;
}
export interface Negation {
  readonly kind: 'negate';
  readonly of: Ast;
  readonly span: Span;
}
export interface Arithmetic {
  readonly kind: 'arithmetic';
  readonly sign: ArithmeticSign;
  readonly left: Ast;
  readonly right: Ast;
  readonly span: Span;
}
export interface Call {
  readonly kind: 'call';
  readonly function: OneArgument;
  readonly of: Ast;
  readonly span: Span;
}
export interface Extreme {
  readonly kind: 'extreme';
  readonly pick: 'min' | 'max';
  readonly of: readonly Ast[];
  readonly span: Span;
}
export interface Choice {
  readonly kind: 'if';
  readonly condition: Truth;
  readonly then: Ast;
  readonly otherwise: Ast;
  readonly span: Span;
}

/** An expression that gives a number. */
export type Ast = NumberLeaf | NameLeaf | Negation | Arithmetic | Call | Extreme | Choice;

export interface Comparison {
  readonly kind: 'compare';
  readonly sign: ComparisonSign;
  readonly left: Ast;
  readonly right: Ast;
  readonly span: Span;
}
export interface Junction {
  readonly kind: 'and' | 'or';
  readonly left: Truth;
  readonly right: Truth;
  readonly span: Span;
}
export interface Denial {
  readonly kind: 'not';
  readonly of: Truth;
  readonly span: Span;
}

/** A condition: true or false. */
export type Truth = Comparison | Junction | Denial;

/** Words with a meaning of their own, which cannot name a parameter or an attribute. */
export const reservedWords = [
  ...['and', 'or', 'not', 'if', 'then', 'else'],
  ...['min', 'max', 'exp', 'log', 'sqrt', 'year'],
] as const;
