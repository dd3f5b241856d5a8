/** The environment for a program that tests start as its users would: nothing of the test runner's in it. */
export function cleanEnvironment(additions: Readonly<Record<string, string>>): Record<string, string> {
  const foreign =
    /^(VITEST|TEST$|NODE_ENV$|npm_|DATABASE_URL$|DATA_DIR$|PORT$|HOST$|DEMO$|SMTP_URL$|PUBLIC_URL$|MAIL_|WORKER$|VITE_|BASE_URL$|(DEV|PROD|SSR|MODE)$)/
  const kept = Object.entries(process.env).filter(
    (entry): entry is [string, string] => entry[1] !== undefined && !foreign.test(entry[0]),
  )
  return { ...Object.fromEntries(kept), ...additions }
}
