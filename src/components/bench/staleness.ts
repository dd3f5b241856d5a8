import type { Distribution } from '@shared/contracts/distribution'
import type { StoredPotential } from '@shared/contracts/potential'
import { formatDay } from '@/format/dates'

/** Why a saved potential no longer follows from what is stored, as the end of a sentence. */
export function staleReason(
  potential: Pick<StoredPotential, 'distributionId'>,
  distribution: Pick<Distribution, 'id' | 'file'>,
): string {
  return potential.distributionId === distribution.id
    ? 'its temperature, or how many independent samples it rests on, changed since'
    : `the distribution was replaced on ${formatDay(distribution.file.uploadedAt)}`
}
