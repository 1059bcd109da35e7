import { listOf, PageQuery } from '@/lib/schema/common';
import { HouseAmend, HouseCreate } from '@/lib/schema/house';
import { LoopAmend, LoopCreate, SourceAmend, SourceCreate } from '@/lib/schema/source';
import { House, Loop, Source } from '@/lib/schema/yard-view';
import { operation } from '../operation';

export const listHouses = operation({
  id: 'house.list',
  method: 'GET',
  path: '/houses',
  action: 'holding.see',
  summary: 'Houses of the holding',
  query: PageQuery,
  answers: { 200: listOf(House) },
});
export const createHouse = operation({
  id: 'house.create',
  method: 'POST',
  path: '/houses',
  action: 'yard.write',
  summary: 'A new house',
  body: HouseCreate,
  answers: { 201: House },
});
export const getHouse = operation({
  id: 'house.get',
  method: 'GET',
  path: '/houses/{house}',
  action: 'holding.see',
  summary: 'One house',
  answers: { 200: House },
});
export const amendHouse = operation({
  id: 'house.amend',
  method: 'PATCH',
  path: '/houses/{house}',
  action: 'yard.write',
  summary: 'Change a house',
  body: HouseAmend,
  answers: { 200: House },
});
export const removeHouse = operation({
  id: 'house.remove',
  method: 'DELETE',
  path: '/houses/{house}',
  action: 'house.delete',
  summary: 'Take a house out of use; its record stays',
  answers: { 204: null },
});

export const listSources = operation({
  id: 'source.list',
  method: 'GET',
  path: '/houses/{house}/sources',
  action: 'holding.see',
  summary: 'Sources of a house',
  query: PageQuery,
  answers: { 200: listOf(Source) },
});
export const createSource = operation({
  id: 'source.create',
  method: 'POST',
  path: '/houses/{house}/sources',
  action: 'yard.write',
  summary: 'A new source; its points come first',
  body: SourceCreate,
  answers: { 201: Source },
});
export const getSource = operation({
  id: 'source.get',
  method: 'GET',
  path: '/houses/{house}/sources/{source}',
  action: 'holding.see',
  summary: 'One source',
  answers: { 200: Source },
});
export const amendSource = operation({
  id: 'source.amend',
  method: 'PATCH',
  path: '/houses/{house}/sources/{source}',
  action: 'yard.write',
  summary: 'Change a source',
  body: SourceAmend,
  answers: { 200: Source },
});
export const removeSource = operation({
  id: 'source.remove',
  method: 'DELETE',
  path: '/houses/{house}/sources/{source}',
  action: 'yard.write',
  summary: 'Take a source out of use',
  answers: { 204: null },
});

export const listLoops = operation({
  id: 'loop.list',
  method: 'GET',
  path: '/houses/{house}/loops',
  action: 'holding.see',
  summary: 'Loops of a house',
  query: PageQuery,
  answers: { 200: listOf(Loop) },
});
export const createLoop = operation({
  id: 'loop.create',
  method: 'POST',
  path: '/houses/{house}/loops',
  action: 'yard.write',
  summary: 'A new loop',
  body: LoopCreate,
  answers: { 201: Loop },
});
export const getLoop = operation({
  id: 'loop.get',
  method: 'GET',
  path: '/houses/{house}/loops/{loop}',
  action: 'holding.see',
  summary: 'One loop',
  answers: { 200: Loop },
});
export const amendLoop = operation({
  id: 'loop.amend',
  method: 'PATCH',
  path: '/houses/{house}/loops/{loop}',
  action: 'yard.write',
  summary: 'Change a loop',
  body: LoopAmend,
  answers: { 200: Loop },
});
export const removeLoop = operation({
  id: 'loop.remove',
  method: 'DELETE',
  path: '/houses/{house}/loops/{loop}',
  action: 'yard.write',
  summary: 'Take a loop out of use',
  answers: { 204: null },
});
