/**
 * The entry at `index`, which the caller knows to exist.
 * @throws RangeError when it does not
 */
export function item<T>(list: ArrayLike<T>, index: number): T {
  const found = list[index];
  if (found === undefined) throw new RangeError(`no entry ${index} in a list of ${list.length}`);
  return found;
}

/** The last entry of a list that is not empty. */
export const last = <T>(list: ArrayLike<T>): T => item(list, list.length - 1);
