import { AlarmAcknowledge, AlarmQuery } from '@/lib/schema/alarm';
import { Alarm, AlarmWithEvents } from '@/lib/schema/alarm-view';
import { listOf } from '@/lib/schema/common';
import { NightList, NightsQuery } from '@/lib/schema/night';
import { operation } from '../operation';

export const listNights = operation({
  id: 'night.list',
  method: 'GET',
  path: '/houses/{house}/nights',
  action: 'holding.see',
  summary: 'Nights, noon to noon, newest first; also as CSV',
  query: NightsQuery,
  alsoAnswers: ['text/csv'],
  answers: { 200: NightList },
});
export const listAlarms = operation({
  id: 'alarm.list',
  method: 'GET',
  path: '/alarms',
  action: 'holding.see',
  summary: 'Alarms of the holding, newest first',
  query: AlarmQuery,
  answers: { 200: listOf(Alarm) },
});
export const listHouseAlarms = operation({
  id: 'alarm.list-of-house',
  method: 'GET',
  path: '/houses/{house}/alarms',
  action: 'holding.see',
  summary: 'Alarms of a house, and those of the whole holding',
  query: AlarmQuery,
  answers: { 200: listOf(Alarm) },
});
export const getAlarm = operation({
  id: 'alarm.get',
  method: 'GET',
  path: '/alarms/{alarm}',
  action: 'holding.see',
  summary: 'One alarm with what happened to it',
  answers: { 200: AlarmWithEvents },
});
export const acknowledgeAlarm = operation({
  id: 'alarm.acknowledge',
  method: 'POST',
  path: '/alarms/{alarm}/acknowledge',
  action: 'alarm.answer',
  summary: 'Say "I\'ve got it"',
  body: AlarmAcknowledge,
  answers: { 200: AlarmWithEvents },
});
