/**
 * The elements of a list gathered by key, keys in order of first appearance. Empty list, empty map.
 *
 * @example
 * [...groupBy([1, 2, 3], (n) => n % 2)]; // [[1, [1, 3]], [0, [2]]]
 */
export function groupBy<T, K>(list: readonly T[], keyOf: (element: T) => K): Map<K, T[]> {
  const groups = new Map<K, T[]>();
  for (const element of list) {
    const key = keyOf(element);
    const group = groups.get(key);
    if (group === undefined) groups.set(key, [element]);
    else group.push(element);
  }
  return groups;
}
