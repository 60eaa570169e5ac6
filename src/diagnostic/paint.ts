// Colours of a terminal: the control sequences of ECMA-48, or none.

export type Paint = (text: string) => string;
export type Paints = Readonly<Record<'red' | 'yellow' | 'cyan' | 'dim', Paint>>;

const plain: Paint = (text) => text;
const between = (begin: number, end: number): Paint => {
  return (text) => `\u001b[${String(begin)}m${text}\u001b[${String(end)}m`;
};

export function paintsOf(colour: boolean): Paints {
  if (!colour) return { red: plain, yellow: plain, cyan: plain, dim: plain };
  return { red: between(31, 39), yellow: between(33, 39), cyan: between(36, 39), dim: between(2, 22) };
}
