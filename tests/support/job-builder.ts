import { randomUUID } from 'node:crypto'
import type { DistributionUpload, JointDistributionUpload } from '@shared/contracts/distribution'
import type { MappingDocument, Term } from '@shared/contracts/mapping'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { GAS_CONSTANT } from '@shared/units'
import type { Member, Services } from '../../server/services'
import type { TextFile } from './api-client'

/** Polystyrene, two beads per unit: A the backbone, B the ring. */
export const SMILES = '*CC(*)c1ccccc1'
export const TEMPERATURE = 400

const bead = (id: string, type: string, atoms: readonly number[]): MappingDocument['beads'][number] => ({
  id,
  name: type.slice(0, 2),
  type,
  label: '',
  colour: 0,
  site: { rule: 'mass' },
  atoms: atoms.map((atom) => ({ atom, weight: 1, unit: 0 })),
})

export const DOCUMENT: MappingDocument = {
  version: 1,
  beads: [bead('backbone', 'A', [0, 1]), bead('ring', 'B', [2, 3, 4, 5, 6, 7])],
}

/** The same document with its bead types renamed. */
export function withTypes(types: Readonly<Record<string, string>>): MappingDocument {
  return {
    version: 1,
    beads: DOCUMENT.beads.map((each) => ({ ...each, type: types[each.type] ?? each.type })),
  }
}

type Settings = DistributionUpload['settings']

export const BOND_SETTINGS: Settings = {
  version: 1,
  kind: 'bond',
  unit: 'nm',
  layout: 'centre',
  value: 'count',
  columns: { low: 0, high: 0, value: 1 },
  alreadyDivided: false,
  independentSamples: null,
}

export const ANGLE_SETTINGS: Settings = { ...BOND_SETTINGS, kind: 'angle', unit: 'degree' }

/** Stiffness in kJ/mol/nm² and place in nm of the bond that `bondFile` counts. */
export const BOND = { stiffness: 4000, length: 0.3 }

/** Expected counts of a harmonic bond, U = ½ k (r − r₀)², with its r², in bins of 2 pm. */
export function bondFile(name = 'bond.txt', total = 1e6): TextFile {
  const centres = Array.from({ length: 100 }, (_, bin) => 0.201 + 0.002 * bin)
  const weights = centres.map(
    (r) => r * r * Math.exp((-0.5 * BOND.stiffness * (r - BOND.length) ** 2) / (GAS_CONSTANT * TEMPERATURE)),
  )
  return { name, text: `# r[nm] count\n${columns(centres, scaled(weights, total))}` }
}

/** Expected counts of a harmonic angle about 120°, with its sin θ, in bins of 2°. */
export function angleFile(name = 'angle.txt', total = 1e6): TextFile {
  const centres = Array.from({ length: 90 }, (_, bin) => 1 + 2 * bin)
  const weights = centres.map((degrees) => {
    const bend = ((degrees - 120) * Math.PI) / 180
    return (
      Math.sin((degrees * Math.PI) / 180) * Math.exp((-0.5 * 60 * bend ** 2) / (GAS_CONSTANT * TEMPERATURE))
    )
  })
  return { name, text: columns(centres, scaled(weights, total)) }
}

export const JOINT_SETTINGS: JointDistributionUpload['settings'] = {
  version: 1,
  kinds: ['bond', 'angle'],
  units: ['nm', 'degree'],
  layout: 'grid',
  value: 'count',
  columns: { x: 0, y: 1, value: 2 },
  independentSamples: null,
}

/** Whole counts of a bond and an angle that know nothing of one another, or that move together. */
export function jointFile({ coupled = false, name = 'joint.txt' } = {}): TextFile {
  const lines: string[] = []
  for (let x = 0; x < 20; x++) {
    for (let y = 0; y < 20; y++) {
      const [u, v] = [(x - 9.5) / 4, (y - 9.5) / 4]
      const mixed = coupled ? (u * u - 1.6 * u * v + v * v) / 0.72 : u * u + v * v
      lines.push(`${(0.2 + 0.01 * x).toFixed(3)} ${100 + 2 * y} ${Math.round(1000 * Math.exp(-mixed / 2))}`)
    }
  }
  return { name, text: `${lines.join('\n')}\n` }
}

function scaled(weights: readonly number[], total: number): number[] {
  const sum = weights.reduce((all, weight) => all + weight, 0)
  return weights.map((weight) => (total * weight) / sum)
}

function columns(first: readonly number[], second: readonly number[]): string {
  return first.map((value, row) => `${value.toFixed(6)} ${second[row].toFixed(6)}\n`).join('')
}

/** The ids of a whole job, from a polymer to a decision. */
export interface Job {
  readonly polymerId: string
  readonly statePointId: string
  readonly mappingId: string
  readonly terms: readonly Term[]
  /** The bond A–A, the angle A–A–A. */
  readonly bondId: string
  readonly angleId: string
  readonly distributionId: string
  readonly potentialId: string
  readonly jointDistributionId: string
}

export const uploaded = ({ name, text }: TextFile) => ({ name, bytes: Buffer.from(text) })

/**
 * Does a whole job through the services: polymer, state point, mapping, data and potential of one bond, a joint distribution.
 * Without the latter, which takes longest, its id is empty.
 */
export async function buildJob(services: Services, member: Member, { joint = true } = {}): Promise<Job> {
  const name = `Polymer ${randomUUID()}`
  const { id: polymerId } = await services.polymers.create(member, { name, smiles: SMILES, notes: '' })
  const { id: statePointId } = await services.statePoints.create(member, polymerId, {
    temperature: TEMPERATURE,
    pressure: null,
    phase: 'melt',
    composition: '',
    notes: '',
  })
  const mapping = { name: 'Two beads', document: DOCUMENT }
  const { id: mappingId } = await services.mappings.create(member, polymerId, mapping)
  const terms = await services.terms.list(member, mappingId, null)
  const bondId = termId(terms, 'A–A')
  const angleId = termId(terms, 'A–A–A')
  const distribution = await services.distributions.add(
    member,
    bondId,
    { statePointId, settings: BOND_SETTINGS },
    uploaded(bondFile()),
  )
  const potential = await services.potentials.save(member, bondId, {
    statePointId,
    revision: null,
    settings: DEFAULT_INVERSION_SETTINGS,
  })
  const pair = { firstTermId: bondId, secondTermId: angleId, statePointId, settings: JOINT_SETTINGS }
  const jointDistributionId = joint
    ? (await services.jointDistributions.add(member, mappingId, pair, uploaded(jointFile()))).id
    : ''
  return {
    polymerId,
    statePointId,
    mappingId,
    terms,
    bondId,
    angleId,
    distributionId: distribution.id,
    potentialId: potential.id,
    jointDistributionId,
  }
}

/** The id of the term of that name. */
export function termId(terms: readonly Term[], name: string): string {
  const term = terms.find((each) => each.name === name)
  if (!term) throw new Error(`No term ${name}; there are ${terms.map((each) => each.name).join(', ')}.`)
  return term.id
}
