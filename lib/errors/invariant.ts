/**
 * Stops a call whose caller broke the contract: bad code throws, bad data is a value.
 *
 * @throws Error with the message when the condition is false.
 * @example
 * invariant(1 + 1 === 2, "arithmetic holds"); // undefined
 */
export function invariant(condition: unknown, message: string): asserts condition {
  if (!condition) throw new Error(`invariant: ${message}`);
}

/**
 * The element at an index that the caller has shown to exist; the one place for that guarantee.
 *
 * @throws Error when there is no such element.
 * @example
 * at([3, 4], 1); // 4
 */
export function at<T>(list: ArrayLike<T>, index: number): T {
  const value = list[index];
  if (value === undefined) throw new Error(`invariant: no element ${index} of ${list.length}`);
  return value;
}
