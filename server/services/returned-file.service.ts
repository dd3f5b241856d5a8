import { promisify } from 'node:util'
import { gunzip } from 'node:zlib'
import type { DataSource } from 'typeorm'
import type { z } from 'zod'
import type { Deliveries, Received, ReturnStanding, returnSendSchema } from '../../shared/contracts/delivery'
import { HandOverTable } from '../entities/hand-over-table.entity'
import { ReturnedFile } from '../entities/returned-file.entity'
import { HttpError, notFound } from '../errors/http-error'
import type { LinkTo } from '../mail/links'
import { deliveriesBody } from './delivery/deliveries-body'
import { mailGroup } from './delivery/delivery-mails'
import { actorOf, type ReceivingParty } from './delivery/party'
import { readReturned } from './delivery/read-returned'
import { receivedBody } from './delivery/received-body'
import { findReleased } from './hand-over/find-released'
import { handOverSubject } from './hand-over/hand-over-name'
import type { Download, Member, UploadedFile } from './member'
import { recordEvent } from './record-event'
import { packFile, textOf } from './source-files'

const decompress = promisify(gunzip)

/** Files of one recipient that may wait to be looked at at the same time. */
export const OPEN_RETURNS = 20

/** Distributions that recipients measured with the tables and sent back. */
export class ReturnedFileService {
  constructor(
    private readonly dataSource: DataSource,
    private readonly linkTo: LinkTo,
  ) {}

  /**
   * Takes a file that can be read as a distribution of the table's coordinates. It becomes nobody's data by that.
   *
   * @throws {InvalidInputError} what the reader refuses, with line and column; nothing is stored then
   * @throws {HttpError} NOT_FOUND for a table that is not in the hand-over; TOO_MANY_OPEN
   */
  async send(
    party: ReceivingParty,
    { table, note }: z.output<typeof returnSendSchema>,
    file: UploadedFile,
  ): Promise<Received> {
    const { groupId, handOverId, recipientId, name } = party
    const about = await this.dataSource.manager.findOne(HandOverTable, {
      where: { handOverId, name: table },
      select: { id: true, kinds: true },
    })
    if (!about) throw notFound('table in this hand-over', 'table')
    const reading = readReturned(textOf(file.bytes), about.kinds)
    const packed = await packFile(file)
    return this.dataSource.transaction(async (manager) => {
      const handOver = await findReleased(manager, groupId, handOverId)
      await manager.query('select 1 from "recipient" where "id" = $1 for update', [recipientId])
      if ((await manager.countBy(ReturnedFile, { recipientId, standing: 'new' })) >= OPEN_RETURNS) {
        throw new HttpError('TOO_MANY_OPEN', `${OPEN_RETURNS} files wait to be looked at: await that.`)
      }
      const { id } = await manager.save(ReturnedFile, {
        groupId,
        recipientId,
        tableName: table,
        ...packed,
        note,
        reading,
        returnedAt: new Date(),
        standing: 'new',
        settledById: null,
        settledAt: null,
      })
      const details = { table, file: file.name }
      const subject = handOverSubject(handOver)
      await recordEvent(manager, actorOf(party), { action: 'file sent back', subject, details })
      await mailGroup(manager, handOver, this.linkTo, {
        event: `returned file ${id}`,
        subject: `File sent back for ${table} of hand-over ${handOver.frozen.number}`,
        lines: [`${name} sent back ${file.name}, measured with the table ${table}: ${reading}.`, note],
      })
      return receivedBody(manager, handOver, party)
    })
  }

  /** The file as it came. @throws {HttpError} NOT_FOUND */
  async file({ groupId }: Member, id: string): Promise<Download> {
    const file = await this.dataSource.manager.findOne(ReturnedFile, {
      where: { id, groupId },
      select: { id: true, name: true, gzip: true },
    })
    if (!file) throw notFound('returned file')
    return { fileName: file.name, bytes: await decompress(file.gzip) }
  }

  /** Marks a file as taken or set aside; what was marked may be marked anew. @throws {HttpError} NOT_FOUND */
  async settle(member: Member, id: string, standing: Exclude<ReturnStanding, 'new'>): Promise<Deliveries> {
    const { groupId, userId } = member
    return this.dataSource.transaction(async (manager) => {
      const file = await manager.findOne(ReturnedFile, {
        where: { id, groupId },
        relations: { recipient: true },
      })
      if (!file?.recipient) throw notFound('returned file')
      await manager.update(ReturnedFile, { id }, { standing, settledById: userId, settledAt: new Date() })
      const handOver = await findReleased(manager, groupId, file.recipient.handOverId)
      await recordEvent(manager, member, {
        action: standing === 'taken' ? 'file taken' : 'file set aside',
        subject: handOverSubject(handOver),
        details: { table: file.tableName, file: file.name },
      })
      return deliveriesBody(manager, handOver)
    })
  }
}
