import type { DataSource, EntityManager } from 'typeorm'
import type { z } from 'zod'
import { parseRepeatUnit } from '../../shared/chemistry'
import type {
  Polymer as PolymerBody,
  polymerCreateSchema,
  PolymerUpdate,
} from '../../shared/contracts/polymer'
import type { HistoryDetails } from '../../shared/contracts/history'
import { Mapping } from '../entities/mapping.entity'
import { Polymer } from '../entities/polymer.entity'
import { HttpError, notFound } from '../errors/http-error'
import type { Member } from './member'
import { recordPolymer } from './record-work'

/** `distributions` and `potentials` count what is current, over all mappings and state points. */
const WITH_COUNTS = `
  select p."id", p."group_id" as "groupId", p."name", p."smiles", p."notes", p."formula", p."mass",
         p."heavy_atoms" as "heavyAtoms", p."revision", g."demo", p."created_at" as "createdAt",
         (select count(*)::int from "state_point" s where s."polymer_id" = p."id") as "statePoints",
         (select count(*)::int from "mapping" m where m."polymer_id" = p."id") as "mappings",
         (select count(*)::int from "distribution" d join "term" t on t."id" = d."term_id"
            join "mapping" m on m."id" = t."mapping_id"
           where m."polymer_id" = p."id" and d."superseded_at" is null) as "distributions",
         (select count(*)::int from "potential" q join "term" t on t."id" = q."term_id"
            join "mapping" m on m."id" = t."mapping_id" where m."polymer_id" = p."id") as "potentials"
    from "polymer" p join "group" g on g."id" = p."group_id"
   where p."group_id" = $1`

type PolymerRow = Omit<PolymerBody, 'counts' | 'createdAt'> & PolymerBody['counts'] & { createdAt: Date }

/** Polymers of a group. */
export class PolymerService {
  constructor(private readonly dataSource: DataSource) {}

  /** The group's polymers, the newest first. */
  async list({ groupId }: Member): Promise<PolymerBody[]> {
    const rows: PolymerRow[] = await this.dataSource.query(
      `${WITH_COUNTS} order by p."created_at" desc, p."id"`,
      [groupId],
    )
    return rows.map(polymerBody)
  }

  /** @throws {HttpError} NOT_FOUND */
  get({ groupId }: Member, polymerId: string): Promise<PolymerBody> {
    return readPolymer(this.dataSource.manager, groupId, polymerId)
  }

  /**
   * @throws {InvalidInputError} what is wrong with the SMILES, and where
   * @throws {HttpError} NAME_TAKEN (by the database's constraint)
   */
  async create(member: Member, input: z.output<typeof polymerCreateSchema>): Promise<PolymerBody> {
    const chemistry = await readChemistry(input.smiles)
    const { name, notes } = input
    const record = { groupId: member.groupId, name, notes, ...chemistry, revision: 1 }
    return this.dataSource.transaction(async (manager) => {
      const polymer = await manager.save(Polymer, record)
      await recordPolymer(manager, member, 'polymer added', polymer)
      return readPolymer(manager, member.groupId, polymer.id)
    })
  }

  /**
   * @throws {HttpError} CONFLICT with the current polymer when someone saved in between; IN_USE when the SMILES would
   *   change under a mapping
   */
  async update(member: Member, polymerId: string, input: PolymerUpdate): Promise<PolymerBody> {
    const { groupId } = member
    const { revision, smiles, ...changes } = input
    return this.dataSource.transaction(async (manager) => {
      const where = { id: polymerId, groupId }
      const polymer = await manager.findOne(Polymer, { where, lock: { mode: 'pessimistic_write' } })
      if (!polymer) throw notFound('polymer')
      if (polymer.revision !== revision) {
        throw new HttpError(
          'CONFLICT',
          'Someone else changed this polymer in between. Look at it again first.',
          {
            details: await readPolymer(manager, groupId, polymerId),
          },
        )
      }
      const chemistry = smiles === undefined || smiles === polymer.smiles ? {} : await readChemistry(smiles)
      if ('smiles' in chemistry && (await manager.existsBy(Mapping, { polymerId }))) {
        throw new HttpError(
          'IN_USE',
          'A mapping stands on this repeat unit and counts its atoms: the SMILES stays as it is. For another one, make a new polymer.',
          { field: 'smiles' },
        )
      }
      await manager.update(Polymer, where, { ...changes, ...chemistry, revision: revision + 1 })
      const { name = polymer.name } = changes
      const renamed: HistoryDetails = name === polymer.name ? {} : { old: polymer.name }
      await recordPolymer(manager, member, 'polymer changed', { id: polymerId, name }, renamed)
      return readPolymer(manager, groupId, polymerId)
    })
  }

  /** Deletes the polymer with everything that stands on it: state points, mappings, distributions, files, potentials. */
  async remove(member: Member, polymerId: string): Promise<void> {
    await this.dataSource.transaction(async (manager) => {
      const where = { id: polymerId, groupId: member.groupId }
      const polymer = await manager.findOne(Polymer, { where, lock: { mode: 'pessimistic_write' } })
      if (!polymer) throw notFound('polymer')
      await recordPolymer(manager, member, 'polymer deleted', polymer)
      await manager.delete(Polymer, where)
    })
  }
}

async function readPolymer(manager: EntityManager, groupId: string, polymerId: string): Promise<PolymerBody> {
  const rows: PolymerRow[] = await manager.query(`${WITH_COUNTS} and p."id" = $2`, [groupId, polymerId])
  if (!rows[0]) throw notFound('polymer')
  return polymerBody(rows[0])
}

async function readChemistry(
  text: string,
): Promise<Pick<Polymer, 'smiles' | 'formula' | 'mass' | 'heavyAtoms'>> {
  const { smiles, formula, mass, atoms } = await parseRepeatUnit(text)
  return { smiles, formula, mass, heavyAtoms: atoms.length }
}

function polymerBody(row: PolymerRow): PolymerBody {
  const { statePoints, mappings, distributions, potentials, createdAt, ...rest } = row
  return {
    ...rest,
    createdAt: createdAt.toISOString(),
    counts: { statePoints, mappings, distributions, potentials },
  }
}
