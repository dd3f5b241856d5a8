/** Results kept at most. */
const MOST = 400

/**
 * A function whose last results are kept by a key that stands for all it depends on. It must be pure: the key alone decides.
 *
 * @param derive called once for each key as long as it is remembered
 */
export function remembered<Input, Result>(
  derive: (input: Input) => Result,
): (key: string, input: Input) => Result {
  const results = new Map<string, Result>()
  return (key, input) => {
    const known = results.get(key)
    if (known !== undefined) return known
    const result = derive(input)
    const [oldest] = results.keys()
    if (results.size >= MOST) results.delete(oldest)
    results.set(key, result)
    return result
  }
}
