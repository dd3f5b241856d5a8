import type { Term } from '../../shared/contracts/mapping'
import { DEFAULT_INVERSION_SETTINGS } from '../../shared/inversion'
import type { Member, Services, UploadedFile } from '../services'
import type { DemoFile } from './demo-files'
import { DEMO_POLYMER, FIVE_TO_ONE, THREE_TO_ONE, type DemoMapping } from './demo-mappings'
import { DEMO_FOUNDING } from './demo-people'
import {
  COUPLED_PAIR,
  FIVE_TO_ONE_PAIRS,
  findTerm,
  makeDemoFiles,
  SEPARABLE_PAIR,
  type DemoFiles,
  type DemoPair,
} from './make-demo-files'
import { writeHandOvers } from './write-hand-overs'

const STATE_POINTS = [
  { temperature: 400, withPairs: true },
  { temperature: 450, withPairs: false },
] as const

const PAIRS: ReadonlyMap<DemoMapping, readonly DemoPair[]> = new Map([
  [THREE_TO_ONE, [COUPLED_PAIR, SEPARABLE_PAIR]],
  [FIVE_TO_ONE, FIVE_TO_ONE_PAIRS],
])

/** What the modeller has inverted so far: at the first state point, by mapping; the rest waits as data. */
const INVERTED = [
  {
    mapping: THREE_TO_ONE,
    terms: [
      ['B', 'B'],
      ['B', 'E'],
      ['B', 'B', 'B'],
      ['B', 'B', 'E'],
      ['B', 'B', 'B', 'B'],
    ],
  },
  {
    mapping: FIVE_TO_ONE,
    terms: [
      ['E', 'S1'],
      ['S1', 'S2'],
      ['S1', 'S2', 'S3'],
    ],
  },
] as const

/** A mapping as it stands in the database. */
interface StoredMapping {
  readonly id: string
  readonly mapping: DemoMapping
  readonly terms: readonly Term[]
}

/** Writes the whole demonstration through the services, as its modeller would by hand. */
export async function writeDemo(services: Services): Promise<void> {
  const members = await services.groups.found(DEMO_FOUNDING)
  const modeller = members.find(({ role }) => role === 'modeller')!
  const polymer = await services.polymers.create(modeller, DEMO_POLYMER)
  const stored: StoredMapping[] = []
  for (const mapping of [THREE_TO_ONE, FIVE_TO_ONE]) {
    const { name, document } = mapping
    const { id } = await services.mappings.create(modeller, polymer.id, { name, document })
    stored.push({ id, mapping, terms: await services.terms.list(modeller, id, null) })
  }
  for (const [index, { temperature, withPairs }] of STATE_POINTS.entries()) {
    const statePoint = await services.statePoints.create(modeller, polymer.id, {
      temperature,
      pressure: 1,
      phase: 'melt',
      composition: '',
      notes: 'Invented demonstration.',
    })
    const pairsOf = (mapping: DemoMapping) => (withPairs && PAIRS.get(mapping)) || []
    const requests = stored.map(({ mapping, terms }) => ({ mapping, terms, pairs: pairsOf(mapping) }))
    for (const [at, files] of makeDemoFiles(requests, temperature).entries()) {
      await addFiles(services, modeller, stored[at], files, requests[at].pairs, statePoint.id)
    }
    if (index > 0) continue
    await invertSome(services, modeller, stored, statePoint.id)
    const reviewer = members.find(({ role }) => role === 'reviewer')!
    const place = { polymerId: polymer.id, mappingId: stored[0].id, statePointId: statePoint.id }
    await writeHandOvers(services, { ...place, modeller, reviewer })
  }
}

async function addFiles(
  services: Services,
  modeller: Member,
  { id, terms }: StoredMapping,
  { distributions, joints }: DemoFiles,
  pairs: readonly DemoPair[],
  statePointId: string,
): Promise<void> {
  for (const [index, file] of distributions.entries()) {
    const upload = { statePointId, settings: file.settings }
    await services.distributions.add(modeller, terms[index].id, upload, uploaded(file))
  }
  for (const [index, file] of joints.entries()) {
    const first = findTerm(terms, pairs[index].bond)
    const second = findTerm(terms, pairs[index].angle)
    const upload = {
      firstTermId: first.id,
      secondTermId: second.id,
      statePointId,
      settings: file.settings,
    }
    const joint = await services.jointDistributions.add(modeller, id, upload, uploaded(file))
    if (pairs[index] === SEPARABLE_PAIR) {
      await services.jointDistributions.decide(modeller, joint.id, {
        choice: 'separate',
        reason: 'The ester bond is as long whether the side chain is stretched or folded.',
      })
    }
  }
}

async function invertSome(
  services: Services,
  modeller: Member,
  stored: readonly StoredMapping[],
  statePointId: string,
): Promise<void> {
  for (const { mapping, terms } of INVERTED) {
    const all = stored.find((each) => each.mapping === mapping)!.terms
    for (const types of terms) {
      const save = { statePointId, revision: null, settings: DEFAULT_INVERSION_SETTINGS }
      await services.potentials.save(modeller, findTerm(all, types).id, save)
    }
  }
}

const uploaded = ({ name, text }: DemoFile<unknown>): UploadedFile => ({
  name,
  bytes: new TextEncoder().encode(text),
})
