/** A call of the command that cannot be carried out; the message is for a person. */
export class UsageError extends Error {
  override readonly name = 'UsageError'
}
