import type { Role } from '../../shared/contracts/common'
import { INVITATION_DAYS } from '../../shared/contracts/people'

const MAY: Readonly<Record<Role, string>> = {
  owner: 'As an owner you run the group, and do everything a modeller and a reviewer do.',
  modeller: 'As a modeller you make mappings, bring in data and make potentials and tables.',
  reviewer: 'As a reviewer you see all the evidence, and sign off hand-overs or send them back.',
  collaborator: 'As a collaborator you see what is handed over to you.',
}

/** Subject and text of an invitation. */
export function invitationMail(invitation: {
  readonly groupName: string
  readonly role: Role
  readonly inviter: string | null
  readonly link: string
}): { readonly subject: string; readonly text: string } {
  const { groupName, role, inviter, link } = invitation
  return {
    subject: `Invitation to ${groupName}`,
    text: [
      `${inviter ?? 'An owner'} invites you to join ${groupName} on Beadwright. ${MAY[role]}`,
      `Join here:\n${link}`,
      `The link works once, for ${INVITATION_DAYS} days. If you did not expect it, leave it: nothing happens.`,
    ].join('\n\n'),
  }
}
