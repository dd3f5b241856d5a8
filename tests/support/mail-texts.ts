import type { ApiServer } from './api-server'

/** A mail as it waits in the queue. */
export interface WaitingMail {
  readonly to: string
  readonly subject: string
  readonly text: string
}

/** The mails queued for an address, the latest first. */
export function mailsTo(server: ApiServer, address: string): Promise<WaitingMail[]> {
  return server.dataSource.query(
    `select "to", "subject", "text" from "mail" where "to" = $1 order by "created_at" desc`,
    [address],
  )
}

/** The token of the link in the latest mail to an address. */
export async function latestToken(
  server: ApiServer,
  address: string,
  page: 'join' | 'reset',
): Promise<string> {
  const [mail] = await mailsTo(server, address)
  const [, token] = new RegExp(`^https://beads\\.example/${page}/(\\S+)$`, 'm').exec(mail?.text ?? '') ?? []
  if (token === undefined) throw new Error(`No link to ${page} in the latest mail to ${address}.`)
  return token
}

let count = 0

/** An address nobody else in the test has. */
export function newAddress(): string {
  count++
  return `new.person.${count}@example.org`
}
