const MINIMUM = [20, 19]

/** What to tell about this Node, or null when it will do. `version` as in process.version. */
export function nodeVersionProblem(version) {
  const [major, minor] = version.replace(/^v/, '').split('.').map(Number)
  if (major > MINIMUM[0] || (major === MINIMUM[0] && minor >= MINIMUM[1])) return null
  return `Beadwright needs Node ${MINIMUM.join('.')} or newer; this is ${version}.`
}
