import 'vitest'

declare module 'vitest' {
  interface ProvidedContext {
    /** The URL of a role that may create databases. */
    databaseUrl: string
    /** A database with the schema of today and no rows, to copy. */
    templateDatabase: string
    /** Where the built server of the browser tests answers, without a slash at the end. */
    baseUrl: string
  }
}
