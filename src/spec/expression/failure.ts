// A mistake in an expression, with its place in the text of the expression.
import type { Span } from './ast.ts';

export type ExpressionCode =
  | 'expression-empty'
  | 'expression-character'
  | 'expression-syntax'
  | 'expression-function'
  | 'expression-truth'
  | 'expression-size';

export interface ExpressionError {
  readonly code: ExpressionCode;
  readonly message: string;
  readonly span: Span;
  readonly found?: string;
  readonly expected?: string;
  readonly nearest?: string;
  readonly fix?: string;
}

export type FailureDetails = Pick<ExpressionError, 'found' | 'expected' | 'nearest' | 'fix'>;

export function failure(
  code: ExpressionCode,
  span: Span,
  message: string,
  details: FailureDetails = {},
): ExpressionError {
  return { code, message, span, ...details };
}
