import {
  HouseStateAnswer,
  OrderAnswer,
  Readings,
  ReadingsQuery,
  SwitchingList,
  SwitchingsQuery,
  Why,
  WhyQuery,
} from '@/lib/schema/running';
import { AllOff, HandCommand } from '@/lib/schema/channel';
import { operation } from '../operation';

export const getState = operation({
  id: 'state.get',
  method: 'GET',
  path: '/houses/{house}/state',
  action: 'holding.see',
  summary: 'How a house stands now',
  answers: { 200: HouseStateAnswer },
});
export const getReadings = operation({
  id: 'readings.get',
  method: 'GET',
  path: '/houses/{house}/readings',
  action: 'holding.see',
  summary: 'Readings of points over time',
  query: ReadingsQuery,
  answers: { 200: Readings },
});
export const listSwitchings = operation({
  id: 'switching.list',
  method: 'GET',
  path: '/houses/{house}/switchings',
  action: 'holding.see',
  summary: 'Switchings with the ladder that decided each, newest first',
  query: SwitchingsQuery,
  answers: { 200: SwitchingList },
});
export const why = operation({
  id: 'why.get',
  method: 'GET',
  path: '/houses/{house}/channels/{channel}/why',
  action: 'holding.see',
  summary: 'Why a channel is, or was, on or off',
  query: WhyQuery,
  answers: { 200: Why },
});
export const takeByHand = operation({
  id: 'hand.take',
  method: 'POST',
  path: '/houses/{house}/channels/{channel}/hand',
  action: 'channel.hand',
  summary: 'Take a channel by hand for a time',
  body: HandCommand,
  answers: { 200: OrderAnswer },
});
export const giveBack = operation({
  id: 'hand.give-back',
  method: 'DELETE',
  path: '/houses/{house}/channels/{channel}/hand',
  action: 'channel.hand',
  summary: 'Give a channel back to its rules',
  answers: { 204: null },
});
export const sayReady = operation({
  id: 'source.ready',
  method: 'POST',
  path: '/houses/{house}/sources/{source}/ready',
  action: 'channel.hand',
  summary: 'Say that a heap is ready, without waiting for its core to show it',
  answers: { 200: OrderAnswer },
});
export const allOff = operation({
  id: 'hand.all-off',
  method: 'POST',
  path: '/houses/{house}/all-off',
  action: 'channel.hand',
  summary: 'Everything in the house off for an hour',
  body: AllOff,
  answers: { 200: OrderAnswer },
});
