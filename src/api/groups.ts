import type { Group, GroupUpdate } from '@shared/contracts/group'
import type { HistoryFilter, HistoryPage } from '@shared/contracts/history'
import type { GroupMember, Invitation, Invite, RoleChange, UndeliveredMail } from '@shared/contracts/people'
import { apiUrl, http } from './http'

export const getGroup = (groupId: string): Promise<Group> => http.get(`/groups/${groupId}`)

export const updateGroup = (groupId: string, change: GroupUpdate): Promise<Group> =>
  http.patch(`/groups/${groupId}`, { json: change })

export const listMembers = async (groupId: string): Promise<GroupMember[]> =>
  (await http.get<{ members: GroupMember[] }>(`/groups/${groupId}/members`)).members

export const changeRole = (groupId: string, userId: string, change: RoleChange): Promise<GroupMember> =>
  http.patch(`/groups/${groupId}/members/${userId}`, { json: change })

export const removeMember = (groupId: string, userId: string): Promise<undefined> =>
  http.delete(`/groups/${groupId}/members/${userId}`)

export const leaveGroup = (groupId: string): Promise<undefined> => http.post(`/groups/${groupId}/leave`)

export const listInvitations = async (groupId: string): Promise<Invitation[]> =>
  (await http.get<{ invitations: Invitation[] }>(`/groups/${groupId}/invitations`)).invitations

export const invite = (groupId: string, invitation: Invite): Promise<Invitation> =>
  http.post(`/groups/${groupId}/invitations`, { json: invitation })

export const sendInvitationAgain = (invitationId: string): Promise<Invitation> =>
  http.post(`/invitations/${invitationId}/send`)

export const revokeInvitation = (invitationId: string): Promise<undefined> =>
  http.delete(`/invitations/${invitationId}`)

/** E-mails of the group that were refused, or wait for the mail server. */
export const listUndeliveredMails = async (groupId: string): Promise<UndeliveredMail[]> =>
  (await http.get<{ mails: UndeliveredMail[] }>(`/groups/${groupId}/mails`)).mails

export const getHistory = (
  groupId: string,
  filter: HistoryFilter,
  before: string | null,
): Promise<HistoryPage> => http.get(`/groups/${groupId}/history`, { query: { ...filter, before } })

/** Where the events that fit are to be had as comma-separated values. */
export const historyCsvUrl = (groupId: string, filter: HistoryFilter): string =>
  apiUrl(`/groups/${groupId}/history.csv`, { ...filter })
