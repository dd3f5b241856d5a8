import { type EntityManager, In, IsNull } from 'typeorm'
import { Distribution } from '../entities/distribution.entity'
import { JointDistribution } from '../entities/joint-distribution.entity'
import { Term } from '../entities/term.entity'

/** Current data of a mapping: of one term, or of two together. */
export interface MappingDatum {
  readonly termIds: readonly string[]
  readonly statePointId: string
  /** Of the mapping that they were measured under. */
  readonly version: number
}

/** Whether any data stand on a mapping, be they superseded. */
export async function hasData(manager: EntityManager, mappingId: string): Promise<boolean> {
  const [{ has }]: { has: boolean }[] = await manager.query(
    `select exists (select 1 from "distribution" d join "term" t on t."id" = d."term_id" where t."mapping_id" = $1)
         or exists (select 1 from "joint_distribution" j where j."mapping_id" = $1) as "has"`,
    [mappingId],
  )
  return has
}

/** The current data of a mapping at every state point, single ones first, each in the order of the terms. */
export async function currentData(manager: EntityManager, mappingId: string): Promise<MappingDatum[]> {
  const terms = await manager.find(Term, { where: { mappingId }, select: { id: true, position: true } })
  const rank = new Map(terms.map(({ id, position }) => [id, position]))
  const distributions = await manager.find(Distribution, {
    where: { termId: In([...rank.keys()]), supersededAt: IsNull() },
    select: { id: true, termId: true, statePointId: true, mappingVersion: true },
  })
  const joints = await manager.find(JointDistribution, {
    where: { mappingId, supersededAt: IsNull() },
    select: { id: true, firstTermId: true, secondTermId: true, statePointId: true, mappingVersion: true },
  })
  const data = [
    ...distributions.map(({ termId, statePointId, mappingVersion: version }) => ({
      termIds: [termId],
      statePointId,
      version,
    })),
    ...joints.map(({ firstTermId, secondTermId, statePointId, mappingVersion: version }) => ({
      termIds: [firstTermId, secondTermId],
      statePointId,
      version,
    })),
  ]
  const place = ({ termIds }: MappingDatum, at: number): number => rank.get(termIds[at]) ?? 0
  return data.sort(
    (a, b) =>
      a.termIds.length - b.termIds.length ||
      place(a, 0) - place(b, 0) ||
      place(a, 1) - place(b, 1) ||
      a.statePointId.localeCompare(b.statePointId),
  )
}
