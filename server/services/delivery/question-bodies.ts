import type { EntityManager } from 'typeorm'
import type { Question as QuestionBody } from '../../../shared/contracts/delivery'
import { Question } from '../../entities/question.entity'
import type { ReceivingParty } from './party'

/**
 * The questions on a hand-over, the oldest first. To a recipient other recipients have no name, let alone an address.
 *
 * @param reader null for the group, which sees who asked
 */
export async function questionBodies(
  manager: EntityManager,
  handOverId: string,
  reader: ReceivingParty | null,
): Promise<QuestionBody[]> {
  const questions = await manager.find(Question, {
    where: { handOverId },
    relations: { recipient: true, askedBy: true, answeredBy: true },
    order: { askedAt: 'ASC' },
  })
  return questions.map((question) => {
    const { id, tableName, text, askedAt, recipientId, recipient, askedBy, answer, answeredAt } = question
    const own = reader !== null && recipientId === reader.recipientId
    const asker = recipient ? recipient.name : (askedBy?.name ?? null)
    return {
      id,
      table: tableName,
      text,
      askedAt: askedAt.toISOString(),
      askedBy: reader === null || own || recipientId === null ? asker : null,
      own,
      answer:
        answer === null || answeredAt === null
          ? null
          : { text: answer, by: question.answeredBy?.name ?? null, at: answeredAt.toISOString() },
    }
  })
}
