import { type DataSource, type EntityManager, IsNull } from 'typeorm'
import {
  INVITATION_DAYS,
  type Invitation as InvitationBody,
  type Invite,
} from '../../shared/contracts/people'
import { Group } from '../entities/group.entity'
import { Invitation } from '../entities/invitation.entity'
import { User } from '../entities/user.entity'
import { HttpError, notFound } from '../errors/http-error'
import type { LinkTo } from '../mail/links'
import { queueMail } from '../mail/queue-mail'
import { invitationMail } from './invitation-mail'
import { lockMembersAsOwner } from './lock-members'
import type { Member } from './member'
import { personOf } from './people'
import { recordEvent } from './record-event'
import { makeToken } from './tokens'

const OPEN = { acceptedAt: IsNull(), revokedAt: IsNull() }

/** Invitations, as an owner handles them. What whoever is invited does with them: JoinService. */
export class InvitationService {
  constructor(
    private readonly dataSource: DataSource,
    private readonly linkTo: LinkTo,
  ) {}

  /** Those that nobody has taken up or revoked, the newest first; out of date ones too. */
  async list({ groupId }: Member): Promise<InvitationBody[]> {
    const invitations = await this.dataSource.manager.find(Invitation, {
      where: { groupId, ...OPEN },
      relations: { invitedBy: true },
      order: { createdAt: 'DESC', id: 'ASC' },
    })
    return invitations.map(invitationBody)
  }

  /**
   * Invites someone by e-mail. An invitation to the same address that is out of date gives way.
   *
   * @throws {HttpError} ALREADY_MEMBER; IN_USE while an invitation to the address is open; FORBIDDEN for an owner of before
   */
  async invite(owner: Member, { email, role }: Invite): Promise<InvitationBody> {
    const { groupId, userId } = owner
    return this.dataSource.transaction(async (manager) => {
      const members = await lockMembersAsOwner(manager, owner)
      if (members.some(({ user }) => user?.email === email)) {
        throw new HttpError('ALREADY_MEMBER', 'Someone with this address is in the group.', {
          field: 'email',
        })
      }
      await makeWay(manager, groupId, email)
      const { token, tokenSha256 } = makeToken()
      const invitation = await manager.save(Invitation, {
        groupId,
        email,
        role,
        tokenSha256,
        sent: 1,
        expiresAt: expiry(),
        acceptedAt: null,
        revokedAt: null,
        invitedById: userId,
      })
      await this.send(manager, invitation, token)
      await recordEvent(manager, owner, {
        action: 'member invited',
        subject: subjectOf(invitation),
        details: { role },
      })
      return readInvitation(manager, invitation.id)
    })
  }

  /**
   * Sends an invitation once more, under a new link with new days to run; the link of before ends.
   *
   * @throws {HttpError} NOT_FOUND when it was taken up or revoked
   */
  async sendAgain(owner: Member, invitationId: string): Promise<InvitationBody> {
    return this.dataSource.transaction(async (manager) => {
      const invitation = await lockOpen(manager, owner.groupId, invitationId)
      const { token, tokenSha256 } = makeToken()
      const sent = invitation.sent + 1
      await manager.update(Invitation, { id: invitationId }, { tokenSha256, sent, expiresAt: expiry() })
      await this.send(manager, { ...invitation, sent }, token)
      await recordEvent(manager, owner, {
        action: 'invitation sent again',
        subject: subjectOf(invitation),
        details: { role: invitation.role },
      })
      return readInvitation(manager, invitationId)
    })
  }

  /** Ends an invitation. @throws {HttpError} NOT_FOUND when it was taken up or revoked */
  async revoke(owner: Member, invitationId: string): Promise<void> {
    await this.dataSource.transaction(async (manager) => {
      const invitation = await lockOpen(manager, owner.groupId, invitationId)
      await manager.update(Invitation, { id: invitationId }, { revokedAt: new Date() })
      await recordEvent(manager, owner, {
        action: 'invitation revoked',
        subject: subjectOf(invitation),
        details: { role: invitation.role },
      })
    })
  }

  private async send(manager: EntityManager, invitation: Invitation, token: string): Promise<void> {
    const { id, groupId, email, sent, invitedById, role } = invitation
    const group = await manager.findOneByOrFail(Group, { id: groupId })
    const inviter = invitedById === null ? null : await manager.findOneBy(User, { id: invitedById })
    const link = this.linkTo(`/join/${token}`)
    await queueMail(manager, {
      eventKey: `invitation ${id}, ${sent}`,
      groupId,
      to: email,
      ...invitationMail({ groupName: group.name, role, inviter: inviter?.name ?? null, link }),
    })
  }
}

/** @throws {HttpError} IN_USE */
async function makeWay(manager: EntityManager, groupId: string, email: string): Promise<void> {
  const open = await manager.findOneBy(Invitation, { groupId, email, ...OPEN })
  if (!open) return
  if (open.expiresAt > new Date()) {
    throw new HttpError('IN_USE', 'An invitation to this address is open: send it again or revoke it.', {
      field: 'email',
    })
  }
  await manager.update(Invitation, { id: open.id }, { revokedAt: new Date() })
}

async function lockOpen(manager: EntityManager, groupId: string, id: string): Promise<Invitation> {
  const invitation = await manager.findOne(Invitation, {
    where: { id, groupId, ...OPEN },
    lock: { mode: 'pessimistic_write' },
  })
  if (!invitation) throw notFound('invitation')
  return invitation
}

async function readInvitation(manager: EntityManager, id: string): Promise<InvitationBody> {
  return invitationBody(
    await manager.findOneOrFail(Invitation, { where: { id }, relations: { invitedBy: true } }),
  )
}

function expiry(): Date {
  return new Date(Date.now() + INVITATION_DAYS * 86_400_000)
}

function subjectOf({ id, email }: Invitation) {
  return { kind: 'invitation', id, name: email }
}

function invitationBody(invitation: Invitation): InvitationBody {
  const { id, email, role, createdAt, expiresAt, sent, invitedBy } = invitation
  return {
    id,
    email,
    role,
    invitedBy: personOf(invitedBy),
    createdAt: createdAt.toISOString(),
    expiresAt: expiresAt.toISOString(),
    expired: expiresAt <= new Date(),
    sent,
  }
}
