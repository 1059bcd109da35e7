import { listOf, PageQuery } from '@/lib/schema/common';
import {
  ChannelAmend,
  ChannelCreate,
  InterlockAmend,
  InterlockCreate,
  LockoutCreate,
} from '@/lib/schema/channel';
import { NodeAmend, NodeCreate } from '@/lib/schema/node';
import { PointAmend, PointCreate } from '@/lib/schema/point';
import { Channel, FieldNode, FieldNodeWithToken, Interlock, Lockout, Point } from '@/lib/schema/yard-view';
import { operation } from '../operation';

export const listNodes = operation({
  id: 'node.list',
  method: 'GET',
  path: '/houses/{house}/nodes',
  action: 'holding.see',
  summary: 'Nodes of a house',
  query: PageQuery,
  answers: { 200: listOf(FieldNode) },
});
export const createNode = operation({
  id: 'node.create',
  method: 'POST',
  path: '/houses/{house}/nodes',
  action: 'wiring.write',
  summary: 'A new node; its token is told once',
  body: NodeCreate,
  secret: true,
  answers: { 201: FieldNodeWithToken },
});
export const getNode = operation({
  id: 'node.get',
  method: 'GET',
  path: '/houses/{house}/nodes/{node}',
  action: 'holding.see',
  summary: 'One node',
  answers: { 200: FieldNode },
});
export const amendNode = operation({
  id: 'node.amend',
  method: 'PATCH',
  path: '/houses/{house}/nodes/{node}',
  action: 'wiring.write',
  summary: 'Change a node',
  body: NodeAmend,
  answers: { 200: FieldNode },
});
export const removeNode = operation({
  id: 'node.remove',
  method: 'DELETE',
  path: '/houses/{house}/nodes/{node}',
  action: 'wiring.write',
  summary: 'Take a node out of use',
  answers: { 204: null },
});
export const rotateToken = operation({
  id: 'node.rotate',
  method: 'POST',
  path: '/houses/{house}/nodes/{node}/token',
  action: 'node.token',
  summary: 'A new token, told once; the one before stays good for 24 h',
  secret: true,
  answers: { 200: FieldNodeWithToken },
});
export const revokeToken = operation({
  id: 'node.revoke',
  method: 'DELETE',
  path: '/houses/{house}/nodes/{node}/token',
  action: 'node.token',
  summary: 'End every token of the node at once',
  answers: { 200: FieldNode },
});
export const listPoints = operation({
  id: 'point.list',
  method: 'GET',
  path: '/houses/{house}/points',
  action: 'holding.see',
  summary: 'Points of a house',
  query: PageQuery,
  answers: { 200: listOf(Point) },
});
export const createPoint = operation({
  id: 'point.create',
  method: 'POST',
  path: '/houses/{house}/points',
  action: 'wiring.write',
  summary: 'A new point',
  body: PointCreate,
  answers: { 201: Point },
});
export const getPoint = operation({
  id: 'point.get',
  method: 'GET',
  path: '/houses/{house}/points/{point}',
  action: 'holding.see',
  summary: 'One point',
  answers: { 200: Point },
});
export const amendPoint = operation({
  id: 'point.amend',
  method: 'PATCH',
  path: '/houses/{house}/points/{point}',
  action: 'wiring.write',
  summary: 'Change a point',
  body: PointAmend,
  answers: { 200: Point },
});
export const removePoint = operation({
  id: 'point.remove',
  method: 'DELETE',
  path: '/houses/{house}/points/{point}',
  action: 'wiring.write',
  summary: 'Take a point out of use',
  answers: { 204: null },
});
export const listChannels = operation({
  id: 'channel.list',
  method: 'GET',
  path: '/houses/{house}/channels',
  action: 'holding.see',
  summary: 'Channels of a house',
  query: PageQuery,
  answers: { 200: listOf(Channel) },
});
export const createChannel = operation({
  id: 'channel.create',
  method: 'POST',
  path: '/houses/{house}/channels',
  action: 'wiring.write',
  summary: 'A new channel',
  body: ChannelCreate,
  answers: { 201: Channel },
});
export const getChannel = operation({
  id: 'channel.get',
  method: 'GET',
  path: '/houses/{house}/channels/{channel}',
  action: 'holding.see',
  summary: 'One channel',
  answers: { 200: Channel },
});
export const amendChannel = operation({
  id: 'channel.amend',
  method: 'PATCH',
  path: '/houses/{house}/channels/{channel}',
  action: 'wiring.write',
  summary: 'Change a channel',
  body: ChannelAmend,
  answers: { 200: Channel },
});
export const removeChannel = operation({
  id: 'channel.remove',
  method: 'DELETE',
  path: '/houses/{house}/channels/{channel}',
  action: 'wiring.write',
  summary: 'Take a channel out of use',
  answers: { 204: null },
});
export const listInterlocks = operation({
  id: 'interlock.list',
  method: 'GET',
  path: '/houses/{house}/interlocks',
  action: 'holding.see',
  summary: 'Interlocks of a house',
  query: PageQuery,
  answers: { 200: listOf(Interlock) },
});
export const createInterlock = operation({
  id: 'interlock.create',
  method: 'POST',
  path: '/houses/{house}/interlocks',
  action: 'wiring.write',
  summary: 'A new interlock',
  body: InterlockCreate,
  answers: { 201: Interlock },
});
export const getInterlock = operation({
  id: 'interlock.get',
  method: 'GET',
  path: '/houses/{house}/interlocks/{interlock}',
  action: 'holding.see',
  summary: 'One interlock',
  answers: { 200: Interlock },
});
export const amendInterlock = operation({
  id: 'interlock.amend',
  method: 'PATCH',
  path: '/houses/{house}/interlocks/{interlock}',
  action: 'wiring.write',
  summary: 'Change a interlock',
  body: InterlockAmend,
  answers: { 200: Interlock },
});
export const removeInterlock = operation({
  id: 'interlock.remove',
  method: 'DELETE',
  path: '/houses/{house}/interlocks/{interlock}',
  action: 'wiring.write',
  summary: 'Take a interlock out of use',
  answers: { 204: null },
});
export const listLockouts = operation({
  id: 'lockout.list',
  method: 'GET',
  path: '/houses/{house}/lockouts',
  action: 'holding.see',
  summary: 'Lock-outs of a house, standing ones first',
  query: PageQuery,
  answers: { 200: listOf(Lockout) },
});
export const placeLockout = operation({
  id: 'lockout.place',
  method: 'POST',
  path: '/houses/{house}/lockouts',
  action: 'lockout.place',
  summary: 'Lock a channel out; refused on an NC contact',
  body: LockoutCreate,
  answers: { 201: Lockout },
});
export const getLockout = operation({
  id: 'lockout.get',
  method: 'GET',
  path: '/houses/{house}/lockouts/{lockout}',
  action: 'holding.see',
  summary: 'One lock-out',
  answers: { 200: Lockout },
});
export const removeLockout = operation({
  id: 'lockout.remove',
  method: 'DELETE',
  path: '/houses/{house}/lockouts/{lockout}',
  action: 'lockout.remove',
  summary: 'Remove a lock-out',
  answers: { 204: null },
});
