// Numbers made whole by largest remainder: the sum is kept, ties go to the first.

export function wholeAnimals(numbers: Float64Array): Float64Array {
  const whole = numbers.map((value) => Math.floor(value + 1e-9));
  const total = Math.round(numbers.reduce((sum, value) => sum + value, 0));
  const missing = total - whole.reduce((sum, value) => sum + value, 0);
  const remainder = (i: number): number => (numbers[i] ?? 0) - (whole[i] ?? 0);
  const order = [...numbers.keys()].sort((a, b) => remainder(b) - remainder(a) || a - b);
  for (const i of order.slice(0, Math.max(0, missing))) whole[i] = (whole[i] ?? 0) + 1;
  return whole;
}
