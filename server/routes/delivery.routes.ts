import {
  answerWriteSchema,
  deliveriesSchema,
  deliverySendSchema,
  linkDaysSchema,
  questionAskSchema,
  returnSettleSchema,
} from '../../shared/contracts/delivery'
import { route } from './route'

const deliveries = { status: 200, body: deliveriesSchema } as const
const sent = { status: 201, body: deliveriesSchema } as const

/** Released hand-overs on their way to recipients, as the group handles them. */
export const deliveryRoutes = [
  route({
    method: 'get',
    path: '/api/hand-overs/:handOverId/deliveries',
    summary: 'Recipients of a released hand-over, what they took, asked and sent back',
    access: { may: 'read', at: 'handOver' },
    answer: deliveries,
    handle: ({ services, member, params }) => services.recipients.list(member, params.handOverId),
  }),
  route({
    method: 'post',
    path: '/api/hand-overs/:handOverId/deliveries',
    summary: 'Send a released hand-over by e-mail, each recipient a link of their own',
    access: { may: 'write', at: 'handOver' },
    body: deliverySendSchema,
    answer: sent,
    errors: ['IN_USE', 'HAND_OVER_WITHDRAWN', 'MAIL_ADDRESS_INVALID'],
    handle: ({ services, member, params, body }) => services.recipients.send(member, params.handOverId, body),
  }),
  route({
    method: 'post',
    path: '/api/recipients/:recipientId/send',
    summary: 'Send a new link; those before end',
    access: { may: 'write', at: 'recipient' },
    body: linkDaysSchema,
    answer: deliveries,
    errors: ['HAND_OVER_WITHDRAWN'],
    handle: ({ services, member, params, body }) =>
      services.recipients.sendAgain(member, params.recipientId, body.days),
  }),
  route({
    method: 'patch',
    path: '/api/recipients/:recipientId',
    summary: 'Let the link that is out work for so many days from now',
    access: { may: 'write', at: 'recipient' },
    body: linkDaysSchema,
    answer: deliveries,
    errors: ['CONFLICT'],
    handle: ({ services, member, params, body }) =>
      services.recipients.extend(member, params.recipientId, body.days),
  }),
  route({
    method: 'post',
    path: '/api/recipients/:recipientId/revoke',
    summary: 'End a link, and what the account sees; what was taken stays on record',
    access: { may: 'write', at: 'recipient' },
    answer: deliveries,
    handle: ({ services, member, params }) => services.recipients.revoke(member, params.recipientId),
  }),
  route({
    method: 'post',
    path: '/api/hand-overs/:handOverId/questions',
    summary: 'Ask on a table, for all recipients to see',
    access: { may: 'read', at: 'handOver' },
    scope: 'hand-overs',
    body: questionAskSchema,
    answer: sent,
    handle: ({ services, member, params, body }) =>
      services.questions.askAsMember(member, params.handOverId, body),
  }),
  route({
    method: 'post',
    path: '/api/questions/:questionId/answer',
    summary: 'Answer a question; every recipient sees it, the asker is told',
    access: { may: 'write', at: 'question' },
    body: answerWriteSchema,
    answer: sent,
    errors: ['CONFLICT'],
    handle: ({ services, member, params, body }) =>
      services.questions.answer(member, params.questionId, body.text),
  }),
  route({
    method: 'get',
    path: '/api/returned-files/:returnedFileId/file',
    summary: 'A file that a recipient sent back, as it came',
    access: { may: 'read', at: 'returnedFile' },
    answer: { status: 200, download: 'application/octet-stream' },
    handle: ({ services, member, params }) => services.returnedFiles.file(member, params.returnedFileId),
  }),
  route({
    method: 'put',
    path: '/api/returned-files/:returnedFileId',
    summary: 'Mark a file that came back as taken or set aside',
    access: { may: 'write', at: 'returnedFile' },
    body: returnSettleSchema,
    answer: deliveries,
    handle: ({ services, member, params, body }) =>
      services.returnedFiles.settle(member, params.returnedFileId, body.standing),
  }),
]
