/** What a call throws; a call that throws nothing is a failure of its own. */
export function errorOf(call: () => unknown): unknown {
  try {
    call()
  } catch (error) {
    return error
  }
  throw new Error('The call was expected to throw, but it returned.')
}
