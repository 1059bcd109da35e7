import { InterlockReplay, ReplayQuery } from '@/lib/schema/interlock-replay';
import { Setup, SetupPutOff } from '@/lib/schema/setup';
import { operation } from '../operation';

export const getSetup = operation({
  id: 'setup.get',
  method: 'GET',
  path: '/houses/{house}/setup',
  action: 'holding.see',
  summary: 'Steps of a house’s set-up: done, open, put off, or waiting for others',
  answers: { 200: Setup },
});
export const putOffSetup = operation({
  id: 'setup.put-off',
  method: 'PUT',
  path: '/houses/{house}/setup',
  action: 'yard.write',
  summary: 'Which steps are put off; those that are not named are taken up again',
  body: SetupPutOff,
  answers: { 200: Setup },
});
export const getInterlockReplay = operation({
  id: 'interlock.replay',
  method: 'GET',
  path: '/houses/{house}/interlock-replay',
  action: 'holding.see',
  summary: 'What a drafted interlock would have prevented in the last seven nights',
  query: ReplayQuery,
  answers: { 200: InterlockReplay },
});
