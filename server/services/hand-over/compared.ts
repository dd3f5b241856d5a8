import type { EntityManager } from 'typeorm'
import { inversionSettingsSchema } from '../../../shared/contracts/potential'
import type { FrozenHandOver } from '../../../shared/contracts/hand-over'
import type { ComparedHandOver, ComparedTable } from '../../../shared/hand-over'
import { HandOverFile } from '../../entities/hand-over-file.entity'
import { HandOverTable } from '../../entities/hand-over-table.entity'
import type { HandOver } from '../../entities/hand-over.entity'
import { sha256 } from '../hashes'
import type { WrittenTable } from './written-table'

type Numbers = Pick<WrittenTable, 'name' | 'kinds' | 'meta'> & {
  readonly [Column in 'coordinates' | 'energies' | 'forces']: ArrayLike<number>
} & { readonly [Column in 'secondCoordinates' | 'secondForces']: ArrayLike<number> | null }

/** A hand-over that is being released, as comparing takes it. */
export function comparedNow(
  frozen: Omit<FrozenHandOver, 'differences'>,
  tables: readonly WrittenTable[],
): ComparedHandOver {
  return { ...frozen, tables: tables.map((table) => comparedTable(table, sha256(table.text))) }
}

/** A released hand-over, as comparing takes it. */
export async function comparedThen(
  manager: EntityManager,
  { id, frozen }: HandOver,
): Promise<ComparedHandOver | null> {
  if (frozen === null) return null
  const tables = await manager.find(HandOverTable, { where: { handOverId: id }, order: { position: 'ASC' } })
  const files = await manager.find(HandOverFile, {
    where: { handOverId: id },
    select: { id: true, path: true, sha256: true },
  })
  const sumOf = (path: string): string => files.find((file) => file.path === path)?.sha256 ?? ''
  return { ...frozen, tables: tables.map((table) => comparedTable(table, sumOf(table.path))) }
}

function comparedTable(table: Numbers, fileSha256: string): ComparedTable {
  const { name, kinds, coordinates, secondCoordinates, energies, forces, secondForces, meta } = table
  const columns = [coordinates, secondCoordinates, energies, forces, secondForces]
  return {
    name,
    kinds,
    coordinates,
    secondCoordinates,
    energies,
    settings: meta.settings === null ? null : inversionSettingsSchema.parse(meta.settings),
    numbersSha256: sha256(JSON.stringify(columns.map((column) => column && Array.from(column)))),
    fileSha256,
    reason: meta.reason,
  }
}
