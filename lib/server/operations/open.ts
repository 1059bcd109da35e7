import { z } from 'zod';
import { InvitationAccept } from '@/lib/schema/people';
import { Health } from '@/lib/schema/running';
import { operation } from '../operation';

export const getHealth = operation({
  id: 'health.get',
  method: 'GET',
  path: '/health',
  action: null,
  summary: 'Whether every part is up; 503 says which is not',
  answers: { 200: Health, 503: Health },
});
export const getDescription = operation({
  id: 'openapi.get',
  method: 'GET',
  path: '/openapi.json',
  action: null,
  summary: 'This description',
  answers: { 200: z.record(z.string(), z.unknown()) },
});
export const acceptInvitation = operation({
  id: 'invitation.accept',
  method: 'POST',
  path: '/join/{invitation}',
  action: null,
  summary: 'Take up an invitation with the token from its letter; a new person gives name and password',
  body: InvitationAccept,
  answers: { 204: null },
});
export const getCalendar = operation({
  id: 'calendar.get',
  method: 'GET',
  path: '/calendar/{feed}',
  action: null,
  summary: 'The jobs as a calendar (RFC 5545), for who has the secret address',
  answers: {},
  onlyAnswers: 'text/calendar',
});
