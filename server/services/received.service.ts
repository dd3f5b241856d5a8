import { type DataSource, type EntityManager, IsNull } from 'typeorm'
import type { Received, ReceivedEntry } from '../../shared/contracts/delivery'
import type { OwnLayout, Written, WritingQuery } from '../../shared/contracts/delivery-writing'
import { DeliveryDownload } from '../entities/delivery-download.entity'
import { Recipient } from '../entities/recipient.entity'
import { HttpError, notFound } from '../errors/http-error'
import type { LinkTo } from '../mail/links'
import { mailGroup } from './delivery/delivery-mails'
import { deliveryLayout, type DeliveryLayout, ownLayout } from './delivery/delivery-layout'
import { deliveredFiles, type DeliveredFiles } from './delivery/delivered-files'
import { actorOf, partyByAccount, partyByToken, type ReceivingParty } from './delivery/party'
import { receivedBody } from './delivery/received-body'
import { receivedEntries } from './delivery/received-entries'
import type { ReleasedHandOver } from './hand-over/archive'
import { findReleased } from './hand-over/find-released'
import { handOverSubject } from './hand-over/hand-over-name'
import { firstLines } from './hand-over/release-body'
import { sha256 } from './hashes'
import type { Download } from './member'
import { recordEvent } from './record-event'

/** What a recipient does with a hand-over: looks at it, takes it, says that it came. */
export class ReceivedService {
  constructor(
    private readonly dataSource: DataSource,
    private readonly linkTo: LinkTo,
  ) {}

  /** Whose link it is. @throws {HttpError} LINK_INVALID with the reason */
  byToken(token: string): Promise<ReceivingParty> {
    return partyByToken(this.dataSource.manager, token)
  }

  /** The delivery of a hand-over to somebody's account; null when it was not sent to them or was revoked. */
  byAccount(handOverId: string, userId: string): Promise<ReceivingParty | null> {
    return partyByAccount(this.dataSource.manager, handOverId, userId)
  }

  /** The hand-overs that were sent to somebody's address or account, the newest first. */
  list(userId: string): Promise<ReceivedEntry[]> {
    return receivedEntries(this.dataSource.manager, userId)
  }

  /** The page. The first look at it is on record. @throws {HttpError} FILE_DAMAGED */
  async page(party: ReceivingParty): Promise<Received> {
    const { handOverId, groupId, recipientId } = party
    return this.dataSource.transaction(async (manager) => {
      const handOver = await findReleased(manager, groupId, handOverId)
      const opened = await manager.update(
        Recipient,
        { id: recipientId, openedAt: IsNull() },
        { openedAt: new Date() },
      )
      if (opened.affected === 1) {
        await recordEvent(manager, actorOf(party), {
          action: 'hand-over opened',
          subject: handOverSubject(handOver),
          details: { via: party.via },
        })
      }
      return receivedBody(manager, handOver, party)
    })
  }

  /** Everything in one archive, in the layout asked for; of a withdrawn one too, since it says so. @throws {HttpError} FILE_DAMAGED */
  async archive(party: ReceivingParty, query: WritingQuery): Promise<Download> {
    return this.take(party, (manager, handOver) => deliveryLayout(manager, handOver, query), packAll)
  }

  /** The same in a layout of the recipient's own. @throws {InvalidInputError} as `ownLayout` and `writeLayout` */
  async ownArchive(party: ReceivingParty, own: OwnLayout): Promise<Download> {
    return this.take(party, () => ownLayout(own), packAll)
  }

  /**
   * One file, by its path in the release.
   *
   * @throws {HttpError} NOT_FOUND; FILE_DAMAGED; HAND_OVER_WITHDRAWN: a single file does not say that it was withdrawn
   */
  async file(party: ReceivingParty, path: string, query: WritingQuery): Promise<Download> {
    return this.take(party, (manager, handOver) => deliveryLayout(manager, handOver, query), pickOne(path))
  }

  /** The same in a layout of the recipient's own. */
  async ownFile(party: ReceivingParty, path: string, own: OwnLayout): Promise<Download> {
    return this.take(party, () => ownLayout(own), pickOne(path))
  }

  /** What a layout makes of the tables: checksums and first lines, before anything is taken. */
  async written(party: ReceivingParty, query: WritingQuery): Promise<Written> {
    return this.look(party, (manager, handOver) => deliveryLayout(manager, handOver, query))
  }

  /** The same of a layout of the recipient's own. @throws {InvalidInputError} as `ownLayout` and `writeLayout` */
  async ownWritten(party: ReceivingParty, own: OwnLayout): Promise<Written> {
    return this.look(party, () => ownLayout(own))
  }

  /** Says that it came. The first name stays. @throws {HttpError} CONFLICT when that was said before */
  async acknowledge(party: ReceivingParty, name: string): Promise<Received> {
    await this.dataSource.transaction(async (manager) => {
      const handOver = await findReleased(manager, party.groupId, party.handOverId)
      const done = await manager.update(
        Recipient,
        { id: party.recipientId, acknowledgedAt: IsNull() },
        { acknowledgedAt: new Date(), acknowledgedBy: name },
      )
      if (done.affected !== 1) throw new HttpError('CONFLICT', 'Receipt was acknowledged before.')
      await recordEvent(manager, actorOf(party), {
        action: 'receipt acknowledged',
        subject: handOverSubject(handOver),
        details: { name },
      })
      const { number } = handOver.frozen
      await mailGroup(manager, handOver, this.linkTo, {
        event: `receipt ${party.recipientId}`,
        subject: `${name} has received hand-over ${number}`,
        lines: [`${name} acknowledges receipt of hand-over ${number}, "${handOver.title}".`],
      })
    })
    return this.page(party)
  }

  private async look(party: ReceivingParty, layoutOf: LayoutOf): Promise<Written> {
    const { manager } = this.dataSource
    const handOver = await findReleased(manager, party.groupId, party.handOverId)
    const delivered = await deliveredFiles(manager, handOver, await layoutOf(manager, handOver))
    const { fileName, bytes } = delivered.pack()
    return {
      layout: delivered.layout,
      archive: { fileName, size: bytes.length, sha256: sha256(bytes) },
      files: delivered.files.map(({ path, mediaType, bytes: content }) => ({
        path,
        mediaType,
        size: content.length,
        sha256: sha256(content),
      })),
      tables: delivered.tables.map(({ name, path }) => ({
        name,
        path,
        written: delivered.nameOf(path),
        firstLines: firstLines(Buffer.from(fileIn(delivered, path).bytes).toString()),
      })),
    }
  }

  private async take(
    party: ReceivingParty,
    layoutOf: LayoutOf,
    pick: (delivered: DeliveredFiles, handOver: ReleasedHandOver) => Download,
  ): Promise<Download> {
    return this.dataSource.transaction(async (manager) => {
      const handOver = await findReleased(manager, party.groupId, party.handOverId)
      const delivered = await deliveredFiles(manager, handOver, await layoutOf(manager, handOver))
      const taken = pick(delivered, handOver)
      const { groupId, recipientId, via } = party
      const what = { file: taken.fileName, layout: delivered.layout }
      await manager.insert(DeliveryDownload, { groupId, recipientId, ...what, via, at: new Date() })
      await recordEvent(manager, actorOf(party), {
        action: 'file downloaded',
        subject: handOverSubject(handOver),
        details: { ...what, via },
      })
      return taken
    })
  }
}

type LayoutOf = (
  manager: EntityManager,
  handOver: ReleasedHandOver,
) => DeliveryLayout | null | Promise<DeliveryLayout | null>

function packAll(delivered: DeliveredFiles): Download {
  return delivered.pack()
}

function pickOne(path: string) {
  return (delivered: DeliveredFiles, handOver: ReleasedHandOver): Download => {
    if (handOver.withdrawnAt !== null) {
      throw new HttpError(
        'HAND_OVER_WITHDRAWN',
        'This hand-over was withdrawn. For the record its archive can be had, which says so.',
      )
    }
    const { path: fileName, bytes } = fileIn(delivered, path)
    return { fileName, bytes }
  }
}

/** @param path in the release; of a table the layout may call it differently */
function fileIn({ files, tables, nameOf }: DeliveredFiles, path: string): DeliveredFiles['files'][number] {
  const wanted = tables.some((table) => table.path === path) ? nameOf(path) : path
  const file = files.find((each) => each.path === wanted)
  if (!file) throw notFound('file in this hand-over', 'path')
  return file
}
