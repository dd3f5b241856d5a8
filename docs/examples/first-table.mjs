#!/usr/bin/env node
// From a repeat unit to a table, over the API: Node 20, no packages.
//
//   BEADWRIGHT_URL=http://127.0.0.1:4300 BEADWRIGHT_KEY=bw_… node first-table.mjs histogram.txt > table.txt
//
// The histogram has two columns: the centre of each bin in nm, and its count. The key needs the scopes read and write.

import { readFileSync } from 'node:fs'
import { basename } from 'node:path'

const { BEADWRIGHT_URL, BEADWRIGHT_KEY } = process.env
const [path] = process.argv.slice(2)
if (!BEADWRIGHT_URL || !BEADWRIGHT_KEY || !path) {
  console.error('Set BEADWRIGHT_URL and BEADWRIGHT_KEY, and name the file of the histogram.')
  process.exit(2)
}

/** Sends one request. Every error of the API has a code to act on and a sentence to read. */
async function call(method, route, { json, form } = {}) {
  const headers = { Authorization: `Bearer ${BEADWRIGHT_KEY}` }
  if (json) headers['Content-Type'] = 'application/json'
  const body = json ? JSON.stringify(json) : form
  const response = await fetch(new URL(`/api${route}`, BEADWRIGHT_URL), { method, headers, body })
  if (!response.ok) {
    const { code, message } = await response.json()
    throw new Error(`${method} ${route}: ${response.status} ${code}. ${message}`)
  }
  return response
}
const get = async (route) => (await call('GET', route)).json()
const send = async (method, route, json) => (await call(method, route, { json })).json()

/** Atoms count from 0 in the order of the SMILES, without hydrogens and without the two *. */
const bead = (id, type, colour, atoms) => ({
  id,
  name: type,
  type,
  label: '',
  colour,
  site: { rule: 'mass' },
  atoms: atoms.map((atom) => ({ atom, weight: 1, unit: 0 })),
})

async function main() {
  // For whom the key acts: take the first group where this person may write.
  const { person } = await get('/key')
  const group = person.memberships.find(({ role }) => role === 'owner' || role === 'modeller')
  if (!group) throw new Error(`${person.name} may not write in any group.`)

  const polymer = await send('POST', `/groups/${group.groupId}/polymers`, {
    name: `poly(vinyl acetate), ${new Date().toISOString()}`,
    smiles: '*CC(*)OC(C)=O',
  })
  const mapping = await send('POST', `/polymers/${polymer.id}/mappings`, {
    name: '2-to-1',
    document: { version: 1, beads: [bead('b1', 'B', 0, [0, 1]), bead('b2', 'A', 1, [2, 3, 4, 5])] },
  })
  const statePoint = await send('POST', `/polymers/${polymer.id}/state-points`, {
    temperature: 400,
    phase: 'melt',
  })

  // The terms follow from the mapping; this script wants the bond between its two beads.
  const { terms } = await get(`/mappings/${mapping.id}/terms?statePoint=${statePoint.id}`)
  const bond = terms.find(({ kind, types }) => kind === 'bond' && new Set(types).size === 2)

  const form = new FormData()
  form.set('file', new Blob([readFileSync(path)]), basename(path))
  form.set(
    'settings',
    JSON.stringify({
      statePointId: statePoint.id,
      settings: {
        version: 1,
        kind: 'bond',
        unit: 'nm',
        layout: 'centre',
        value: 'count',
        columns: { low: 0, high: 0, value: 1 },
        alreadyDivided: false,
        // How many independent samples the counts stand for; null takes every count as independent.
        independentSamples: null,
      },
    }),
  )
  await call('POST', `/terms/${bond.id}/distributions`, { form })

  // Boltzmann inversion with the exact volume of each bin, smoothed as the data ask for.
  await send('PUT', `/terms/${bond.id}/potential`, {
    statePointId: statePoint.id,
    revision: null,
    settings: {
      version: 1,
      jacobian: true,
      smoothing: { mode: 'auto', criterion: 'likelihood' },
      table: { rows: 500, low: null, high: null, cap: null },
    },
  })

  const units = 'length=nm&energy=kJ/mol'
  const table = await call('GET', `/terms/${bond.id}/table?statePoint=${statePoint.id}&${units}`)
  process.stdout.write(await table.text())
  console.error(`${bond.name} of ${polymer.name}: ${BEADWRIGHT_URL}/polymers/${polymer.id}`)
}

main().catch((error) => {
  console.error(error.message)
  process.exitCode = 1
})
