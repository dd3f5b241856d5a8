import type { HandOverRelease } from '@shared/contracts/hand-over-desk'
import type { Deliveries } from '@shared/contracts/delivery'
import type { ApiServer } from './api-server'
import type { TestGroup } from './group-builder'
import { buildReleased } from './hand-over-builder'
import type { Job } from './job-builder'
import { mailsTo, newAddress } from './mail-texts'

/** A released hand-over with one recipient, and the token of the link that was mailed. */
export interface Delivery {
  readonly handOver: HandOverRelease
  readonly job: Job
  readonly email: string
  readonly recipientId: string
  readonly token: string
}

/** Releases a hand-over and sends it to an address, a new one unless it is given. */
export async function buildDelivery(
  server: ApiServer,
  group: TestGroup,
  options: { readonly job?: Job; readonly email?: string; readonly title?: string } = {},
): Promise<Delivery> {
  const { handOver, job } = await buildReleased(server.services, group, options)
  const email = options.email ?? newAddress()
  const { recipients } = await sendTo(server, group, handOver.id, email)
  const recipientId = recipients.find((each) => each.email === email)?.id ?? ''
  return { handOver, job, email, recipientId, token: await receivedToken(server, email) }
}

/** Sends a released hand-over to one address, as the modeller. */
export function sendTo(
  server: ApiServer,
  { modeller }: TestGroup,
  handOverId: string,
  email: string,
): Promise<Deliveries> {
  return server.services.recipients.send(modeller.member, handOverId, {
    recipients: [{ name: 'Rhea Recipient', email }],
    earlier: false,
    days: 90,
    message: '',
  })
}

/** The token of the link in the latest e-mail to an address that has one. */
export async function receivedToken(server: ApiServer, address: string): Promise<string> {
  for (const { text } of await mailsTo(server, address)) {
    const [, token] = /^https:\/\/beads\.example\/received\/(\S+)$/m.exec(text) ?? []
    if (token !== undefined) return token
  }
  throw new Error(`No link to a hand-over was mailed to ${address}.`)
}
