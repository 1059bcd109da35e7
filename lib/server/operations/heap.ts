import { listOf } from '@/lib/schema/common';
import { HeapEntryAmend, HeapEntryCreate } from '@/lib/schema/heap';
import { Dismissal, DismissalCreate, HeapFindingList, HeapFindingQuery } from '@/lib/schema/heap-finding';
import {
  HeapEntry,
  HeapEntryQuery,
  Photograph,
  PhotographQuery,
  PhotographSend,
} from '@/lib/schema/heap-view';
import { ProbeSet, ProbeSetAmend, ProbeSetCreate, ProbeSetList, ProbeSetQuery } from '@/lib/schema/probe-set';
import { operation } from '../operation';

export const listHeapEntries = operation({
  id: 'heap-entry.list',
  method: 'GET',
  path: '/houses/{house}/heap-entries',
  action: 'holding.see',
  summary: 'The heap book, newest first',
  query: HeapEntryQuery,
  answers: { 200: listOf(HeapEntry) },
});
export const createHeapEntry = operation({
  id: 'heap-entry.create',
  method: 'POST',
  path: '/houses/{house}/heap-entries',
  action: 'heap.write',
  summary: 'A new entry in the heap book; sent again under its id it is not written again (200)',
  body: HeapEntryCreate,
  answers: { 201: HeapEntry, 200: HeapEntry },
});
export const getHeapEntry = operation({
  id: 'heap-entry.get',
  method: 'GET',
  path: '/houses/{house}/heap-entries/{entry}',
  action: 'holding.see',
  summary: 'One entry',
  answers: { 200: HeapEntry },
});
export const amendHeapEntry = operation({
  id: 'heap-entry.amend',
  method: 'PATCH',
  path: '/houses/{house}/heap-entries/{entry}',
  action: 'heap.write',
  summary: 'Amend an entry; who and when stays beside it',
  body: HeapEntryAmend,
  answers: { 200: HeapEntry },
});
export const addPhotograph = operation({
  id: 'photograph.add',
  method: 'POST',
  path: '/houses/{house}/heap-entries/{entry}/photographs',
  action: 'heap.write',
  summary: 'A photograph with an entry, as its bytes; kept without place, camera and other hidden words',
  query: PhotographSend,
  takes: { types: ['image/jpeg', 'image/png', 'image/webp'], mostBytes: 10 * 1024 ** 2 },
  answers: { 201: Photograph },
});
export const getPhotograph = operation({
  id: 'photograph.get',
  method: 'GET',
  path: '/houses/{house}/photographs/{photograph}',
  action: 'holding.see',
  summary: 'One photograph, whole or small, as JPEG',
  query: PhotographQuery,
  answers: {},
  onlyAnswers: 'image/jpeg',
});
export const removePhotograph = operation({
  id: 'photograph.remove',
  method: 'DELETE',
  path: '/houses/{house}/photographs/{photograph}',
  action: 'heap.write',
  summary: 'Take a photograph out of the book for good',
  answers: { 204: null },
});
export const listProbeSets = operation({
  id: 'probe-set.list',
  method: 'GET',
  path: '/houses/{house}/probe-sets',
  action: 'holding.see',
  summary: 'Rounds with the probe, newest first',
  query: ProbeSetQuery,
  answers: { 200: ProbeSetList },
});
export const createProbeSet = operation({
  id: 'probe-set.create',
  method: 'POST',
  path: '/houses/{house}/probe-sets',
  action: 'heap.write',
  summary: 'A round with the probe; sent again under its id it is not written again (200)',
  body: ProbeSetCreate,
  answers: { 201: ProbeSet, 200: ProbeSet },
});
export const getProbeSet = operation({
  id: 'probe-set.get',
  method: 'GET',
  path: '/houses/{house}/probe-sets/{round}',
  action: 'holding.see',
  summary: 'One round',
  answers: { 200: ProbeSet },
});
export const amendProbeSet = operation({
  id: 'probe-set.amend',
  method: 'PATCH',
  path: '/houses/{house}/probe-sets/{round}',
  action: 'heap.write',
  summary: 'Amend a round, section and places together; who and when stays beside it',
  body: ProbeSetAmend,
  answers: { 200: ProbeSet },
});
export const listHeapFindings = operation({
  id: 'heap-finding.list',
  method: 'GET',
  path: '/houses/{house}/heap-findings',
  action: 'holding.see',
  summary: 'What the figures and the book say about a heap, those set aside last',
  query: HeapFindingQuery,
  answers: { 200: HeapFindingList },
});
export const dismissFinding = operation({
  id: 'heap-finding.dismiss',
  method: 'POST',
  path: '/houses/{house}/heap-dismissals',
  action: 'heap.write',
  summary: 'Set a finding aside with a reason; other or worse evidence brings it back',
  body: DismissalCreate,
  answers: { 201: Dismissal },
});
export const takeBackDismissal = operation({
  id: 'heap-finding.take-back',
  method: 'DELETE',
  path: '/houses/{house}/heap-dismissals/{dismissal}',
  action: 'heap.write',
  summary: 'Show a finding again that was set aside',
  answers: { 204: null },
});
