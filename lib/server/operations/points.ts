import { Calibration, CalibrationCreate, ExchangePlaces, RawReading } from '@/lib/schema/calibration';
import { listOf, PageQuery } from '@/lib/schema/common';
import { PointPhotograph, PointPhotographSend } from '@/lib/schema/point-photograph';
import { Point } from '@/lib/schema/yard-view';
import { operation } from '../operation';

export const listCalibrations = operation({
  id: 'calibration.list',
  method: 'GET',
  path: '/houses/{house}/points/{point}/calibrations',
  action: 'holding.see',
  summary: 'Calibrations of a point, newest first; each holds for readings from its time on',
  query: PageQuery,
  answers: { 200: listOf(Calibration) },
});
export const createCalibration = operation({
  id: 'calibration.create',
  method: 'POST',
  path: '/houses/{house}/points/{point}/calibrations',
  action: 'wiring.write',
  summary: 'Calibrate a point by what it read at one place (offset) or two (offset and gain)',
  body: CalibrationCreate,
  answers: { 201: Calibration },
});
export const getRawReading = operation({
  id: 'point.raw',
  method: 'GET',
  path: '/houses/{house}/points/{point}/raw',
  action: 'holding.see',
  summary: 'What a point reads before any calibration, and whether it has come to rest',
  answers: { 200: RawReading },
});
export const exchangePoints = operation({
  id: 'point.exchange',
  method: 'POST',
  path: '/houses/{house}/points/{point}/exchange',
  action: 'wiring.write',
  summary: 'Two probes of a node were wired the wrong way round: their names and places change sides',
  body: ExchangePlaces,
  answers: { 200: Point },
});
export const listPointPhotographs = operation({
  id: 'point-photograph.list',
  method: 'GET',
  path: '/houses/{house}/points/{point}/photographs',
  action: 'holding.see',
  summary: 'Photographs of a point’s place and of its shield against the sun',
  query: PageQuery,
  answers: { 200: listOf(PointPhotograph) },
});
export const addPointPhotograph = operation({
  id: 'point-photograph.add',
  method: 'POST',
  path: '/houses/{house}/points/{point}/photographs',
  action: 'wiring.write',
  summary: 'A photograph of a point, as its bytes; kept without place, camera and other hidden words',
  query: PointPhotographSend,
  takes: { types: ['image/jpeg', 'image/png', 'image/webp'], mostBytes: 10 * 1024 ** 2 },
  answers: { 201: PointPhotograph },
});
export const removePointPhotograph = operation({
  id: 'point-photograph.remove',
  method: 'DELETE',
  path: '/houses/{house}/points/{point}/photographs/{photograph}',
  action: 'wiring.write',
  summary: 'Take a photograph of a point away for good',
  answers: { 204: null },
});
