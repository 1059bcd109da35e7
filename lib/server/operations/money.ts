import {
  HeapCost,
  HeapCostCreate,
  HeapCostList,
  HeapCostQuery,
  MoneyBook,
  MoneyBookWrite,
} from '@/lib/schema/money';
import { ReportSchedule, ReportScheduleCreate, ReportScheduleList } from '@/lib/schema/report';
import { operation } from '../operation';

export const getMoneyBook = operation({
  id: 'money.get',
  method: 'GET',
  path: '/money',
  action: 'holding.see',
  summary: 'Currency, tariffs of electricity, and prices of fuels',
  answers: { 200: MoneyBook },
});
export const writeMoneyBook = operation({
  id: 'money.write',
  method: 'PUT',
  path: '/money',
  action: 'money.write',
  summary: 'Write the prices as a whole; refused (412) where somebody wrote them since they were read',
  body: MoneyBookWrite,
  answers: { 200: MoneyBook },
});
export const listHeapCosts = operation({
  id: 'heap-cost.list',
  method: 'GET',
  path: '/houses/{house}/heap-costs',
  action: 'holding.see',
  summary: 'What heaps cost beside their electricity, newest first',
  query: HeapCostQuery,
  answers: { 200: HeapCostList },
});
export const createHeapCost = operation({
  id: 'heap-cost.create',
  method: 'POST',
  path: '/houses/{house}/heap-costs',
  action: 'money.write',
  summary: 'A cost of a heap: an amount, or hours at a rate, with the seasons for which it serves',
  body: HeapCostCreate,
  answers: { 201: HeapCost },
});
export const amendHeapCost = operation({
  id: 'heap-cost.amend',
  method: 'PUT',
  path: '/houses/{house}/heap-costs/{cost}',
  action: 'money.write',
  summary: 'Write a cost anew, as a whole; what it said before stands in the audit log',
  body: HeapCostCreate,
  answers: { 200: HeapCost },
});
export const removeHeapCost = operation({
  id: 'heap-cost.remove',
  method: 'DELETE',
  path: '/houses/{house}/heap-costs/{cost}',
  action: 'money.write',
  summary: 'Take a cost out again',
  answers: { 204: null },
});
export const listReportSchedules = operation({
  id: 'report-schedule.list',
  method: 'GET',
  path: '/houses/{house}/report-schedules',
  action: 'holding.see',
  summary: 'Reports that are sent by mail',
  answers: { 200: ReportScheduleList },
});
export const createReportSchedule = operation({
  id: 'report-schedule.create',
  method: 'POST',
  path: '/houses/{house}/report-schedules',
  action: 'report.write',
  summary: 'Send a report to people of the holding when each week, month or winter has ended',
  body: ReportScheduleCreate,
  answers: { 201: ReportSchedule },
});
export const removeReportSchedule = operation({
  id: 'report-schedule.remove',
  method: 'DELETE',
  path: '/houses/{house}/report-schedules/{schedule}',
  action: 'report.write',
  summary: 'Send it no more',
  answers: { 204: null },
});
