import { type DataSource, type EntityManager, IsNull } from 'typeorm'
import type { Deliveries, QuestionAsk, Received } from '../../shared/contracts/delivery'
import { HandOverTable } from '../entities/hand-over-table.entity'
import { Question } from '../entities/question.entity'
import { Recipient } from '../entities/recipient.entity'
import { User } from '../entities/user.entity'
import { HttpError, notFound } from '../errors/http-error'
import type { LinkTo } from '../mail/links'
import { deliveriesBody } from './delivery/deliveries-body'
import { mailAnswer, mailGroup } from './delivery/delivery-mails'
import { actorOf, type ReceivingParty } from './delivery/party'
import { receivedBody } from './delivery/received-body'
import type { ReleasedHandOver } from './hand-over/archive'
import { findReleased } from './hand-over/find-released'
import { handOverSubject } from './hand-over/hand-over-name'
import type { Member } from './member'
import { type Actor, recordEvent } from './record-event'

/** Questions of one recipient that may wait for an answer at the same time. */
export const OPEN_QUESTIONS = 20

/** Questions on the tables of a released hand-over, and the answers, which every recipient sees. */
export class QuestionService {
  constructor(
    private readonly dataSource: DataSource,
    private readonly linkTo: LinkTo,
  ) {}

  /**
   * A recipient asks; author and owners hear of it by e-mail.
   *
   * @throws {HttpError} NOT_FOUND for a table that is not in the hand-over; TOO_MANY_OPEN
   */
  async ask(party: ReceivingParty, what: QuestionAsk): Promise<Received> {
    const { groupId, handOverId, recipientId, userId, name } = party
    return this.dataSource.transaction(async (manager) => {
      const handOver = await findReleased(manager, groupId, handOverId)
      // Held, so that questions sent at the same time are counted one after the other.
      await manager.query('select 1 from "recipient" where "id" = $1 for update', [recipientId])
      const open = await manager.countBy(Question, { recipientId, answeredAt: IsNull() })
      if (open >= OPEN_QUESTIONS) {
        throw new HttpError('TOO_MANY_OPEN', `${OPEN_QUESTIONS} questions wait for an answer: await it.`)
      }
      await this.store(manager, handOver, actorOf(party), what, { recipientId, askedById: userId, name })
      return receivedBody(manager, handOver, party)
    })
  }

  /** Somebody of the group asks, for recipients to see with the answer. @throws {HttpError} NOT_FOUND */
  async askAsMember(member: Member, handOverId: string, what: QuestionAsk): Promise<Deliveries> {
    return this.dataSource.transaction(async (manager) => {
      const handOver = await findReleased(manager, member.groupId, handOverId)
      const { name } = await manager.findOneByOrFail(User, { id: member.userId })
      await this.store(manager, handOver, member, what, {
        recipientId: null,
        askedById: member.userId,
        name,
      })
      return deliveriesBody(manager, handOver)
    })
  }

  /**
   * Answers. A recipient who asked hears of it by e-mail.
   *
   * @throws {HttpError} NOT_FOUND; CONFLICT with the answer that a colleague gave first
   */
  async answer(member: Member, questionId: string, text: string): Promise<Deliveries> {
    const { groupId, userId } = member
    return this.dataSource.transaction(async (manager) => {
      const question = await manager.findOne(Question, {
        where: { id: questionId, groupId },
        lock: { mode: 'pessimistic_write' },
      })
      if (!question) throw notFound('question')
      const handOver = await findReleased(manager, groupId, question.handOverId)
      if (question.answer !== null) {
        const details = { answer: question.answer }
        throw new HttpError('CONFLICT', 'This question was answered in between.', { details })
      }
      await manager.save(
        Question,
        Object.assign(question, { answer: text, answeredById: userId, answeredAt: new Date() }),
      )
      await recordEvent(manager, member, {
        action: 'question answered',
        subject: handOverSubject(handOver),
        details: { table: question.tableName },
      })
      const { name: by } = await manager.findOneByOrFail(User, { id: userId })
      const to = question.recipientId && (await manager.findOneBy(Recipient, { id: question.recipientId }))
      if (to && to.revokedAt === null) {
        const words = { question: question.text, answer: text, by }
        await mailAnswer(manager, { handOver, questionId, to, ...words })
      }
      return deliveriesBody(manager, handOver)
    })
  }

  private async store(
    manager: EntityManager,
    handOver: ReleasedHandOver,
    actor: Actor,
    { table, text }: QuestionAsk,
    { name, ...asker }: Pick<Question, 'recipientId' | 'askedById'> & { readonly name: string },
  ): Promise<void> {
    const { id: handOverId, groupId, frozen } = handOver
    if (table !== null && !(await manager.existsBy(HandOverTable, { handOverId, name: table }))) {
      throw notFound('table in this hand-over', 'table')
    }
    const question = await manager.save(Question, {
      groupId,
      handOverId,
      tableName: table,
      text,
      ...asker,
      askedAt: new Date(),
      answer: null,
      answeredById: null,
      answeredAt: null,
    })
    const details = { table }
    await recordEvent(manager, actor, {
      action: 'question asked',
      subject: handOverSubject(handOver),
      details,
    })
    const about = table === null ? 'the whole' : table
    await mailGroup(manager, handOver, this.linkTo, {
      event: `question ${question.id}, asked`,
      subject: `Question on hand-over ${frozen.number}: ${about}`,
      lines: [`${name} asks about ${about} of hand-over ${frozen.number}, "${handOver.title}":`, text],
    })
  }
}
