import { type EntityManager, IsNull } from 'typeorm'
import type { Received } from '../../../shared/contracts/delivery'
import { Layout } from '../../entities/layout.entity'
import { Recipient } from '../../entities/recipient.entity'
import { ReturnedFile } from '../../entities/returned-file.entity'
import { documentOf, findVersion } from '../find-layout'
import type { ReleasedHandOver } from '../hand-over/archive'
import { readHandOverBody } from '../hand-over/hand-over-body'
import { releaseBody } from '../hand-over/release-body'
import { deliveredFiles } from './delivered-files'
import type { ReceivingParty } from './party'
import { questionBodies } from './question-bodies'
import { returnedBody } from './returned-body'

/** The page of a hand-over as its recipient sees it. */
export async function receivedBody(
  manager: EntityManager,
  handOver: ReleasedHandOver,
  party: ReceivingParty,
): Promise<Received> {
  const { name, email, via, recipientId } = party
  const recipient = await manager.findOneByOrFail(Recipient, { id: recipientId })
  const { files, tables, pack } = await deliveredFiles(manager, handOver, null)
  const head = await readHandOverBody(manager, handOver.groupId, handOver.id)
  const sheet = releaseBody(head, handOver.frozen, tables, files, pack())
  const { acknowledgedAt, acknowledgedBy, expiresAt } = recipient
  const { withdrawnAt, withdrawnReason } = handOver
  const returned = await manager.find(ReturnedFile, {
    where: { recipientId },
    relations: { recipient: true },
    order: { returnedAt: 'ASC' },
  })
  return {
    frozen: sheet.frozen,
    tables: sheet.tables,
    files: sheet.files,
    picture: sheet.picture,
    archive: sheet.archive,
    handOverId: handOver.id,
    via,
    recipient: { name, email },
    expiresAt: expiresAt.toISOString(),
    acknowledged:
      acknowledgedAt === null || acknowledgedBy === null
        ? null
        : { at: acknowledgedAt.toISOString(), by: acknowledgedBy },
    withdrawn: withdrawnAt === null ? null : { at: withdrawnAt.toISOString(), reason: withdrawnReason ?? '' },
    replacedBy: await replacementOf(manager, handOver, party),
    layouts: await layoutsFor(manager, handOver.groupId),
    questions: await questionBodies(manager, handOver.id, party),
    returned: returned.map(returnedBody),
  }
}

/** The newest hand-over in force that took the place of one; null while that is the current one. */
async function replacementOf(
  manager: EntityManager,
  { id }: ReleasedHandOver,
  { email, via }: ReceivingParty,
): Promise<Received['replacedBy']> {
  const rows: { id: string; number: number; sent: boolean }[] = await manager.query(
    `with recursive later as (
       select "id", "number", "standing" from "hand_over" where "previous_id" = $1
       union all
       select h."id", h."number", h."standing" from "hand_over" h join later l on h."previous_id" = l."id")
     select l."id", l."number",
            exists (select 1 from "recipient" r where r."hand_over_id" = l."id" and r."email" = $2
                      and r."revoked_at" is null) as "sent"
       from later l where l."standing" = 'released' order by l."number" desc limit 1`,
    [id, email],
  )
  const [later] = rows
  if (!later) return null
  const { number, sent } = later
  return { number, sent, id: sent && via === 'account' ? later.id : null }
}

async function layoutsFor(manager: EntityManager, groupId: string): Promise<Received['layouts']> {
  const layouts = await manager.find(Layout, {
    where: { groupId, archivedAt: IsNull() },
    order: { name: 'ASC' },
  })
  const found = []
  for (const layout of layouts) {
    const { id, name } = layout
    found.push({ id, name, document: documentOf(await findVersion(manager, layout, layout.version)) })
  }
  return found
}
