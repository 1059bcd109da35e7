import {
  CalendarLinkList,
  CalendarLinkMade,
  HeapJob,
  HeapJobAmend,
  HeapJobCreate,
  HeapJobList,
  HeapJobQuery,
} from '@/lib/schema/heap-job';
import { Material, MaterialAmend, MaterialCreate, MaterialList } from '@/lib/schema/material';
import { operation } from '../operation';

export const listMaterials = operation({
  id: 'material.list',
  method: 'GET',
  path: '/materials',
  action: 'holding.see',
  summary: "The holding's own materials, with their water, carbon and nitrogen",
  answers: { 200: MaterialList },
});
export const createMaterial = operation({
  id: 'material.create',
  method: 'POST',
  path: '/materials',
  action: 'heap.write',
  summary: 'A material of your own; it goes before a common one of the same name',
  body: MaterialCreate,
  answers: { 201: Material },
});
export const amendMaterial = operation({
  id: 'material.amend',
  method: 'PATCH',
  path: '/materials/{material}',
  action: 'heap.write',
  summary: 'Amend a material; every mix with it is reckoned anew',
  body: MaterialAmend,
  answers: { 200: Material },
});
export const removeMaterial = operation({
  id: 'material.remove',
  method: 'DELETE',
  path: '/materials/{material}',
  action: 'heap.write',
  summary: 'Take a material of your own out of use',
  answers: { 204: null },
});
export const listHeapJobs = operation({
  id: 'heap-job.list',
  method: 'GET',
  path: '/houses/{house}/heap-jobs',
  action: 'holding.see',
  summary: 'Jobs of the year with their days and lists',
  query: HeapJobQuery,
  answers: { 200: HeapJobList },
});
export const createHeapJob = operation({
  id: 'heap-job.create',
  method: 'POST',
  path: '/houses/{house}/heap-jobs',
  action: 'heap.write',
  summary: 'A job with its day and list',
  body: HeapJobCreate,
  answers: { 201: HeapJob },
});
export const amendHeapJob = operation({
  id: 'heap-job.amend',
  method: 'PATCH',
  path: '/houses/{house}/heap-jobs/{job}',
  action: 'heap.write',
  summary: 'Move, tick or finish a job; an item keeps who ticked it',
  body: HeapJobAmend,
  answers: { 200: HeapJob },
});
export const removeHeapJob = operation({
  id: 'heap-job.remove',
  method: 'DELETE',
  path: '/houses/{house}/heap-jobs/{job}',
  action: 'heap.write',
  summary: 'Drop a job',
  answers: { 204: null },
});
export const listCalendarLinks = operation({
  id: 'calendar-link.list',
  method: 'GET',
  path: '/calendar-links',
  action: 'holding.see',
  summary: 'Your calendar links that are in use',
  answers: { 200: CalendarLinkList },
});
export const createCalendarLink = operation({
  id: 'calendar-link.create',
  method: 'POST',
  path: '/calendar-links',
  action: 'holding.see',
  summary: 'A secret address under which your calendar reads the jobs; told once',
  secret: true,
  answers: { 201: CalendarLinkMade },
});
export const revokeCalendarLink = operation({
  id: 'calendar-link.revoke',
  method: 'DELETE',
  path: '/calendar-links/{calendar}',
  action: 'holding.see',
  summary: 'End a calendar link of yours',
  answers: { 204: null },
});
