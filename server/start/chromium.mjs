import { findProgram, installSystemPackages, isExecutable } from './system-packages.mjs'

/** The path of a Chromium for the browser tests: CHROMIUM_PATH, or the first one on PATH; null when there is none. */
export function findChromium() {
  const given = process.env.CHROMIUM_PATH
  if (given) return isExecutable(given) ? given : null
  return ['chromium', 'chromium-browser', 'google-chrome'].map(findProgram).find(Boolean) ?? null
}

/** Installs Chromium when it is missing. */
export async function ensureChromium() {
  if (!findChromium()) await installSystemPackages('Chromium', ['chromium', 'fonts-liberation'])
}
