import { inversionSettingsSchema } from '../../../shared/contracts/potential'
import { MAPPING_CHANGED } from '../../../shared/hand-over'
import type { HandOver } from '../../entities/hand-over.entity'
import type { JointDistribution } from '../../entities/joint-distribution.entity'
import type { Potential } from '../../entities/potential.entity'
import { sha256 } from '../hashes'
import type { HandOverContent } from './content'

/** Hash of the data and settings of a saved potential: what an answer to one of its warnings, or a mark, is good for. */
export function potentialBasis({
  inputSha256,
  settings,
}: Pick<Potential, 'inputSha256' | 'settings'>): string {
  return sha256(canonical([inputSha256, inversionSettingsSchema.parse(settings)]))
}

/** Hash of the joint data of two terms; their settings are the house's own. */
export function jointBasis({
  id,
  independentSamples,
}: Pick<JointDistribution, 'id' | 'independentSamples'>): string {
  return sha256(canonical([id, independentSamples]))
}

/** What an answer to a warning is good for: that the data still fit is said of one version of the mapping only. */
export function answerBasis(basis: string, code: string, mappingVersion: number): string {
  return code === MAPPING_CHANGED ? sha256(`${basis} version ${mappingVersion}`) : basis
}

/** Hash of everything that decides what a hand-over's files would hold, and of the reasons that go with them. */
export function contentSha256(
  { title, notes, selection, layout }: HandOver,
  { polymer, mapping, statePoint, terms, pairs }: Omit<HandOverContent, 'sha256'>,
): string {
  const { temperature, pressure, phase, composition } = statePoint
  return sha256(
    canonical({
      version: 1,
      head: [title, notes, selection, layout],
      polymer: [polymer.name, polymer.smiles],
      mapping: [mapping.id, mapping.name, mapping.revision, mapping.document],
      statePoint: [temperature, pressure, phase, composition],
      terms: terms.map(({ term, leftOut, input, basis, answers }) => [
        term.id,
        term.types,
        term.places,
        leftOut,
        leftOut === null
          ? [input?.sha256 ?? null, basis, answers.map(({ code, reason }) => [code, reason])]
          : null,
      ]),
      pairs: pairs.map(({ joint, decision, apart, answers }) => [
        jointBasis(joint),
        decision && [decision.choice, decision.reason],
        apart,
        answers.map(({ code, reason }) => [code, reason]),
      ]),
    }),
  )
}

/** JSON with the keys of objects in order: a database gives them back in an order of its own. */
function canonical(value: unknown): string {
  return JSON.stringify(value, (_key, part: unknown) =>
    typeof part === 'object' && part !== null && !Array.isArray(part)
      ? Object.fromEntries(Object.entries(part).sort(([one], [other]) => (one < other ? -1 : 1)))
      : part,
  )
}
