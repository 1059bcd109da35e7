import { listOf, PageQuery } from '@/lib/schema/common';
import { ApiKeyCreate, InvitationCreate, MemberAmend } from '@/lib/schema/people';
import {
  ApiKey,
  ApiKeyWithSecret,
  AuditEntry,
  Invitation,
  Letter,
  Me,
  Member,
} from '@/lib/schema/people-view';
import { PreferencesChange } from '@/lib/schema/preferences';
import { operation } from '../operation';

export const getMe = operation({
  id: 'me.get',
  method: 'GET',
  path: '/me',
  action: 'holding.see',
  summary: 'Who is asking, and what they may do',
  answers: { 200: Me },
});
export const putPreferences = operation({
  id: 'preferences.put',
  method: 'PUT',
  path: '/preferences',
  action: 'holding.see',
  summary: 'How the reader wants figures and pages to look',
  body: PreferencesChange,
  unrecorded: true,
  answers: { 204: null },
});
export const listPeople = operation({
  id: 'member.list',
  method: 'GET',
  path: '/people',
  action: 'people.manage',
  summary: 'People of the holding',
  query: PageQuery,
  answers: { 200: listOf(Member) },
});
export const amendMember = operation({
  id: 'member.amend',
  method: 'PATCH',
  path: '/people/{member}',
  action: 'people.manage',
  summary: "Change a person's role; the last owner stays owner",
  body: MemberAmend,
  answers: { 200: Member },
});
export const removeMember = operation({
  id: 'member.remove',
  method: 'DELETE',
  path: '/people/{member}',
  action: 'people.manage',
  summary: 'Take a person out of the holding; the last owner cannot go',
  answers: { 204: null },
});
export const listInvitations = operation({
  id: 'invitation.list',
  method: 'GET',
  path: '/invitations',
  action: 'people.manage',
  summary: 'Invitations that wait for an answer',
  query: PageQuery,
  answers: { 200: listOf(Invitation) },
});
export const createInvitation = operation({
  id: 'invitation.create',
  method: 'POST',
  path: '/invitations',
  action: 'people.manage',
  summary: 'Invite somebody by e-mail',
  body: InvitationCreate,
  answers: { 201: Invitation },
});
export const cancelInvitation = operation({
  id: 'invitation.cancel',
  method: 'DELETE',
  path: '/invitations/{invitation}',
  action: 'people.manage',
  summary: 'Take an invitation back',
  answers: { 204: null },
});
export const listKeys = operation({
  id: 'key.list',
  method: 'GET',
  path: '/api-keys',
  action: 'key.manage',
  summary: 'Keys of programs',
  query: PageQuery,
  answers: { 200: listOf(ApiKey) },
});
export const createKey = operation({
  id: 'key.create',
  method: 'POST',
  path: '/api-keys',
  action: 'key.manage',
  summary: 'A new key; it is told once, and sent as x-api-key',
  body: ApiKeyCreate,
  secret: true,
  answers: { 201: ApiKeyWithSecret },
});
export const revokeKey = operation({
  id: 'key.revoke',
  method: 'DELETE',
  path: '/api-keys/{key}',
  action: 'key.manage',
  summary: 'End a key',
  answers: { 204: null },
});
export const listAudit = operation({
  id: 'audit.list',
  method: 'GET',
  path: '/audit',
  action: 'audit.see',
  summary: 'Who did what, newest first',
  query: PageQuery,
  answers: { 200: listOf(AuditEntry) },
});
export const listMail = operation({
  id: 'mail.list',
  method: 'GET',
  path: '/mail',
  action: 'people.manage',
  summary: 'Letters that stayed on this machine, where no mail server is set up',
  query: PageQuery,
  answers: { 200: listOf(Letter) },
});
