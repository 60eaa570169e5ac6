// Of very many entries the largest, where a list has room for so many only.

/**
 * Asked once for each of `values`, in any order: whether it is among the `most` largest. Of those that equal the least of them, the
 * first that ask are.
 */
export function amongLargest(values: Float64Array, most: number): (value: number) => boolean {
  if (values.length <= most) return () => true;
  const sorted = values.slice().sort();
  const least = sorted[values.length - most] ?? Infinity;
  let equals = most - sorted.filter((value) => value > least).length;
  return (value) => value > least || (value === least && equals-- > 0);
}
