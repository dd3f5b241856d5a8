/** A failure that is told in one plain line; `details` (the end of a log) follows it. */
export class StartError extends Error {
  constructor(message, details = '') {
    super(message)
    this.name = 'StartError'
    this.details = details
  }
}
